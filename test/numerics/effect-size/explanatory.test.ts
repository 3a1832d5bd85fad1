import { describe, expect, it } from 'vitest';
import { winsorizedNormalSd } from '../../../src/numerics/effect-size/akp-robust-d.ts';
import { explanatoryEffect } from '../../../src/numerics/effect-size/explanatory.ts';
import { close, scores } from '../samples.ts';

describe('explanatory effect size', () => {
  it('by hand: 1, 3 and 5, 7 at 0 %: variance of means 8 over total variance 20/3', () => {
    const own = explanatoryEffect([scores(1, 3), scores(5, 7)], { trim: 0 });
    expect(close(own.xiSquared, 1.2, 1e-13) && close(own.xi, Math.sqrt(1.2), 1e-13)).toBe(true);
  });
  it('by hand: the total is rescaled by the winsorized normal variance', () => {
    const own = explanatoryEffect([scores(1, 2, 3, 4, 5), scores(6, 7, 8, 9, 10)]);
    // Ten scores winsorized to 3 3 3 4 5 6 7 8 8 8: sum of squares 42.5
    expect(close(own.totalVariance, 42.5 / 9 / winsorizedNormalSd(20) ** 2, 1e-12)).toBe(true);
    expect(close(own.xiSquared, 12.5 / (own.totalVariance as number), 1e-12)).toBe(true);
  });
  it('agrees with the published constant .412087 = c^2 at 20 % (methods 3.4; rtol 1e-5)', () => {
    expect(close(winsorizedNormalSd(20) ** 2, 0.412087, 1e-5)).toBe(true);
  });
  it('theory: equal groups explain nothing', () => {
    expect(explanatoryEffect([scores(1, 2, 3), scores(3, 1, 2)]).xi).toBe(0);
  });
  it('invariance: unit, offset, order of groups', () => {
    const [x, y] = [scores(1, 2, 4, 4, 5), scores(3, 7, 8, 9, 12)];
    const own = explanatoryEffect([x, y]).xi as number;
    expect(close(explanatoryEffect([y.map((v) => 4 * v + 64), x.map((v) => 4 * v + 64)]).xi, own, 1e-12)).toBe(true);
  });
  it('degenerate: unequal sizes, no spread', () => {
    expect(explanatoryEffect([scores(1), scores(1, 2)]).reason).toBe('the conditions differ in size');
    expect(explanatoryEffect([scores(1, 1), scores(1, 1)]).reason).toBe('all winsorized scores are equal');
  });
  it('refuses one group', () => {
    expect(() => explanatoryEffect([scores(1, 2)])).toThrow('*groups* must be at least two');
  });
});
