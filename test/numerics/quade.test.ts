import { describe, expect, it } from 'vitest';
import { quadeTest } from '../../src/numerics/quade.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { handLotion } from './anova/published-scores.ts';

// rows 1 2 4 | 1 6 5 | 3 2 10: ranges 3 5 8, so weights 1 2 3
const three = [Float64Array.of(1, 1, 3), Float64Array.of(2, 6, 2), Float64Array.of(4, 5, 10)];

describe('quadeTest', () => {
  // sums -3 -1 4, B = 26/3, all 28: F = 2 (26/3) / (58/3) = 26/29; p = (1 + 13/29)^-2
  it('by hand: three participants, three levels (1e-14)', () => {
    expectAll(quadeTest(three), { F: 26 / 29, df1: 2, df2: 4, p: (29 / 42) ** 2 }, 1e-14);
  });

  // R 4.2.2 quade.test, the example of its help page
  it('agrees with R on the hand lotion (1e-12)', () => {
    expectAll(quadeTest(handLotion), { F: 3.829251584175373, df1: 4, df2: 24, p: 0.01518902007327459 }, 1e-12);
  });

  // Conover (1999): with two levels S = +- Q / 2, so F = (n-1) W^2 / (n sum Q^2 - W^2) of the signed ranks, W = W+ - W-
  it('theory: two levels come from the signed-rank sum (1e-14)', () => {
    const x = [Float64Array.of(1, 2, 3, 4, 9), Float64Array.of(2, 4, 6.5, 9, 1)];
    const W = 1 + 2 + 3 + 4 - 5;
    expectClose(quadeTest(x).F, (4 * W * W) / (5 * 55 - W * W), 1e-14);
  });

  it('invariance: shift of a participant and a common unit (1e-14)', () => {
    const moved = three.map((level) => level.map((score, i) => 4 * score + 128 * i));
    expectClose(quadeTest(moved).F, quadeTest(three).F!, 1e-14);
  });

  it('degenerate: complete agreement, all equal, one participant', () => {
    expect(quadeTest([Float64Array.of(1, 1), Float64Array.of(2, 2)]).reason).toBe(
      'all participants rank the levels alike',
    );
    expect(quadeTest([Float64Array.of(1, 5), Float64Array.of(1, 5)]).reason).toMatch('all equal');
    expect(quadeTest([Float64Array.of(1), Float64Array.of(2)]).F).toBeNull();
  });

  it('refuses unequal lengths', () => {
    expect(() => quadeTest([Float64Array.of(1, 2), Float64Array.of(2)])).toThrow(RangeError);
  });
});
