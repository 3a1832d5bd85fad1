import { describe, expect, it } from 'vitest';
import { mixedAnova } from '../../../src/numerics/anova/mixed.ts';
import { repeatedMeasuresAnova } from '../../../src/numerics/anova/repeated-measures.ts';
import { studentT } from '../../../src/numerics/student.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { orangeTrees } from './published-scores.ts';

const take = (rows: readonly number[]) => orangeTrees.map((level) => Float64Array.from(rows, (i) => level[i]!));
// trees 1, 3, 5 grow slowly, 2 and 4 fast (R help page of Orange)
const groups = [take([0, 2, 4]), take([1, 3])];

describe('mixedAnova', () => {
  // differences 1 3 | 5 7, squares about the group means 4, everything halved by the length of the comparison:
  // levels 4 participants * ((2 + 6) / 2)^2 / 2 = 32, interaction 4 * 2^2 / 2 = 8, error 4 / 2 = 2 on 2 df;
  // participant means 1.5 3.5 | 4.5 4.5: 4 between groups, 2 within, both times 2 levels
  it('by hand: two groups of two, two levels (1e-14)', () => {
    const a = [Float64Array.of(1, 2), Float64Array.of(2, 5)];
    const b = [Float64Array.of(2, 1), Float64Array.of(7, 8)];
    const anova = mixedAnova([a, b]);
    expectAll(anova.within, { F: 32, df1: 1, df2: 2, ssEffect: 32, ssError: 2 }, 1e-14);
    expectAll(anova.interaction, { F: 8, df1: 1, df2: 2, ssEffect: 8 }, 1e-14);
    expectAll(anova.between, { F: 4, df1: 1, df2: 2, ssBetween: 8, ssWithin: 4 }, 1e-14);
    expect([anova.n, [...anova.groupN]]).toEqual([4, [2, 2]]);
  });

  // R 4.2.2 anova.mlm(X = ~1, test = 'Spherical') with contr.sum, levels against the fit of groups alone; mauchly.test
  it('agrees with R on slow and fast orange trees (1e-11)', () => {
    const { between, within, interaction, mauchly } = mixedAnova(groups);
    expectAll(within, { F: 373.4600397614322, df1: 3, df2: 9, p: 9.282600874808482e-10 }, 1e-11);
    expectAll(interaction, { F: 15.54512922465212, df1: 3, df2: 9, p: 6.636196210369336e-4 }, 1e-11);
    expectAll(interaction, { pGg: 1.476211073815504e-2, pHf: 3.902813609754673e-3 }, 1e-9);
    expectAll(between, { F: 77.26518, ssBetween: 4 * 625.63333333333 }, 1e-7);
    expectClose(mauchly!.W, 0.014067219746314, 1e-10);
  });

  it('theory: with two levels the effects are t tests of sums and differences (1e-11)', () => {
    const two = groups.map((group) => group.slice(1, 3));
    const [a, b] = two.map(([x, y]) => ({ sum: x!.map((v, i) => v + y![i]!), gap: x!.map((v, i) => v - y![i]!) }));
    const anova = mixedAnova(two);
    expectClose(anova.between.F, studentT(a!.sum, b!.sum).t! ** 2, 1e-11);
    expectClose(anova.interaction.F, studentT(a!.gap, b!.gap).t! ** 2, 1e-11);
  });

  it('theory: with equal groups the within effect is that of the layout without groups (1e-11)', () => {
    const equal = [take([0, 2]), take([1, 3])];
    expectClose(mixedAnova(equal).within.ssEffect, repeatedMeasuresAnova(take([0, 2, 1, 3])).ssEffect!, 1e-11);
  });

  it('invariance: order of groups and levels (1e-11)', () => {
    const base = mixedAnova(groups);
    const turned = mixedAnova([...groups].reverse().map((group) => [...group].reverse()));
    expectAll(turned.within, { F: base.within.F!, ggEpsilon: base.within.ggEpsilon! }, 1e-11);
    expectAll(turned.interaction, { F: base.interaction.F!, pHf: base.interaction.pHf! }, 1e-11);
  });

  it('degenerate: an empty group, one participant a group, no spread', () => {
    const empty = mixedAnova([groups[0]!, take([])]);
    expect(empty.within.reason).toBe('group 2 holds no participants');
    expect([empty.between.F, empty.mauchly]).toEqual([null, null]);
    const single = mixedAnova([take([0]), take([1])]);
    expect([single.within.p, single.interaction.p, single.between.p]).toEqual([null, null, null]);
  });

  it('refuses one group and groups with other levels', () => {
    expect(() => mixedAnova([groups[0]!])).toThrow('*groups* must hold at least 2 groups; got 1');
    expect(() => mixedAnova([groups[0]!, groups[1]!.slice(1)])).toThrow('*groups* must hold 4 levels each; got 3');
  });
});
