import { describe, expect, it } from 'vitest';
import { welchAnova } from '../../src/numerics/welch-anova.ts';
import { welchJames } from '../../src/numerics/welch-james.ts';
import { yuenWelch } from '../../src/numerics/yuen.ts';
import { yuenPaired } from '../../src/numerics/yuen-paired.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { orangeTrees, plantGrowth, threeByThree, warpBreaks } from './anova/published-scores.ts';

const cells = warpBreaks.map((scores) => [scores]);
const design = { between: [2, 3], within: [] };
const wool = { between: [true, false], within: [] };
const tension = { between: [false, true], within: [] };
const both = { between: [true, true], within: [] };

describe('welchJames', () => {
  // means 2 3 7, squared errors 1/3: T = 3 * 14 = 42; M has diagonal 2/3: A = 3 (4/9) / 2 = 2/3;
  // c = 2 + 4/3 - 1 = 7/3, F = 18, df2 = 8 / 2 = 4; p = (1 + 2 * 18 / 4)^-2
  it('by hand: one factor of three levels (1e-13)', () => {
    const groups = threeByThree.map((scores) => [scores]);
    const test = welchJames(groups, { between: [3], within: [] }, { between: [true], within: [] }, { trim: 0 });
    expectAll(test, { T: 42, A: 2 / 3, F: 18, df1: 2, df2: 4, p: 0.01 }, 1e-13);
  });

  // formula written out in R and in Python (test/reference/cases, warpbreaks)
  it('agrees with R and Python on warpbreaks, 20 % trimmed and untrimmed (1e-5, the digits written down)', () => {
    expectAll(welchJames(cells, design, wool), { F: 2.49955, df2: 18.594, p: 0.13074 }, 3e-5);
    expectAll(welchJames(cells, design, tension), { F: 5.18205, df2: 17.65, p: 0.01696 }, 3e-5);
    expectAll(welchJames(cells, design, both), { F: 2.45555, df2: 17.65, p: 0.114582 }, 3e-5);
    expectAll(welchJames(cells, design, both, { trim: 0 }), { F: 3.70469, p: 0.039076 }, 3e-5);
  });

  it('theory: two groups are the test of Yuen and Welch, two levels that of paired trimmed means (1e-11)', () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const yuen = yuenWelch(a, b, { trim: 20 });
    const between = welchJames([[a], [b]], { between: [2], within: [] }, { between: [true], within: [] });
    expectAll(between, { T: yuen.t! ** 2, df2: yuen.df!, p: yuen.p! }, 1e-11);
    const paired = yuenPaired(a, b, { trim: 20 });
    const within = welchJames([[a, b]], { between: [], within: [2] }, { between: [], within: [true] });
    expectAll(within, { T: paired.t! ** 2, df2: paired.df!, p: paired.p! }, 1e-11);
  });

  // Johansen (1980): for one factor F and df2 are Welch's (1951)
  it('theory: one factor is the test of Welch (1e-11)', () => {
    const groups = plantGrowth.map((scores) => [scores]);
    const test = welchJames(groups, { between: [3], within: [] }, { between: [true], within: [] }, { trim: 0 });
    const welch = welchAnova(plantGrowth);
    expectAll(test, { F: welch.F!, df2: welch.df2!, p: welch.p! }, 1e-11);
  });

  it('invariance: order of levels and a change of unit, between and within (1e-10)', () => {
    const turned = [...cells].reverse().map((group) => group.map((scores) => scores.map((score) => 1e-6 * score)));
    expectClose(welchJames(turned, design, both).F, welchJames(cells, design, both).F!, 1e-11);
    const levels = { between: [], within: [3] };
    const effect = { between: [], within: [true] };
    const ages = orangeTrees.slice(0, 3);
    expectClose(welchJames([[...ages].reverse()], levels, effect).F, welchJames([ages], levels, effect).F!, 1e-10);
  });

  it('degenerate: too few kept, no spread', () => {
    const short = cells.map((group, j) => (j === 2 ? [Float64Array.of(1)] : group));
    expect(welchJames(short, design, wool).reason).toBe('group 3 keeps fewer than 2 scores');
    const flat = [[Float64Array.of(0.1, 0.1, 0.1)], [Float64Array.of(0.7, 0.7, 0.1 + 0.6)]];
    const test = welchJames(flat, { between: [2], within: [] }, { between: [true], within: [] }, { trim: 0 });
    expect(test.reason).toBe('the compared means have no spread or determine each other');
  });

  it('refuses groups, design and effect that do not fit', () => {
    expect(() => welchJames(cells, { between: [2, 2], within: [] }, wool)).toThrow('*groups* must be 4; got 6');
    expect(() => welchJames(cells, { between: [], within: [] }, wool)).toThrow(RangeError);
    expect(() => welchJames(cells, design, { between: [true], within: [] })).toThrow(
      '*effect* must mark 2 factors; got 1',
    );
    expect(() => welchJames(cells, design, { between: [false, false], within: [] })).toThrow(RangeError);
    const pairs = [[Float64Array.of(1, 2), Float64Array.of(1)]];
    expect(() => welchJames(pairs, { between: [], within: [2] }, { between: [], within: [true] })).toThrow(RangeError);
    expect(() => welchJames(pairs, { between: [], within: [3] }, { between: [], within: [true] })).toThrow(RangeError);
  });
});
