import { describe, expect, it } from 'vitest';
import {
  noChiSquareTest,
  noFTest,
  requireGroups,
  tooFew,
  trimmedSummaries,
  trimmedSummary,
} from '../../src/numerics/groups.ts';
import { expectAll } from './anova/expect-close.ts';

const five = Float64Array.of(30, 4, 0, 6, 5);

describe('trimmedSummary', () => {
  // 20 % of 5: 0 and 30 go; 4 5 6 stay, mean 5; winsorized 4 4 5 6 6, sum of squares 4, d = 4 / (3 * 2)
  it('by hand: five scores at 20 % (1e-15)', () => {
    expectAll(trimmedSummary(five, 20), { n: 5, h: 3, mean: 5, winsorizedVariance: 1, squaredError: 2 / 3 }, 1e-15);
  });

  // R 4.2: mean(x, trim = .2), var of the winsorized scores, x = 4.17 5.58 5.18 6.11 4.5 4.61 5.17 4.53 5.33 5.14
  it('agrees with R on ten plant weights at 20 % (1e-12)', () => {
    const x = Float64Array.of(4.17, 5.58, 5.18, 6.11, 4.5, 4.61, 5.17, 4.53, 5.33, 5.14);
    expectAll(trimmedSummary(x, 20), { h: 6, mean: 29.96 / 6, winsorizedVariance: 0.13468444444444433 }, 1e-12);
  });

  it('theory: untrimmed, the squared error is variance / n (1e-15)', () => {
    expectAll(trimmedSummary(Float64Array.of(1, 2, 3, 6), 0), { mean: 3, squaredError: 14 / 12 }, 1e-15);
  });

  it('invariance: the order of scores does not matter, and they are not modified', () => {
    expect(trimmedSummary(five, 20)).toEqual(trimmedSummary(Float64Array.of(0, 4, 5, 6, 30), 20));
    expect([...five]).toEqual([30, 4, 0, 6, 5]);
  });

  it('degenerate: equal scores have variance exactly 0, also when rounding says otherwise', () => {
    expect(trimmedSummary(Float64Array.of(0.1, 0.1, 0.1), 0).winsorizedVariance).toBe(0);
    expect(trimmedSummary(Float64Array.of(0.3, 0.1 + 0.2, 0.3), 0).winsorizedVariance).toBe(0);
  });

  it('degenerate: says which condition is too small', () => {
    expect(tooFew([five, Float64Array.of(1)], 2)).toBe('condition 2 holds 1 score, at least 2 needed');
    expect(tooFew([five, five], 2)).toBeNull();
    expect(trimmedSummaries([five, Float64Array.of(1, 2, 3)], 40)).toBe('condition 1 keeps fewer than 2 scores');
    expect(noFTest('why')).toEqual({ F: null, df1: null, df2: null, p: null, reason: 'why' });
    expect(noChiSquareTest('why')).toEqual({ chi2: null, df: null, p: null, reason: 'why' });
  });

  it('refuses one condition, scores that are not finite, and a trim that is no whole percentage', () => {
    expect(() => requireGroups([five])).toThrow('*groups* must hold at least 2 conditions; got 1');
    expect(() => requireGroups([five, Float64Array.of(Number.NaN)])).toThrow(RangeError);
    expect(() => trimmedSummaries([five, five], 0.2)).toThrow(RangeError);
    expect(() => trimmedSummary(Float64Array.of(1), 0)).toThrow(
      '*x* must keep at least 2 scores after trimming; got 1',
    );
  });
});
