import { describe, expect, it } from 'vitest';
import { studentT } from '../../src/numerics/student.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('Student t', () => {
  it('by hand: 1, 3 against 2, 6: pooled variance 5, se sqrt 5', () => {
    const test = studentT(scores(1, 3), scores(2, 6));
    expect([test.estimate, test.df, test.means]).toEqual([-2, 2, [2, 4]]);
    expect(close(test.se, Math.sqrt(5), 1e-14)).toBe(true);
  });
  it('agrees with SciPy 1.10 ttest_ind (rtol 1e-11)', () => {
    const test = studentT(sunflower, soybean);
    expect(close(test.t, 4.050206589547113, 1e-12) && close(test.p, 0.000464091158374022, 1e-11)).toBe(true);
  });
  it('theory: a one-sided p is half the two-sided in its direction', () => {
    const p = studentT(sunflower, soybean).p as number;
    expect(close(studentT(sunflower, soybean, { alternative: 'greater' }).p, p / 2, 1e-12)).toBe(true);
  });
  it('invariance: exchange of the groups, offset', () => {
    const test = studentT(sunflower, soybean);
    expect(close(studentT(soybean, sunflower).t, -(test.t as number), 1e-13)).toBe(true);
    expect(
      close(
        studentT(
          sunflower.map((x) => x + 1024),
          soybean.map((x) => x + 1024),
        ).t,
        test.t as number,
        1e-12,
      ),
    ).toBe(true);
  });
  it('degenerate: no spread, a group of one', () => {
    expect(studentT(scores(1, 1), scores(2, 2))).toMatchObject({
      estimate: -1,
      p: null,
      reason: 'all scores within each condition are equal',
    });
    expect(studentT(scores(1), scores(2, 3)).reason).toBe('a condition has only one score');
  });
  it('refuses an empty group and a level of 95', () => {
    expect(() => studentT(scores(), soybean)).toThrow(RangeError);
    expect(() => studentT(sunflower, soybean, { level: 95 })).toThrow('*level* must be');
  });
});
