import { describe, expect, it } from 'vitest';
import { sphericityChecks } from '../../src/analysis/checks-sphericity.ts';
import { effectsOf, expectedOf } from '../support/cases.ts';
import { layoutOf, mixedLayout, sleepLayout, visitLayout } from '../support/check-layouts.ts';

const options = { level: 0.95, test: 'shapiro-wilk' } as const;
const args = { outcome: 'seizures', subject: 'id', within: 'visit' };

describe('sphericityChecks', () => {
  it('agrees with the reference case epilepsy_visits: both factors and Mauchly, rtol 1e-9', () => {
    const known = expectedOf('epilepsy_visits', 'repeated_measures_anova', args);
    const { factors, mauchly } = sphericityChecks(visitLayout, options);
    expect((factors?.gg as number) / (known.gg_epsilon as number)).toBeCloseTo(1, 9);
    expect((factors?.hf as number) / (known.hf_epsilon as number)).toBeCloseTo(1, 9);
    expect((mauchly?.W as number) / (known.mauchly_W as number)).toBeCloseTo(1, 9);
    expect((mauchly?.chi2 as number) / (known.mauchly_chi2 as number)).toBeCloseTo(1, 9);
  });

  it('agrees with the reference case mixed_anova: factors from the covariances pooled over groups, rtol 1e-9', () => {
    const known = effectsOf('epilepsy_visits', 'mixed_anova', { ...args, between: 'treatment' }).visit;
    const { factors, groups } = sphericityChecks(mixedLayout, options);
    expect((factors?.gg as number) / (known?.gg_epsilon as number)).toBeCloseTo(1, 9);
    expect((factors?.hf as number) / (known?.hf_epsilon as number)).toBeCloseTo(1, 9);
    const placebo = expectedOf('epilepsy_visits', 'repeated_measures_anova', {
      ...args,
      where: { treatment: 'placebo' },
    });
    const own = groups.find(({ name }) => name === 'placebo');
    expect((own?.gg as number) / (placebo.gg_epsilon as number)).toBeCloseTo(1, 9);
    expect([own?.n, own?.sds.length]).toEqual([28, 4]);
  });

  it('agrees with pandas 1.5: mean and SD of v1 minus v2, and their places among all pairs, 1e-9', () => {
    const { pairs } = sphericityChecks(visitLayout, options);
    expect(pairs.map(({ first, second }) => `${first} ${second}`)).toEqual([
      'v1 v2',
      'v1 v3',
      'v1 v4',
      'v2 v3',
      'v2 v4',
      'v3 v4',
    ]);
    // (w.v1 - w.v2).mean(), .std() of the table with one row a patient.
    expect(pairs[0]?.mean).toBeCloseTo(0.5932203389830508, 9);
    expect(pairs[0]?.sd).toBeCloseTo(7.788405715455809, 9);
  });

  it('by hand: the interval of an SD of 2 on 9 df is [1.3757, 3.6512]', () => {
    // 2 sqrt(9 / 19.0228), 2 sqrt(9 / 2.7004): tabled chi-square quantiles of 9 df, common practice.
    const d = [-3, -2, -1, -1, 0, 0, 1, 1, 2, 3].map((value) => (value * 2) / Math.sqrt(30 / 9));
    const { pairs } = sphericityChecks(layoutOf(d.map((value) => [value, 0, value / 2])), options);
    expect(pairs[0]?.sd).toBeCloseTo(2, 12);
    expect(pairs[0]?.interval?.[0]).toBeCloseTo(1.3757, 4);
    expect(pairs[0]?.interval?.[1]).toBeCloseTo(3.6512, 4);
  });

  it('theory: Holm multiplies the smallest p by the number of pairs', () => {
    const { pairs } = sphericityChecks(visitLayout, options);
    const least = pairs.reduce((a, b) => ((a.p as number) < (b.p as number) ? a : b));
    expect(least.adjusted).toBeCloseTo(Math.min(1, 6 * (least.p as number)), 12);
  });

  it('degenerate: differences that do not vary have no factors, and a reason', () => {
    const layout = layoutOf([
      [1, 2, 4],
      [5, 6, 8],
      [3, 4, 6],
      [9, 10, 12],
    ]);
    const { factors, mauchly, reason, pairs } = sphericityChecks(layout, options);
    expect([factors, mauchly, reason]).toEqual([null, null, 'the differences between levels do not vary']);
    expect([pairs[0]?.interval, pairs[0]?.p, pairs[0]?.adjusted]).toEqual([null, null, null]);
  });

  it('refuses two levels: sphericity is not defined there (R6)', () => {
    expect(() => sphericityChecks(sleepLayout, options)).toThrow(/at least 3 columns; got 2/);
  });
});
