import { describe, expect, it } from 'vitest';
import { bartlettTest } from '../../src/numerics/bartlett.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { plantGrowth } from './anova/published-scores.ts';

describe('bartlettTest', () => {
  // variances 1 and 4, pooled 2.5: (4 ln 2.5 - 2 ln 4) / (1 + (1/2 + 1/2 - 1/4) / 3)
  it('by hand: two conditions of three (1e-14)', () => {
    const want = (4 * Math.log(2.5) - 2 * Math.log(4)) / 1.25;
    expectAll(bartlettTest([Float64Array.of(1, 2, 3), Float64Array.of(2, 4, 6)]), { chi2: want, df: 1 }, 1e-14);
  });

  // R 4.2.2 bartlett.test
  it('agrees with R on PlantGrowth (1e-12)', () => {
    expectAll(bartlettTest(plantGrowth), { chi2: 2.8785737872360935, df: 2, p: 0.23709677363455817 }, 1e-12);
  });

  it('theory: equal variances give 0 and p 1', () => {
    expectAll(bartlettTest([Float64Array.of(1, 2, 3), Float64Array.of(7, 9, 8)]), { chi2: 0, p: 1 }, 1e-15);
  });

  it('invariance: shift of one condition, order, extreme unit (1e-11)', () => {
    const moved = plantGrowth.map((scores, j) => scores.map((score) => 1e100 * (score + j))).reverse();
    expectClose(bartlettTest(moved).chi2, bartlettTest(plantGrowth).chi2!, 1e-11);
  });

  it('degenerate: a condition without spread, or with one score', () => {
    const flat = bartlettTest([Float64Array.of(1, 2), Float64Array.of(0.1, 0.1)]);
    expect(flat).toEqual({ chi2: null, df: null, p: null, reason: 'scores of condition 2 do not vary' });
    expect(bartlettTest([Float64Array.of(1, 2), Float64Array.of(1)]).p).toBeNull();
  });

  it('refuses one condition', () => {
    expect(() => bartlettTest(plantGrowth.slice(0, 1))).toThrow('*groups* must hold at least 2 conditions; got 1');
  });
});
