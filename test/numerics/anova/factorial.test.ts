import { describe, expect, it } from 'vitest';
import { factorialAnova } from '../../../src/numerics/anova/factorial.ts';
import { oneWayAnova } from '../../../src/numerics/anova/one-way.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { warpBreaks } from './published-scores.ts';

const balanced = [Float64Array.of(1, 3), Float64Array.of(4, 6), Float64Array.of(5, 7), Float64Array.of(12, 14)];
/** warpbreaks without rows 1 to 3 (wool A, tension L) and row 45 (the last of wool B, tension M). */
const uneven = warpBreaks.map((cell, j) => (j === 0 ? cell.subarray(3) : j === 4 ? cell.subarray(0, 8) : cell));

describe('factorialAnova', () => {
  // cell means 2 5 6 13: rows 3.5 9.5 -> 72, columns 4 9 -> 50, interaction 8 (4/4)^2 = 8, error 8 on 4 df
  it('by hand: 2 x 2, two scores a cell, all three types alike (1e-13)', () => {
    for (const type of [1, 2, 3] as const) {
      const { effects, ssError, dfError } = factorialAnova(balanced, [2, 2], type);
      expectAll({ ssError, dfError }, { ssError: 8, dfError: 4 }, 1e-14);
      expect(effects.map((effect) => effect.factors)).toEqual([[0], [1], [0, 1]]);
      [72, 50, 8].forEach((ss, i) => {
        expectAll(effects[i]!, { ss, df1: 1, df2: 4, F: ss / 2, partialEta2: ss / (ss + 8) }, 1e-13);
      });
    }
  });

  // R 4.2.2 anova(lm(breaks ~ wool * tension)), the same with tension first, drop1(. ~ .) with contr.sum
  it('agrees with R on uneven cells (1e-11)', () => {
    const ss = (type: 1 | 2 | 3) => factorialAnova(uneven, [2, 3], type).effects.map((effect) => effect.ss!);
    const inOrder = [339.7928205128205, 1974.035820402773, 1221.6180257510732];
    const given = [504.4407977783391, 1974.035820402773, 1221.6180257510732];
    const coded = [616.6551362683431, 2311.4206008583687, 1221.6180257510723];
    [inOrder, given, coded].forEach((want, t) => {
      ss((t + 1) as 1 | 2 | 3).forEach((value, i) => {
        expectClose(value, want[i]!, 1e-11);
      });
    });
    const { effects, ssError, dfError } = factorialAnova(uneven, [2, 3], 3);
    expectAll({ ssError, dfError }, { ssError: 5006.333333333334, dfError: 44 }, 1e-12);
    expectAll(effects[1]!, { F: 10.157384623254032, p: 0.0002361147594395998 }, 1e-11);
  });

  it('theory: the sums in order add up to the sum between cells (1e-12)', () => {
    const { effects } = factorialAnova(uneven, [2, 3], 1);
    const total = effects.reduce((sum, effect) => sum + effect.ss!, 0);
    expectClose(total, oneWayAnova(uneven).ssBetween!, 1e-12);
  });

  it('theory: one factor is the one-way analysis of variance (1e-12)', () => {
    const one = factorialAnova(uneven, [6], 3).effects[0]!;
    expectAll(one, { F: oneWayAnova(uneven).F!, p: oneWayAnova(uneven).p! }, 1e-12);
  });

  it('invariance: exchanging factors, order of levels, 1e9 added (1e-6 for its digits)', () => {
    const [a, b, ab] = factorialAnova(uneven, [2, 3], 3).effects;
    const swapped = [0, 3, 1, 4, 2, 5].map((j) => uneven[j]!).reverse();
    const [b2, a2, ab2] = factorialAnova(swapped, [3, 2], 3).effects;
    expectAll({ a: a2!.F, b: b2!.F, ab: ab2!.F }, { a: a!.F!, b: b!.F!, ab: ab!.F! }, 1e-11);
    const far = factorialAnova(
      uneven.map((cell) => cell.map((score) => score + 1e9)),
      [2, 3],
      2,
    ).effects;
    expectClose(far[0]!.ss, 504.4407977783391, 1e-6);
  });

  it('degenerate: an empty cell, single scores, no spread', () => {
    const holed = uneven.map((cell, j) => (j === 5 ? new Float64Array(0) : cell));
    expect(factorialAnova(holed, [2, 3], 3).reason).toBe('a combination of levels holds no scores');
    const { effects } = factorialAnova(holed, [2, 3], 2);
    expect(effects.map((effect) => effect.df1)).toEqual([1, 2, 1]);
    const corner = [balanced[0]!, new Float64Array(0), new Float64Array(0), balanced[3]!];
    expect(factorialAnova(corner, [2, 2], 1).effects[1]!.reason).toBe('empty cells hide this effect');
    expect(
      factorialAnova(
        [1, 2, 3, 4].map((score) => Float64Array.of(score)),
        [2, 2],
        1,
      ).reason,
    ).toBe('no cell holds two scores');
    const flat = factorialAnova(
      [1, 2, 3, 4].map((score) => Float64Array.of(score, score)),
      [2, 2],
      1,
    );
    expect([flat.reason, flat.ssError, flat.effects[0]!.F]).toEqual(['scores do not vary within cells', 0, null]);
  });

  it('refuses levels that do not fit and an unknown type', () => {
    expect(() => factorialAnova(balanced, [2, 3], 1)).toThrow(
      '*levels* must multiply to 4, each at least 2; got 2 x 3',
    );
    expect(() => factorialAnova(balanced, [2, 2], 4 as 3)).toThrow('*type* must be 1, 2 or 3; got 4');
  });
});
