import { describe, expect, it } from 'vitest';
import {
  covariance,
  mean,
  meanWithError,
  standardDeviation,
  sum,
  sumOfSquares,
  variance,
} from '../../src/numerics/moments.ts';
import { close, darwin, drugOne, drugTwo, scores } from './samples.ts';

describe('moments', () => {
  it('by hand: the sum keeps what ordinary addition loses', () => {
    expect(sum([1, 1e100, 1, -1e100])).toBe(2);
    expect(sum([])).toBe(0);
  });
  it('by hand: mean, variance and covariance of small samples', () => {
    expect([mean(scores(1, 2, 6)), variance(scores(1, 2, 6)), covariance(scores(1, 2, 3), scores(2, 4, 9))]).toEqual([
      3, 7, 3.5,
    ]);
  });
  it('agrees with NIST StRD univariate sets by construction: NumAcc2, NumAcc3, NumAcc4 (rtol 1e-15 mean, 1e-8 SD)', () => {
    // Certified: mean 1.2, 1000000.2, 10000000.2 and SD .1 for 1,001 scores alternating -+ .1 about the mean.
    for (const [center, rtol] of [
      [1.2, 1e-14],
      [1000000.2, 1e-9],
      [10000000.2, 1e-8],
    ] as const) {
      const x = Float64Array.from({ length: 1001 }, (_, i) =>
        i === 0 ? center : i % 2 === 1 ? center - 0.1 : center + 0.1,
      );
      expect(close(mean(x), center, 1e-15)).toBe(true);
      expect(close(standardDeviation(x), 0.1, rtol)).toBe(true);
    }
  });
  it('agrees with NumPy 1.24: variance of Darwin, covariance of sleep (rtol 1e-12)', () => {
    expect(close(variance(darwin), 1424.6380952380953, 1e-12)).toBe(true);
    expect(close(covariance(drugOne, drugTwo), 2.848333333333333, 1e-12)).toBe(true);
  });
  it('theory: the variance is the covariance with itself; se = SD / sqrt n', () => {
    expect(close(covariance(darwin, darwin), variance(darwin), 1e-14)).toBe(true);
    const own = meanWithError(darwin);
    expect(own.se).toBe(standardDeviation(darwin) / Math.sqrt(15));
  });
  it('invariance: a far offset changes no digit that the scores themselves keep', () => {
    const x = Float64Array.from({ length: 100 }, (_, i) => (i * 37) % 64);
    const far = x.map((score) => score + 2 ** 40);
    expect(sumOfSquares(far)).toBe(sumOfSquares(x));
    expect(mean(far)).toBe(2 ** 40 + 31.18);
  });
  it('invariance: units up to 1e150 and down to 1e-150', () => {
    for (const unit of [1e140, 1e-140])
      expect(close(standardDeviation(darwin.map((x) => x * unit)) / unit, standardDeviation(darwin), 1e-12)).toBe(true);
  });
  it('degenerate: identical scores have exactly no variance; one score has no SE', () => {
    expect([variance(scores(0.1, 0.1, 0.1)), variance(Float64Array.from({ length: 999 }, () => 1 / 3))]).toEqual([
      0, 0,
    ]);
    expect(meanWithError(scores(7))).toEqual({ estimate: 7, n: 1, se: null });
  });
  it('refuses no scores, one score for a variance, NaN, unequal lengths', () => {
    expect(() => mean(scores())).toThrow(RangeError);
    expect(() => variance(scores(1))).toThrow('at least 2 scores; got 1');
    expect(() => mean(scores(1, Number.NaN))).toThrow(RangeError);
    expect(() => covariance(scores(1, 2), scores(1, 2, 3))).toThrow('*y* must be as long');
  });
});
