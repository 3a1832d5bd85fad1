import { describe, expect, it } from 'vitest';
import { welchT } from '../../src/numerics/welch.ts';
import { welchAnova } from '../../src/numerics/welch-anova.ts';
import { yuenWelch } from '../../src/numerics/yuen.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { plantGrowth, threeByThree } from './anova/published-scores.ts';

describe('welchAnova', () => {
  // w = 3 each, A = 21, L = 3 (2/3)^2 / 2 = 2/3, F = 21 / (7/6), df2 = 8 / 2; p = (1 + 2F/4)^-2
  it('by hand: equal spread, three of three (1e-14)', () => {
    expectAll(welchAnova(threeByThree), { F: 18, df1: 2, df2: 4, p: 0.01 }, 1e-14);
  });

  // each keeps 3 of 5, d = 2/3; means 5 8 11: A = 13.5, L = 2/3, F = 81/7; p = (14/95)^2
  it('by hand: 20 % trimmed (1e-14)', () => {
    const groups = [0, 3, 6].map((add) => Float64Array.of(add + 4, add, add + 6, add + 30, add + 5));
    expectAll(welchAnova(groups, { trim: 20 }), { F: 81 / 7, df1: 2, df2: 4, p: (14 / 95) ** 2 }, 1e-13);
  });

  // R 4.2.2 oneway.test; statsmodels 0.13.5 anova_oneway(use_var='unequal', trim_frac=0.2)
  it('agrees with R and statsmodels on PlantGrowth (1e-12)', () => {
    expectAll(welchAnova(plantGrowth), { F: 5.180972408113189, df2: 17.12841861664413, p: 0.01739282149017 }, 1e-12);
    const want = { F: 8.281813786559763, df2: 9.639328472208588, p: 0.008068687797542582 };
    expectAll(welchAnova(plantGrowth, { trim: 20 }), want, 1e-12);
  });

  // Welch (1951), Yuen (1974): with two conditions F = t^2 on the same df
  it('theory: two conditions give the square of the t of Welch and of Yuen (1e-12)', () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const welch = welchT(a, b);
    expectAll(welchAnova([a, b]), { F: welch.t! ** 2, df2: welch.df!, p: welch.p! }, 1e-12);
    const yuen = yuenWelch(a, b, { trim: 20 });
    expectAll(welchAnova([a, b], { trim: 20 }), { F: yuen.t! ** 2, df2: yuen.df!, p: yuen.p! }, 1e-12);
  });

  it('invariance: order of conditions, shift and unit, even extreme ones (1e-11)', () => {
    const { F } = welchAnova(plantGrowth);
    expectClose(welchAnova([...plantGrowth].reverse()).F, F!, 1e-12);
    expectClose(welchAnova(plantGrowth.map((scores) => scores.map((score) => 1000 - score))).F, F!, 1e-11);
    expectClose(welchAnova(plantGrowth.map((scores) => scores.map((score) => 1e140 * score))).F, F!, 1e-11);
    expectClose(welchAnova(plantGrowth.map((scores) => scores.map((score) => 1e-140 * score))).F, F!, 1e-11);
  });

  it('degenerate: a condition without spread or with one score kept', () => {
    const flat = welchAnova([Float64Array.of(1, 2), Float64Array.of(3, 3)]);
    expect(flat).toEqual({ F: null, df1: null, df2: null, p: null, reason: 'scores of condition 2 do not vary' });
    expect(welchAnova([Float64Array.of(1), Float64Array.of(3, 4)]).reason).toBe(
      'condition 1 keeps fewer than 2 scores',
    );
  });

  it('refuses one condition and half or more trimmed', () => {
    expect(() => welchAnova(plantGrowth.slice(0, 1))).toThrow(RangeError);
    expect(() => welchAnova(plantGrowth, { trim: 50 })).toThrow(
      '*trim* must be a whole percentage from 0 to 49; got 50',
    );
  });
});
