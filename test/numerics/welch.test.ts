import { describe, expect, it } from 'vitest';
import { studentT } from '../../src/numerics/student.ts';
import { welchT } from '../../src/numerics/welch.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('Welch t', () => {
  it('by hand: 1, 3 against 2, 6: se^2 = 1 + 4, df = 25 / 17', () => {
    const test = welchT(scores(1, 3), scores(2, 6));
    expect(close(test.se, Math.sqrt(5), 1e-14) && close(test.df, 25 / 17, 1e-13)).toBe(true);
    expect(test.means).toEqual([2, 4]);
  });
  it('agrees with SciPy 1.10 ttest_ind(equal_var=False) and the interval of R 4.2 t.test (rtol 1e-11)', () => {
    const test = welchT(sunflower, soybean);
    expect(close(test.t, 4.083609386800708, 1e-12) && close(test.p, 0.0004287582713891662, 1e-11)).toBe(true);
    expect(
      close(test.interval?.[0], 40.79040460279417, 1e-11) && close(test.interval?.[1], 124.18578587339634, 1e-11),
    ).toBe(true);
  });
  it('theory: with equal sizes and spreads it is Student (rtol 1e-12)', () => {
    const y = sunflower.map((x) => x + 40);
    expect(close(welchT(sunflower, y).p, studentT(sunflower, y).p as number, 1e-12)).toBe(true);
  });
  it('invariance: unit down to 1e-120', () => {
    const tiny = (x: Float64Array) => x.map((score) => score * 1e-120);
    expect(close(welchT(tiny(sunflower), tiny(soybean)).df, welchT(sunflower, soybean).df as number, 1e-12)).toBe(true);
  });
  it('degenerate: one group without spread is fine, two are not', () => {
    expect(welchT(scores(2, 2, 2), scores(1, 2, 6)).df).toBe(2);
    expect(welchT(scores(2, 2), scores(3, 3)).reason).toBe('all scores within each condition are equal');
    expect(welchT(scores(2), scores(3, 4)).reason).toBe('a condition has only one score');
  });
  it('refuses NaN', () => {
    expect(() => welchT(scores(1, Number.NaN), soybean)).toThrow(RangeError);
  });
});
