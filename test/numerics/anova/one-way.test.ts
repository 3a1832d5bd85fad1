import { describe, expect, it } from 'vitest';
import { oneWayAnova, sumsOfSquares } from '../../../src/numerics/anova/one-way.ts';
import { studentT } from '../../../src/numerics/student.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth, threeByThree } from './published-scores.ts';

describe('oneWayAnova', () => {
  // means 2 3 7 about 4: SSb = 3 (4 + 1 + 9) = 42, SSw = 6; with df1 = 2, p = (1 + 2F/df2)^(-df2/2) = 8^-3
  it('by hand: three conditions of three (1e-14)', () => {
    const want = { F: 21, df1: 2, df2: 6, p: 1 / 512, ssBetween: 42, ssWithin: 6, residualSd: 1 };
    expectAll(oneWayAnova(threeByThree), want, 1e-14);
    expectAll(oneWayAnova(threeByThree), { eta2: 42 / 48, omega2: 40 / 49, epsilon2: 40 / 48 }, 1e-14);
    expect([...sumsOfSquares(threeByThree).offsets]).toEqual([1, 2, 6]);
  });

  // R 4.2.2, anova(lm(weight ~ group, PlantGrowth))
  it('agrees with R on PlantGrowth (1e-12)', () => {
    const want = { F: 4.846087862380133, p: 0.015909958325622947, ssWithin: 10.492090000000012, df2: 27 };
    expectAll(oneWayAnova(plantGrowth), want, 1e-12);
  });

  // common practice: with two conditions F = t^2 of Student's test, and the p values are equal
  it('theory: two conditions give the square of t (1e-12)', () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const { t, p } = studentT(a, b);
    expectAll(oneWayAnova([a, b]), { F: t! * t!, p: p! }, 1e-12);
  });

  it('invariance: order of conditions and scores, shift by 1e9 and change of unit (1e-6, digits of the shifted scores)', () => {
    const base = oneWayAnova(plantGrowth);
    const mixed = [...plantGrowth].reverse().map((scores) => scores.slice().reverse());
    expectClose(oneWayAnova(mixed).F, base.F!, 1e-12);
    expectClose(oneWayAnova(plantGrowth.map((scores) => scores.map((score) => 1e9 + score))).F, base.F!, 1e-6);
    expectClose(oneWayAnova(plantGrowth.map((scores) => scores.map((score) => 1e-9 * score))).F, base.F!, 1e-12);
  });

  it('degenerate: no spread, single scores, an empty condition', () => {
    const flat = oneWayAnova([Float64Array.of(0.1, 0.1), Float64Array.of(0.3, 0.3)]);
    expect([flat.F, flat.p, flat.reason]).toEqual([null, null, 'scores do not vary within conditions']);
    expect(oneWayAnova([Float64Array.of(1), Float64Array.of(2)]).reason).toBe('no condition holds two scores');
    expect(oneWayAnova([Float64Array.of(1, 2), new Float64Array(0)]).reason).toBe(
      'condition 2 holds 0 scores, at least 1 needed',
    );
    expectClose(oneWayAnova([Float64Array.of(1, 3), Float64Array.of(5)]).F, 3, 1e-14);
  });

  it('refuses one condition and scores that are not finite', () => {
    expect(() => oneWayAnova(plantGrowth.slice(0, 1))).toThrow('*groups* must hold at least 2 conditions; got 1');
    expect(() => oneWayAnova([Float64Array.of(1, Number.NaN), Float64Array.of(1, 2)])).toThrow(RangeError);
  });
});
