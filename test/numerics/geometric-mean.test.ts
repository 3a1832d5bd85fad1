import { describe, expect, it } from 'vitest';
import { geometricMean } from '../../src/numerics/geometric-mean.ts';
import { close, scores, sunflower } from './samples.ts';

describe('geometric mean', () => {
  it('by hand: 2 and 8', () => {
    const own = geometricMean(scores(2, 8));
    expect(close(own.estimate, 4, 1e-13) && close(own.harmonicMean, 3.2, 1e-13)).toBe(true);
    expect(close(own.geometricSd, 4 ** (1 / Math.SQRT2), 1e-13)).toBe(true);
  });
  it('agrees with SciPy 1.10 gmean, gstd, hmean (rtol 1e-12)', () => {
    const own = geometricMean(sunflower);
    expect(close(own.estimate, 325.4571478392081, 1e-12) && close(own.geometricSd, 1.166778846081698, 1e-12)).toBe(
      true,
    );
    expect(close(own.harmonicMean, 321.80609886508, 1e-12)).toBe(true);
  });
  it('theory: harmonic below geometric below arithmetic; the interval is symmetric as a ratio', () => {
    const own = geometricMean(sunflower);
    const [low, high] = own.interval as [number, number];
    expect((own.harmonicMean as number) < (own.estimate as number)).toBe(true);
    expect(close(high / (own.estimate as number), (own.estimate as number) / low, 1e-12)).toBe(true);
    expect(geometricMean(sunflower, { alternative: 'less' }).interval?.[0]).toBe(null);
  });
  it('invariance: unit', () => {
    expect(
      close(
        geometricMean(sunflower.map((x) => x * 1000)).interval?.[0],
        1000 * (geometricMean(sunflower).interval?.[0] as number),
        1e-12,
      ),
    ).toBe(true);
  });
  it('degenerate: a score of 0, one score, equal scores', () => {
    expect(geometricMean(scores(0, 1))).toMatchObject({ estimate: null, reason: 'a score is not above 0' });
    expect(geometricMean(scores(5))).toMatchObject({ interval: null, geometricSd: null, reason: 'only one score' });
    expect(close(geometricMean(scores(3, 3)).interval?.[0], 3, 1e-14)).toBe(true);
  });
  it('refuses no scores', () => {
    expect(() => geometricMean(scores())).toThrow(RangeError);
  });
});
