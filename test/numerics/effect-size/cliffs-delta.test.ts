import { describe, expect, it } from 'vitest';
import { cliffsDelta } from '../../../src/numerics/effect-size/cliffs-delta.ts';
import { mannWhitney } from '../../../src/numerics/mann-whitney.ts';
import { close, scores, soybean, sunflower } from '../samples.ts';

describe("Cliff's delta", () => {
  it('by hand: 1, 4 against 2, 3: signs - - + +: delta 0', () => {
    const own = cliffsDelta(scores(1, 4), scores(2, 3));
    // Row means -1, 1 (variance 2), column means 0, 0; variance of the four signs 4/3
    expect([own.value, own.superiority]).toEqual([0, 0.5]);
    expect(close(own.variance, (1 * 2 + 0 + 4 / 3) / 4, 1e-14)).toBe(true);
  });
  it('agrees with the sign matrix written out in NumPy (rtol 1e-12)', () => {
    const own = cliffsDelta(sunflower, soybean);
    expect(close(own.value, 0.7380952380952381, 1e-13) && close(own.variance, 0.023073737458742954, 1e-12)).toBe(true);
  });
  it('by hand: the unbiased variance of 1, 4 against 2, 3 by Cliff (1996)', () => {
    // (n2^2 sum di.^2 + n1^2 sum d.j^2 - sum dij^2) / (n1 n2 (n1-1)(n2-1)) = (4 * 2 + 0 - 4) / 4
    expect(close(cliffsDelta(scores(1, 4), scores(2, 3), { variance: 'unbiased' }).variance, 1, 1e-14)).toBe(true);
  });
  it('theory: delta is 2U / (n1 n2) - 1, and its limits stay within -1 and 1', () => {
    const own = cliffsDelta(sunflower, soybean, { level: 0.9999 });
    expect(close(own.value, mannWhitney(sunflower, soybean).rankBiserial, 1e-13)).toBe(true);
    const [low, high] = own.interval as [number, number];
    expect(low > -1 && low < own.value && own.value < high && high < 1).toBe(true);
    expect(cliffsDelta(sunflower, soybean, { alternative: 'greater' }).interval?.[1]).toBe(null);
  });
  it('invariance: increasing transformations; exchange turns the sign', () => {
    const own = cliffsDelta(sunflower, soybean);
    expect(cliffsDelta(sunflower.map(Math.log), soybean.map(Math.log))).toEqual(own);
    const turned = cliffsDelta(soybean, sunflower);
    expect(
      close(turned.value, -own.value, 1e-13) && close(turned.interval?.[0], -(own.interval?.[1] as number), 1e-12),
    ).toBe(true);
  });
  it('degenerate: no overlap, a group of one, all equal', () => {
    expect(cliffsDelta(scores(3, 4), scores(1, 2))).toMatchObject({
      value: 1,
      interval: null,
      reason: 'the scores of the two conditions do not overlap',
    });
    expect(cliffsDelta(scores(3), scores(1, 2)).reason).toBe('a condition has only one score');
    expect(cliffsDelta(scores(1, 1), scores(1, 1))).toMatchObject({ value: 0, variance: 0, interval: [0, 0] });
  });
  it('refuses an empty group', () => {
    expect(() => cliffsDelta(scores(), soybean)).toThrow(RangeError);
  });
});
