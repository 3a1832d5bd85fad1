import { describe, expect, it } from 'vitest';
import { varianceRatio } from '../../src/numerics/variance-ratio.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('variance ratio', () => {
  it('by hand: variances 2 and 8 on one degree each: P(F < 1/4) = 2/pi atan(1/2)', () => {
    const own = varianceRatio(scores(0, 2), scores(0, 4));
    expect([own.ratio, own.df1, own.df2]).toEqual([0.25, 1, 1]);
    expect(close(own.p, (4 / Math.PI) * Math.atan(0.5), 1e-12)).toBe(true);
  });
  it('agrees with R 4.2 var.test (rtol 1e-11)', () => {
    const own = varianceRatio(sunflower, soybean);
    expect(close(own.ratio, 0.8140028001997578, 1e-13) && close(own.p, 0.74116158246382591, 1e-11)).toBe(true);
    expect(
      close(own.interval?.[0], 0.2545750652767027, 1e-11) && close(own.interval?.[1], 2.760876115581413, 1e-11),
    ).toBe(true);
  });
  it('theory: p is below 1 - level exactly when 1 lies outside the interval', () => {
    const p = varianceRatio(sunflower, soybean).p as number;
    for (const step of [-0.001, 0.001]) {
      const high = varianceRatio(sunflower, soybean, { level: 1 - p + step }).interval?.[1] as number;
      expect(high < 1).toBe(step < 0);
    }
    expect(varianceRatio(sunflower, soybean, { alternative: 'greater' }).interval?.[1]).toBe(null);
  });
  it('invariance: exchange of the groups inverts, offsets do nothing', () => {
    const own = varianceRatio(sunflower, soybean);
    const turned = varianceRatio(
      soybean,
      sunflower.map((x) => x + 1024),
    );
    expect(
      close(turned.interval?.[0], 1 / (own.interval?.[1] as number), 1e-11) && close(turned.p, own.p as number, 1e-11),
    ).toBe(true);
  });
  it('degenerate: no spread', () => {
    expect(varianceRatio(scores(1, 1), scores(1, 2))).toMatchObject({
      ratio: null,
      p: null,
      reason: 'all scores of a condition are equal',
    });
  });
  it('refuses a group of one', () => {
    expect(() => varianceRatio(scores(1), soybean)).toThrow(RangeError);
  });
});
