import { describe, expect, it } from 'vitest';
import { pairwiseWelch } from '../../../src/numerics/anova/pairwise-welch.ts';
import { yuenWelch } from '../../../src/numerics/yuen.ts';
import { expectAll } from './expect-close.ts';
import { plantGrowth, threeByThree } from './published-scores.ts';

describe('pairwiseWelch', () => {
  it('by hand: differences of three means with variance 1 (1e-14)', () => {
    const { pairs } = pairwiseWelch(threeByThree);
    expectAll(pairs![0]!, { difference: -1, se: Math.sqrt(2 / 3), t: -Math.sqrt(1.5), df: 4 }, 1e-14);
    expectAll(pairs![2]!, { first: 1, second: 2, difference: -4, pAdjusted: 2 * pairs![2]!.p }, 1e-14);
  });

  // R 4.2.2 pairwise.t.test(pool.sd = FALSE, p.adjust.method = 'hochberg')
  it('agrees with R on PlantGrowth (1e-11)', () => {
    const { pairs } = pairwiseWelch(plantGrowth, { adjust: 'hochberg' });
    expectAll(pairs![0]!, { p: 0.25038250858754757, pAdjusted: 0.25038250858754757 }, 1e-11);
    expectAll(pairs![1]!, { p: 0.04789925560196932, pAdjusted: 0.09579851120393865 }, 1e-11);
  });

  it('theory: trimmed, each pair is the test of Yuen and Welch (1e-12)', () => {
    const yuen = yuenWelch(plantGrowth[0]!, plantGrowth[2]!, { trim: 20 });
    const pair = pairwiseWelch(plantGrowth, { trim: 20 }).pairs![1]!;
    expectAll(pair, { difference: yuen.estimate!, se: yuen.se!, df: yuen.df!, p: yuen.p! }, 1e-12);
  });

  it('invariance: reflection turns the differences round and keeps p (1e-13)', () => {
    const base = pairwiseWelch(plantGrowth).pairs![1]!;
    const turned = pairwiseWelch(plantGrowth.map((scores) => scores.map((score) => -score))).pairs![1]!;
    expectAll(turned, { t: -base.t, pAdjusted: base.pAdjusted }, 1e-13);
  });

  it('degenerate: two conditions without spread, one score', () => {
    const flat = [Float64Array.of(1, 1), Float64Array.of(2, 2), Float64Array.of(1, 2)];
    expect(pairwiseWelch(flat)).toEqual({ pairs: null, reason: 'scores of two conditions do not vary' });
    expect(pairwiseWelch([Float64Array.of(1), Float64Array.of(2, 3)]).reason).toBe(
      'condition 1 keeps fewer than 2 scores',
    );
  });

  it('refuses half or more trimmed', () => {
    expect(() => pairwiseWelch(plantGrowth, { trim: 50 })).toThrow(RangeError);
  });
});
