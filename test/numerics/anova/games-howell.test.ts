import { describe, expect, it } from 'vitest';
import { gamesHowell } from '../../../src/numerics/anova/games-howell.ts';
import { welchT } from '../../../src/numerics/welch.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth, threeByThree } from './published-scores.ts';

describe('gamesHowell', () => {
  // variances 1, n 3: se sqrt(2/3), df 4; q(.95; 3, 4) = 5.040 in printed tables (from memory)
  it('by hand: three of three (1e-3, the digits of the table)', () => {
    const pair = gamesHowell(threeByThree).pairs![1]!;
    expectAll(pair, { first: 0, second: 2, difference: -5, se: Math.sqrt(2 / 3), df: 4 }, 1e-14);
    expectClose(pair.lower, -5 - 5.04 / Math.sqrt(3), 1e-3);
  });

  // formula written out in R 4.2.2 (ptukey) and in Python (scipy.stats.studentized_range)
  it('agrees with R and Python on PlantGrowth (p 1e-7, limits 1e-6)', () => {
    const { pairs } = gamesHowell(plantGrowth);
    expectAll(pairs![2]!, { t: -3.0100985421243616, df: 14.103569122760339, se: 0.2873660074229766 }, 1e-12);
    expectAll(pairs![2]!, { p: 0.023703454738939533, lower: -1.6164870112983378 }, 1e-6);
  });

  it('theory: with two conditions it is the test of Welch with its interval (1e-7)', () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const welch = welchT(a, b);
    const pair = gamesHowell([a, b]).pairs![0]!;
    expectAll(pair, { p: welch.p!, lower: welch.interval![0]!, upper: welch.interval![1]! }, 1e-7);
  });

  it('invariance: a shift of all scores moves nothing (1e-10)', () => {
    const base = gamesHowell(plantGrowth).pairs![1]!;
    const moved = gamesHowell(plantGrowth.map((scores) => scores.map((score) => score - 500))).pairs![1]!;
    expectAll(moved, { difference: base.difference, p: base.p, upper: base.upper }, 1e-10);
  });

  it('degenerate: one condition without spread is compared, two are not', () => {
    const some = [Float64Array.of(1, 2, 3), Float64Array.of(5, 5), Float64Array.of(7, 9)];
    expectClose(gamesHowell(some).pairs![0]!.df, 2, 1e-14);
    expect(gamesHowell([...some, Float64Array.of(4, 4)]).reason).toBe('scores of two conditions do not vary');
    expect(gamesHowell([Float64Array.of(1), Float64Array.of(5, 6)]).pairs).toBeNull();
  });

  it('refuses one condition', () => {
    expect(() => gamesHowell(plantGrowth.slice(0, 1))).toThrow(RangeError);
  });
});
