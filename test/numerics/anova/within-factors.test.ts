import { describe, expect, it } from 'vitest';
import { repeatedMeasuresAnova } from '../../../src/numerics/anova/repeated-measures.ts';
import { withinFactorsAnova } from '../../../src/numerics/anova/within-factors.ts';
import { expectAll } from './expect-close.ts';
import { handLotion, orangeTrees } from './published-scores.ts';

const cells = handLotion.slice(0, 4);

describe('withinFactorsAnova', () => {
  // per participant a = (y3 + y4 - y1 - y2) / 2 = 3, 5, 1 -> mean 3, squares 8: F = n mean^2 / (8 / 2) = 27 / 4
  it('by hand: the first factor of a 2 x 2 design (1e-14)', () => {
    const scores = [
      Float64Array.of(1, 2, 3),
      Float64Array.of(0, 1, 2),
      Float64Array.of(4, 8, 3),
      Float64Array.of(3, 5, 4),
    ];
    const [a] = withinFactorsAnova(scores, [2, 2]);
    expectAll(a!, { F: 27 / 4, df1: 1, df2: 2, ssEffect: 27, ssError: 8, ggEpsilon: 1 }, 1e-14);
    expect(a!.factors).toEqual([0]);
  });

  // R 4.2.2 aov(y ~ a * b + Error(s / (a * b))) on four brands of the hand lotion taken as 2 x 2
  it('agrees with R on a 2 x 2 design (1e-12)', () => {
    const [a, b, ab] = withinFactorsAnova(cells, [2, 2]);
    expectAll(a!, { F: 2.207232267037551, ssEffect: 75.57142857142858, ssError: 205.42857142857153 }, 1e-12);
    expectAll(b!, { F: 1.35, p: 0.2894032248467898 }, 1e-12);
    expectAll(ab!, { F: 8.08383233532934, p: 0.02944273961784264 }, 1e-12);
  });

  it('theory: the effects share out the sum of squares of the one-way layout (1e-12)', () => {
    const effects = withinFactorsAnova(cells, [2, 2]);
    const whole = repeatedMeasuresAnova(cells);
    const total = (key: 'ssEffect' | 'ssError') => effects.reduce((sum, one) => sum + one[key]!, 0);
    expectAll(
      { effect: total('ssEffect'), error: total('ssError') },
      { effect: whole.ssEffect!, error: whole.ssError! },
      1e-12,
    );
    expectAll(withinFactorsAnova(orangeTrees, [4])[0]!, { F: repeatedMeasuresAnova(orangeTrees).F! }, 1e-14);
  });

  it('invariance: exchanging the factors exchanges the effects (1e-13)', () => {
    const [a, b, ab] = withinFactorsAnova(cells, [2, 2]);
    const [b2, a2, ab2] = withinFactorsAnova([cells[0]!, cells[2]!, cells[1]!, cells[3]!], [2, 2]);
    expectAll({ a: a2!.F, b: b2!.F, ab: ab2!.F }, { a: a!.F!, b: b!.F!, ab: ab!.F! }, 1e-13);
  });

  it('degenerate: one participant, an effect without spread', () => {
    const one = withinFactorsAnova(
      cells.map((level) => level.subarray(0, 1)),
      [2, 2],
    );
    expect(one.map((effect) => effect.reason)).toEqual(Array(3).fill('fewer participants than the test needs'));
    const none = withinFactorsAnova(
      cells.map(() => new Float64Array(0)),
      [2, 2],
    );
    expect(none.map((effect) => effect.p)).toEqual([null, null, null]);
    const flat = withinFactorsAnova(
      [1, 2, 3, 4].map((add) => Float64Array.of(add, 5 + add)),
      [2, 2],
    );
    expect(flat[0]!.F).toBeNull();
  });

  it('refuses levels that do not multiply to the vectors', () => {
    expect(() => withinFactorsAnova(cells, [2, 3])).toThrow('*levels* must multiply to 4, each at least 2; got 2 x 3');
    expect(() => withinFactorsAnova(cells, [4, 1])).toThrow(RangeError);
  });
});
