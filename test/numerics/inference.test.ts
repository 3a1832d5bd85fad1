import { describe, expect, it } from 'vitest';
import {
  largestSize,
  limits,
  normalInterval,
  normalP,
  noSpread,
  noTTest,
  outside,
  requireLevel,
  tInterval,
  tP,
  tTest,
} from '../../src/numerics/inference.ts';
import { close, scores } from './samples.ts';

describe('inference', () => {
  it('by hand: with one degree of freedom t is Cauchy: P(|T| >= 1) = 1/2, upper quartile 1 (rtol 1e-12)', () => {
    expect(close(tP(1, 1, 'two-sided'), 0.5, 1e-12)).toBe(true);
    expect(close(tP(1, 1, 'greater'), 0.25, 1e-12)).toBe(true);
    expect(close(tP(1, 1, 'less'), 0.75, 1e-12)).toBe(true);
    const [low, high] = tInterval(10, 2, 1, { level: 0.5 });
    expect([close(low, 8, 1e-12), close(high, 12, 1e-12)]).toEqual([true, true]);
  });
  it('by hand: directions keep one limit', () => {
    expect(limits(1, 2, 'two-sided')).toEqual([1, 2]);
    expect(limits(1, 2, 'greater')).toEqual([1, null]);
    expect(limits(1, 2, 'less')).toEqual([null, 2]);
    expect([outside(0.95, 'less'), largestSize(scores(1, -7), scores(3))]).toEqual([1 - 0.95, 7]);
  });
  it('agrees with common practice: P(|Z| >= 1.959963984540054) = .05 (rtol 1e-12)', () => {
    expect(close(normalP(1.959963984540054, 'two-sided'), 0.05, 1e-12)).toBe(true);
    const [low, high] = normalInterval(0, 1);
    expect([close(low, -1.959963984540054, 1e-12), close(high, 1.959963984540054, 1e-12)]).toEqual([true, true]);
  });
  it('theory: p is below 1 - level exactly when the null lies outside the interval', () => {
    for (const alternative of ['two-sided', 'greater', 'less'] as const) {
      for (let nullValue = -4; nullValue <= 4; nullValue += 0.25) {
        const { p, interval } = tTest(0.3, nullValue, 1.1, 7, { alternative, level: 0.9 });
        const [low, high] = interval;
        expect((low !== null && nullValue < low) || (high !== null && nullValue > high)).toBe(p < 0.1 - 1e-12);
      }
    }
  });
  it('invariance: unit of the estimate', () => {
    const a = tTest(3, 1, 2, 5);
    const b = tTest(300, 100, 200, 5);
    expect([b.t, b.p]).toEqual([a.t, a.p]);
  });
  it('degenerate: rounding of decimal differences is no spread', () => {
    const noise = Math.abs(0.3 - 0.2 - (0.2 - 0.1));
    expect([noSpread(noise, 0.3), noSpread(0, 0), noSpread(0.001, 1000)]).toEqual([true, true, false]);
    expect(noTTest('no spread', 2)).toEqual({
      estimate: 2,
      se: null,
      df: null,
      t: null,
      p: null,
      interval: null,
      reason: 'no spread',
    });
  });
  it('refuses levels of 0, 1 and NaN', () => {
    for (const level of [0, 1, Number.NaN])
      expect(() => requireLevel(level)).toThrow('*level* must be between 0 and 1');
  });
});
