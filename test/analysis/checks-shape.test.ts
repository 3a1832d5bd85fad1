import { describe, expect, it } from 'vitest';
import { residualsOf } from '../../src/analysis/checks-residuals.ts';
import { shapeChecks, shapeTest } from '../../src/analysis/checks-shape.ts';
import { expectedOf } from '../support/cases.ts';
import { plantLayout, sleepLayout } from '../support/check-layouts.ts';
import { csv } from '../support/samples.ts';

const ctrl = Float64Array.from((csv('plant_growth').weight as number[]).slice(0, 10));
const where = { outcome: 'weight', where: { group: 'ctrl' } };

describe('shapeChecks', () => {
  it('agrees with the reference cases of plant_growth ctrl: W, D, A2* and their p, rtol 1e-6', () => {
    const { tests } = shapeChecks(ctrl, 0.95);
    const [w, d, a] = ['shapiro_wilk', 'lilliefors_test', 'anderson_darling_normal'].map((method) =>
      expectedOf('plant_growth', method, where),
    );
    expect((tests[0]?.statistic as number) / (w?.W as number)).toBeCloseTo(1, 6);
    expect((tests[0]?.p as number) / (w?.p as number)).toBeCloseTo(1, 6);
    expect((tests[1]?.statistic as number) / (d?.D as number)).toBeCloseTo(1, 9);
    expect((tests[2]?.statistic as number) / (a?.A2_star as number)).toBeCloseTo(1, 9);
    expect((tests[2]?.p as number) / (a?.p as number)).toBeCloseTo(1, 9);
  });

  it('agrees with the reference cases: G1, its SE and z; the interval is 1.96 of those SE on each side, 1e-9', () => {
    const { skew, excess } = shapeChecks(ctrl, 0.95);
    const known = expectedOf('plant_growth', 'skewness', where);
    expect(skew.value).toBeCloseTo(known.G1 as number, 9);
    expect(skew.se).toBeCloseTo(known.se_G1 as number, 9);
    expect(skew.z).toBeCloseTo(known.z_simple as number, 9);
    // 1.959964: the normal quantile of .975, common practice.
    expect((skew.interval?.[1] as number) - (skew.value as number)).toBeCloseTo(1.959964 * (skew.se as number), 6);
    expect(excess.value).toBeCloseTo(expectedOf('plant_growth', 'kurtosis', where).G2 as number, 9);
  });

  it('agrees with the reference case sleep: W of the DIFFERENCES, not of the pooled scores, rtol 1e-6', () => {
    const residuals = residualsOf(sleepLayout).values;
    const own = expectedOf('sleep', 'shapiro_wilk', { subject: 'subject' });
    // The same file's case of all twenty scores together.
    const pooled = 0.946072762509969;
    const w = shapeTest('shapiro-wilk', residuals).statistic as number;
    expect(w / (own.W as number)).toBeCloseTo(1, 6);
    expect(Math.abs(w / pooled - 1)).toBeGreaterThan(0.1);
  });

  it('agrees with SciPy 1.10: residuals of three groups of plants (W .9660681, p .4378988), 1e-6', () => {
    const { tests, skew, excess, n } = shapeChecks(residualsOf(plantLayout).values, 0.95);
    expect(n).toBe(30);
    // scipy.stats.shapiro, skew and kurtosis (bias=False) of weight minus its group's mean.
    expect(tests[0]?.statistic).toBeCloseTo(0.9660681486, 6);
    expect(tests[0]?.p).toBeCloseTo(0.4378987551, 5);
    expect(skew.value).toBeCloseTo(0.5518326046247688, 9);
    expect(excess.value).toBeCloseTo(0.03401278928022311, 9);
  });

  it('by hand: scores beyond 3 MAD of the median are counted', () => {
    // Median 5, MAD 2, 3 x 1.4826 x 2 = 8.9: only 20 lies further.
    expect(shapeChecks(Float64Array.of(1, 3, 4, 5, 6, 7, 20), 0.95).beyond).toBe(1);
    expect(shapeChecks(Float64Array.of(2, 2, 2, 2, 9), 0.95).beyond).toBeNull();
  });

  it('invariance: unit and origin change nothing, 1e-9', () => {
    const [a, b] = [
      shapeChecks(ctrl, 0.95),
      shapeChecks(
        ctrl.map((value) => 1000 * value - 40),
        0.95,
      ),
    ];
    for (const [at, test] of a.tests.entries()) expect(test.statistic).toBeCloseTo(b.tests[at]?.statistic as number, 9);
    expect(a.skew.value).toBeCloseTo(b.skew.value as number, 9);
  });

  it('degenerate: equal scores and too few give null with a reason', () => {
    const { skew, excess, tests } = shapeChecks(Float64Array.of(3, 3, 3), 0.95);
    expect(skew).toEqual({ value: null, se: null, z: null, interval: null, reason: 'all scores are equal' });
    expect(excess.reason).toBe('fewer than 4 scores');
    expect(tests.map(({ statistic, p }) => [statistic, p])).toEqual([
      [null, null],
      [null, null],
      [null, null],
    ]);
    expect(tests[0]?.reason).toBe('all scores are equal');
  });

  it('refuses scores that are not finite', () => {
    expect(() => shapeChecks(Float64Array.of(1, NaN, 3), 0.95)).toThrow(RangeError);
  });
});
