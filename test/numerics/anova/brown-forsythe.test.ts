import { describe, expect, it } from 'vitest';
import { brownForsytheF } from '../../../src/numerics/anova/brown-forsythe.ts';
import { welchT } from '../../../src/numerics/welch.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth, threeByThree } from './published-scores.ts';

describe('brownForsytheF', () => {
  // equal n and spread: F* is F = 21, c = 1/3 each so df2 = 6, Mehrotra's df1 = 4 / (3 + 1 - 2) = 2
  it('by hand: equal spread (1e-14)', () => {
    expectAll(
      brownForsytheF(threeByThree),
      { F: 21, df1: 2, df2: 6, p: 1 / 512, df1Mehrotra: 2, pMehrotra: 1 / 512 },
      1e-13,
    );
  });

  // statsmodels 0.13.5 anova_oneway(use_var='bf')
  it('agrees with statsmodels on PlantGrowth (1e-12)', () => {
    const want = { F: 4.846087862380137, df2: 22.208370194282107, p: 0.01792742527228789 };
    expectAll(brownForsytheF(plantGrowth), want, 1e-12);
    expectAll(brownForsytheF(plantGrowth), { df1Mehrotra: 1.8052514323559261, pMehrotra: 0.02054872747146298 }, 1e-12);
  });

  // Brown & Forsythe (1974): with two conditions F* is Welch's t squared on its df
  it('theory: two conditions give the square of the t of Welch (1e-12)', () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const { t, df, p } = welchT(a, b.subarray(0, 7));
    expectAll(brownForsytheF([a, b.subarray(0, 7)]), { F: t! * t!, df2: df!, p: p! }, 1e-12);
  });

  it('invariance: order of conditions and extreme units (1e-11)', () => {
    const { F, df1Mehrotra } = brownForsytheF(plantGrowth);
    const scaled = brownForsytheF([...plantGrowth].reverse().map((scores) => scores.map((score) => 1e120 * score)));
    expectAll(scaled, { F: F!, df1Mehrotra: df1Mehrotra! }, 1e-11);
  });

  it('degenerate: no spread anywhere, or one condition without spread', () => {
    const flat = [Float64Array.of(1, 1), Float64Array.of(2, 2)];
    expect(brownForsytheF(flat).reason).toBe('scores do not vary within conditions');
    expect(brownForsytheF(flat).pMehrotra).toBeNull();
    // one condition varies: c = 1 for it, so df2 = n - 1 = 2
    expectClose(brownForsytheF([Float64Array.of(1, 2, 3), Float64Array.of(4, 4)]).df2, 2, 1e-14);
  });

  it('refuses one condition', () => {
    expect(() => brownForsytheF(plantGrowth.slice(0, 1))).toThrow(RangeError);
  });
});
