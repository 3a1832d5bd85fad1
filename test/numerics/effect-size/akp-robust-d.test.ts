import { describe, expect, it } from 'vitest';
import { akpRobustD, akpRobustDPaired, winsorizedNormalSd } from '../../../src/numerics/effect-size/akp-robust-d.ts';
import { cohensD } from '../../../src/numerics/effect-size/cohens-d.ts';
import { close, darwin, scores, soybean, sunflower } from '../samples.ts';

describe('robust standardized difference', () => {
  it('by hand: 1..5 against 2, 4, 6, 8, 10 at 20 %: winsorized variances 1 and 4', () => {
    const own = akpRobustD(scores(1, 2, 3, 4, 5), scores(2, 4, 6, 8, 10));
    const c = winsorizedNormalSd(20);
    expect(close(own.value, (-3 * c) / Math.sqrt(2.5), 1e-13)).toBe(true);
    expect([close(own.byFirst, -3 * c, 1e-13), close(own.bySecond, (-3 * c) / 2, 1e-13)]).toEqual([true, true]);
    expect(close(akpRobustDPaired(scores(1, 2, 3, 4, 5)).value, 3 * c, 1e-13)).toBe(true);
  });
  it('agrees with the published constants and value: .641940, .823805, 1.44371 (methods 3.4; rtol 1e-5)', () => {
    expect(close(winsorizedNormalSd(20), 0.64194, 1e-6) && close(winsorizedNormalSd(10), 0.823805, 1e-6)).toBe(true);
    expect(close(akpRobustD(sunflower, soybean).value, 1.44371, 1e-5)).toBe(true);
  });
  it("theory: at 0 % it is Cohen's d", () => {
    expect(winsorizedNormalSd(0)).toBe(1);
    expect(
      close(akpRobustD(sunflower, soybean, { trim: 0 }).value, cohensD(sunflower, soybean).value as number, 1e-12),
    ).toBe(true);
  });
  it('invariance: unit, offset, and far scores beyond the trim', () => {
    const own = akpRobustD(sunflower, soybean).value as number;
    expect(
      close(
        akpRobustD(
          sunflower.map((x) => 4 * x + 64),
          soybean.map((x) => 4 * x + 64),
        ).value,
        own,
        1e-12,
      ),
    ).toBe(true);
    expect(
      akpRobustD(
        sunflower.map((x) => (x === 423 ? 1e9 : x)),
        soybean,
      ).value,
    ).toBe(own);
  });
  it('degenerate: no spread left', () => {
    const flat = scores(1, 5, 5, 5, 9);
    expect(akpRobustD(flat, flat)).toMatchObject({
      value: null,
      reason: 'all scores within each condition are equal after winsorizing',
    });
    expect(akpRobustD(flat, darwin).byFirst).toBe(null);
    expect(akpRobustDPaired(flat).reason).toBe('all winsorized differences are equal');
    expect(akpRobustDPaired(scores(1)).reason).toBe('only one difference');
    expect(akpRobustD(scores(1), flat).reason).toBe('a condition has only one score');
  });
  it('refuses odd trims', () => {
    expect(() => winsorizedNormalSd(50)).toThrow('*trim* must be');
    expect(() => akpRobustD(sunflower, soybean, { trim: -5 })).toThrow('*trim* must be');
  });
});
