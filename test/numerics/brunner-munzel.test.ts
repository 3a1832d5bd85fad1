import { describe, expect, it } from 'vitest';
import { brunnerMunzel } from '../../src/numerics/brunner-munzel.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('Brunner-Munzel', () => {
  it('by hand: 1, 4 against 2, 3: pHat .5, placements 0, 2 and 1, 1', () => {
    // Placement variances 2 and 0: se = sqrt(2 * 2) / 4, df from the first group alone.
    const test = brunnerMunzel(scores(1, 4), scores(2, 3));
    expect([test.pHat, test.statistic, test.df, test.p]).toEqual([0.5, 0, 1, 1]);
    expect(close(test.se, 0.5, 1e-14)).toBe(true);
  });
  it('agrees with SciPy 1.10 brunnermunzel (rtol 1e-11)', () => {
    const test = brunnerMunzel(sunflower, soybean);
    expect(close(test.statistic, -4.9742404504664375, 1e-12) && close(test.p, 5.9991780657221337e-5, 1e-11)).toBe(true);
    expect(close(brunnerMunzel(sunflower, soybean, { alternative: 'greater' }).p, 2.9995890328610668e-5, 1e-11)).toBe(
      true,
    );
    expect(close(brunnerMunzel(sunflower, soybean, { distribution: 'normal' }).p, 6.550396256849597e-7, 1e-11)).toBe(
      true,
    );
  });
  it('agrees with the published formulas written out: pHat .130952, df 21.4631 (methods 3.4; rtol 1e-5)', () => {
    const test = brunnerMunzel(sunflower, soybean);
    expect(close(test.pHat, 0.130952, 1e-5) && close(test.df, 21.4631, 1e-5)).toBe(true);
  });
  it('theory: p is below 1 - level exactly when .5 lies outside the interval', () => {
    const test = brunnerMunzel(sunflower, soybean);
    for (const level of [0.9, 0.9999, 0.99995]) {
      const high = brunnerMunzel(sunflower, soybean, { level }).interval?.[1] as number;
      expect(high < 0.5).toBe((test.p as number) < 1 - level);
    }
    expect(brunnerMunzel(sunflower, soybean, { alternative: 'greater' }).interval?.[0]).toBe(null);
  });
  it('invariance: increasing transformations; exchange of the groups', () => {
    const test = brunnerMunzel(sunflower, soybean);
    expect(brunnerMunzel(sunflower.map(Math.log), soybean.map(Math.log)).p).toBe(test.p);
    const turned = brunnerMunzel(soybean, sunflower);
    expect(close(turned.pHat, 1 - test.pHat, 1e-14) && close(turned.p, test.p as number, 1e-12)).toBe(true);
  });
  it('degenerate: complete separation, all equal, a group of one', () => {
    expect(brunnerMunzel(scores(1, 2), scores(3, 4))).toMatchObject({
      pHat: 1,
      p: null,
      reason: 'the scores of the two conditions do not overlap',
    });
    expect(brunnerMunzel(scores(1, 1), scores(1, 1)).reason).toBe('all scores are equal');
    expect(brunnerMunzel(scores(1), scores(1, 2)).reason).toBe('a condition has only one score');
  });
  it('refuses an empty group', () => {
    expect(() => brunnerMunzel(scores(), soybean)).toThrow(RangeError);
  });
});
