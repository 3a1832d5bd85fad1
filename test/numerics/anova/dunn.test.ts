import { describe, expect, it } from 'vitest';
import { dunnTest } from '../../../src/numerics/anova/dunn.ts';
import { kruskalWallis } from '../../../src/numerics/kruskal-wallis.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth } from './published-scores.ts';

describe('dunnTest', () => {
  // mean ranks 2 5 8, variance 90/12 = 7.5: z = -3 / sqrt(7.5 * 2/3) = -3 / sqrt(5)
  it('by hand: three separate conditions (1e-14)', () => {
    const { pairs } = dunnTest([Float64Array.of(1, 2, 3), Float64Array.of(4, 5, 6), Float64Array.of(7, 8, 9)]);
    expectAll(pairs![0]!, { first: 0, second: 1, z: -3 / Math.sqrt(5) }, 1e-14);
    expectAll(pairs![1]!, { first: 0, second: 2, z: -6 / Math.sqrt(5), pAdjusted: 3 * pairs![1]!.p }, 1e-14);
  });

  // formula written out in R 4.2.2 and in Python (test/reference/cases, plant_growth)
  it('agrees with R and Python on PlantGrowth (1e-11)', () => {
    const { pairs } = dunnTest(plantGrowth, { adjust: 'bh' });
    expectAll(pairs![1]!, { z: -1.6892896071861212, p: 0.09116394404849984, pAdjusted: 0.13674591607274977 }, 1e-11);
  });

  it('theory: with two conditions z^2 is H of Kruskal and Wallis (1e-13)', () => {
    const two = plantGrowth.slice(0, 2);
    expectClose(dunnTest(two).pairs![0]!.z ** 2, kruskalWallis(two).H!, 1e-13);
  });

  it('invariance: an increasing change of the scores changes nothing, exactly', () => {
    const grown = plantGrowth.map((scores) => scores.map((score) => score * score));
    expect(dunnTest(grown)).toEqual(dunnTest(plantGrowth));
  });

  it('degenerate: all scores equal, an empty condition', () => {
    expect(dunnTest([Float64Array.of(1, 1), Float64Array.of(1)])).toEqual({
      pairs: null,
      reason: 'all scores are equal',
    });
    expect(dunnTest([Float64Array.of(1, 2), new Float64Array(0)]).pairs).toBeNull();
  });

  it('refuses one condition', () => {
    expect(() => dunnTest(plantGrowth.slice(0, 1))).toThrow(RangeError);
  });
});
