import { describe, expect, it } from 'vitest';
import { linearContrast } from '../../src/numerics/contrast.ts';
import { studentT } from '../../src/numerics/student.ts';
import { welchT } from '../../src/numerics/welch.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { plantGrowth, threeByThree } from './anova/published-scores.ts';

describe('linearContrast', () => {
  // 2 + 3 - 14 = -9; variances 1, n 3: se^2 = 6/3; df = (1/3 + 1/3 + 4/3)^2 / (18/9/2) = 4, pooled 6
  it('by hand: the third condition against the sum of two (1e-14)', () => {
    const want = { estimate: -9, se: Math.SQRT2, t: -9 / Math.SQRT2 };
    expectAll(linearContrast(threeByThree, [1, 1, -2]), { ...want, df: 4 }, 1e-14);
    expectAll(linearContrast(threeByThree, [1, 1, -2], { variance: 'pooled' }), { ...want, df: 6 }, 1e-14);
  });

  // formula written out in R 4.2.2 and in Python (test/reference/cases, plant_growth)
  it('agrees with R and Python on PlantGrowth, 20 % trimmed (1e-11)', () => {
    const got = linearContrast(plantGrowth, [1, -0.5, -0.5], { trim: 20 });
    expectAll(got, { estimate: -0.010833333333333695, se: 0.2289739795988472, df: 8.030669041551384 }, 1e-11);
    expectClose(got.interval![1], 0.5168308202920345, 1e-10);
  });

  it('theory: two conditions are the tests of Welch and Student (1e-12)', () => {
    const [a, b] = plantGrowth as [Float64Array, Float64Array];
    const welch = welchT(a, b);
    expectAll(linearContrast([a, b], [1, -1]), { t: welch.t!, df: welch.df!, p: welch.p! }, 1e-12);
    const student = studentT(a, b);
    expectAll(linearContrast([a, b], [1, -1], { variance: 'pooled' }), { t: student.t!, p: student.p! }, 1e-12);
  });

  it('invariance: doubled weights double estimate and se, a shift moves nothing when weights add up to 0 (1e-11)', () => {
    const base = linearContrast(plantGrowth, [1, -0.5, -0.5]);
    const moved = plantGrowth.map((scores) => scores.map((score) => score + 100));
    expectAll(
      linearContrast(moved, [2, -1, -1]),
      { estimate: 2 * base.estimate!, se: 2 * base.se!, df: base.df! },
      1e-11,
    );
  });

  it('invariance: one-sided p values of both directions add up to 1, limits are open on the other side (1e-14)', () => {
    const greater = linearContrast(plantGrowth, [1, 0, -1], { alternative: 'greater' });
    const less = linearContrast(plantGrowth, [1, 0, -1], { alternative: 'less' });
    expectClose(greater.p! + less.p!, 1, 1e-14);
    expect([greater.interval![1], less.interval![0]]).toEqual([null, null]);
  });

  it('degenerate: no spread where it counts', () => {
    const groups = [Float64Array.of(1, 1), Float64Array.of(2, 2), Float64Array.of(3, 4)];
    expect(linearContrast(groups, [1, -1, 0])).toMatchObject({ estimate: -1, se: null, p: null, interval: null });
    expect(linearContrast(groups, [1, -1, 0]).reason).toBe('scores of the weighted conditions do not vary');
    expectClose(linearContrast(groups, [1, -1, 0], { variance: 'pooled' }).df, 3, 1e-15);
    expect(linearContrast(groups.slice(0, 2), [1, -1], { variance: 'pooled' }).p).toBeNull();
    expect(linearContrast([Float64Array.of(1), Float64Array.of(2, 3)], [1, -1]).estimate).toBeNull();
  });

  it('refuses weights that do not fit and a level out of range', () => {
    expect(() => linearContrast(threeByThree, [1, -1])).toThrow('*weights* must be 3 numbers; got 2');
    expect(() => linearContrast(threeByThree, [0, 0, 0])).toThrow(RangeError);
    expect(() => linearContrast(threeByThree, [1, Number.NaN, 0])).toThrow(RangeError);
    expect(() => linearContrast(threeByThree, [1, -1, 0], { level: 1 })).toThrow(RangeError);
  });
});
