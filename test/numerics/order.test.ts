import { describe, expect, it } from 'vitest';
import {
  interquartileRange,
  mad,
  madSorted,
  median,
  medianAbsoluteDeviation,
  quantile,
  quantileSorted,
  quantiles,
  ranks,
  sorted,
  tukeyHinges,
} from '../../src/numerics/order.ts';
import { darwin, drugOne, scores, sunflower, uneven } from './samples.ts';

describe('order', () => {
  it('by hand: medians of odd and even samples', () => {
    expect([median(scores(3, 1, 2)), median(scores(4, 1, 2, 3)), median(scores(7))]).toEqual([2, 2.5, 7]);
  });
  it('by hand: midranks and the sum of t^3 - t', () => {
    const own = ranks(scores(5, 1, 5, 9, 5, 1));
    expect([...own.ranks]).toEqual([4, 1.5, 4, 6, 4, 1.5]);
    expect(own.tieSum).toBe(24 + 6);
  });
  it('by hand: hinges count the middle score of an odd sample in both halves', () => {
    expect(tukeyHinges(scores(5, 4, 3, 2, 1))).toEqual([2, 4]);
    expect(tukeyHinges(scores(4, 3, 2, 1))).toEqual([1.5, 3.5]);
  });
  it('agrees with NumPy 1.24 quantiles of types 6, 7 and 8 (rtol 1e-12)', () => {
    // numpy.quantile(method = weibull, linear, median_unbiased) of Darwin's differences
    const probs = [0.1, 0.25, 0.75];
    const want = { 6: [-55.6, 8, 49], 7: [-26.4, 11, 45], 8: [-50.53333333333333, 9, 47.66666666666667] };
    for (const type of [6, 7, 8] as const) {
      quantiles(darwin, probs, type).forEach((got, i) => {
        expect(Math.abs(got - (want[type][i] as number))).toBeLessThan(1e-12 * 60);
      });
    }
  });
  it('agrees with SciPy 1.10 median_abs_deviation and rankdata (exactly)', () => {
    expect([medianAbsoluteDeviation(darwin), medianAbsoluteDeviation(sunflower)]).toEqual([17, 12.5]);
    expect([...ranks(drugOne).ranks]).toEqual([6, 1, 3, 2, 4, 9, 10, 7, 5, 8]);
  });
  it('agrees with sorting the deviations: the MAD merged outwards (exactly)', () => {
    for (const n of [1, 2, 3, 4, 5, 8, 13, 50, 51]) {
      const s = sorted(uneven(n));
      for (const center of [median(s), s[0] as number, (s[n - 1] as number) + 1]) {
        expect(madSorted(s, center)).toBe(median(s.map((score) => Math.abs(score - center))));
      }
    }
  });
  it('theory: every type gives the extremes at 0 and 1, and order statistics where it should', () => {
    for (const type of [6, 7, 8] as const) expect(quantiles(scores(3, 1, 2), [0, 1], type)).toEqual([1, 3]);
    // Type 7: position (n-1) p + 1 is whole at p = .3 for n = 11, though 10 * .3 is not 3 in floating point.
    expect(
      quantileSorted(
        Float64Array.from({ length: 11 }, (_, i) => i ** 3),
        0.3,
        7,
      ),
    ).toBe(27);
  });
  it('invariance: ranks under increasing transformations, MAD under shift, quantiles under change of unit', () => {
    expect(ranks(darwin.map((x) => x ** 3)).ranks).toEqual(ranks(darwin).ranks);
    expect(mad(darwin.map((x) => x + 1000))).toBe(mad(darwin));
    expect(
      quantile(
        darwin.map((x) => 2 * x),
        0.25,
      ),
    ).toBe(2 * quantile(darwin, 0.25));
    expect(interquartileRange(darwin.map((x) => -x))).toBe(interquartileRange(darwin));
  });
  it('degenerate: identical scores have no spread and tie throughout', () => {
    const x = scores(4, 4, 4);
    expect([mad(x), interquartileRange(x), ranks(x).tieSum]).toEqual([0, 0, 24]);
    expect(ranks(scores()).ranks).toHaveLength(0);
  });
  it('leaves the scores as they were', () => {
    const x = scores(3, 1, 2);
    median(x);
    ranks(x);
    tukeyHinges(x);
    expect([...x]).toEqual([3, 1, 2]);
  });
  it('refuses no scores, NaN, probabilities outside 0 to 1', () => {
    expect(() => median(scores())).toThrow(RangeError);
    expect(() => ranks(scores(Number.NaN))).toThrow(RangeError);
    expect(() => quantile(scores(1), 1.1)).toThrow('*p* must be between 0 and 1');
    expect(() => quantile(scores(1), Number.NaN)).toThrow(RangeError);
  });
});
