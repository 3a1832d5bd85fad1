import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import { args, row, toothSamples } from '../support/samples.ts';

describe('rows between participants on ranks and ratios', () => {
  const findings = compareSamples(args(toothSamples, { estimator: 'yuen-welch' }));

  it('invariance: P(higher) and P(lower) of the same groups add to one', () => {
    const lower = compareSamples({ ...args(toothSamples), direction: 'lower' });
    const sum =
      (row(findings, 'brunner-munzel').estimate as number) + (row(lower, 'brunner-munzel').estimate as number);
    expect(sum).toBeCloseTo(1, 12);
    expect(row(lower, 'brunner-munzel').p).toBeCloseTo(row(findings, 'brunner-munzel').p as number, 12);
  });

  it('theory: one-sided p of the probability row looks the same way as Welch', () => {
    const one = compareSamples(args(toothSamples, { alternative: 'greater' }));
    expect(row(one, 'brunner-munzel').p).toBeLessThan(0.5);
    expect(row(one, 'welch').p).toBeLessThan(0.5);
    expect(row(one, 'rank-sum').p).toBeLessThan(0.5);
    expect(row(one, 'brunner-munzel').interval?.[1]).toBeNull();
  });

  it('refuses a ratio where a score is zero, with the count', () => {
    const zero = compareSamples(args({ ...toothSamples, x: toothSamples.x.map((v, i) => (i < 2 ? 0 : v)) }));
    expect(row(zero, 'group-ratio').reason).toBe('2 scores are zero or negative and have no logarithm');
  });

  it('degenerate: complete separation gives a reason in the probability row, no NaN', () => {
    const apart = row(
      compareSamples(args({ ...toothSamples, x: toothSamples.x.map((v) => v + 1000) })),
      'brunner-munzel',
    );
    expect([apart.p, apart.interval]).toEqual([null, null]);
    expect((apart.reason ?? '').length).toBeGreaterThan(5);
  });
});
