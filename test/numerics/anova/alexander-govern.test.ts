import { describe, expect, it } from 'vitest';
import { alexanderGovern } from '../../../src/numerics/anova/alexander-govern.ts';
import { chiSquareUpper } from '../../../src/numerics/tails/chi-square.ts';
import { tQuantileUpper } from '../../../src/numerics/tails/t.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth } from './published-scores.ts';

describe('alexanderGovern', () => {
  // 1 3 and 5 7: weighted mean 4, t = -2 and 2 on 1 df, a = .5, b = 12, c = sqrt(.5 ln 5) = .8970614:
  // z = .8970614 + .2844232 + ... worked out with a calculator to seven places, A = 2 z^2
  it('by hand: two conditions of two (1e-6)', () => {
    const c = 0.8970613;
    const high = 4 * c ** 7 + 33 * c ** 5 + 240 * c ** 3 + 855 * c;
    const z = c + (c ** 3 + 3 * c) / 12 - high / (1440 + 96 * c ** 4 + 12000);
    expectClose(alexanderGovern([Float64Array.of(1, 3), Float64Array.of(5, 7)]).A, 2 * z * z, 1e-6);
  });

  // SciPy 1.10.1 stats.alexandergovern
  it('agrees with SciPy on PlantGrowth (1e-12)', () => {
    expectAll(alexanderGovern(plantGrowth), { A: 8.328463126814757, df: 2, p: 0.01554165308759033 }, 1e-12);
  });

  // Hill (1970): z has the normal tail of t; here t for the two-sided .05 of 10 df gives A = 2 * 1.96^2
  it('theory: the transformed t has the normal tail (1e-4 of z)', () => {
    const base = Float64Array.from({ length: 11 }, (_, i) => i);
    const se = Math.sqrt(1); // variance 11 of 0..10 over n = 11
    const gap = 2 * tQuantileUpper(0.025, 10) * se;
    const { A } = alexanderGovern([base, base.map((score) => score + gap)]);
    expectClose(Math.sqrt(A! / 2), 1.959963984540054, 1e-4);
  });

  it('invariance: order of conditions and unit (1e-11)', () => {
    const { A } = alexanderGovern(plantGrowth);
    expectClose(alexanderGovern([...plantGrowth].reverse().map((s) => s.map((score) => -1e-130 * score))).A, A!, 1e-11);
  });

  it('degenerate: equal means give 0, a condition without spread a reason', () => {
    const same = Float64Array.of(1, 2, 3);
    expect(alexanderGovern([same, same])).toEqual({ A: 0, df: 1, p: chiSquareUpper(0, 1) });
    expect(alexanderGovern([same, Float64Array.of(2, 2)]).reason).toBe('scores of condition 2 do not vary');
    expect(alexanderGovern([same, Float64Array.of(2)]).A).toBeNull();
  });

  it('refuses scores that are not finite', () => {
    expect(() => alexanderGovern([Float64Array.of(1, 2), Float64Array.of(1, Number.POSITIVE_INFINITY)])).toThrow(
      RangeError,
    );
  });
});
