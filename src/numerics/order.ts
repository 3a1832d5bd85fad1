/** Sorting and what is read off sorted scores: medians, ranks, quantiles, hinges, the MAD. */
import { requireScores } from './scores.ts';

/** Quantile definitions of Hyndman & Fan (1996) that are offered. */
export type QuantileType = 6 | 7 | 8;

/** The usual rounded factor that makes the MAD estimate the SD of normal scores (exact: 1.482602218505602). */
export const MAD_CONSTANT = 1.4826;

/**
 * Sorted copy.
 * @param x scores, any length, no NaN
 * @returns the scores in ascending order
 * @source common practice
 * @checked by hand
 */
export function sorted(x: Float64Array): Float64Array {
  return Float64Array.from(x).sort();
}

/**
 * Median of scores that are already sorted.
 * @param s ascending scores, at least one
 * @returns the middle score, or the mean of the two middle ones
 * @throws RangeError when empty
 * @source common practice
 * @checked cases `median`, rtol 1e-9
 */
export function medianSorted(s: Float64Array): number {
  const n = s.length;
  if (n === 0) throw new RangeError('*s* must hold at least 1 score; got 0');
  const low = s[(n - 1) >> 1] as number;
  const high = s[n >> 1] as number;
  return low === high ? low : low + (high - low) / 2;
}

/**
 * Median.
 * @param x scores, at least one, finite
 * @returns the median, in the scores' unit
 * @throws RangeError when empty or not finite
 * @source common practice: mean of the two middle scores for even n
 * @checked cases `median`, rtol 1e-9
 */
export function median(x: Float64Array): number {
  requireScores(x);
  return medianSorted(sorted(x));
}

/** Ranks of scores, ties at their mean rank. */
export interface Ranks {
  /** Rank of each score, 1 to n, in the order given. */
  readonly ranks: Float64Array;
  /** Sum over groups of tied scores of t^3 - t; 0 without ties. */
  readonly tieSum: number;
}

/**
 * Midranks.
 * @param x scores, any length, finite
 * @returns `ranks` (1 to n) and `tieSum`
 * @throws RangeError when a score is not finite
 * @source Kruskal & Wallis (1952): tied scores share the mean of their ranks; sum of t^3 - t
 * @checked by hand, invariance under increasing transformations
 */
export function ranks(x: Float64Array): Ranks {
  requireScores(x, 0);
  const n = x.length;
  const order = Uint32Array.from({ length: n }, (_, i) => i).sort((a, b) => (x[a] as number) - (x[b] as number));
  const out = new Float64Array(n);
  let tieSum = 0;
  for (let start = 0; start < n; ) {
    const value = x[order[start] as number];
    let end = start + 1;
    while (end < n && x[order[end] as number] === value) end++;
    const t = end - start;
    for (let i = start; i < end; i++) out[order[i] as number] = (start + 1 + end) / 2;
    tieSum += t * t * t - t;
    start = end;
  }
  return { ranks: out, tieSum };
}

function quantilePosition(n: number, p: number, type: QuantileType): number {
  if (type === 7) return (n - 1) * p + 1;
  if (type === 6) return (n + 1) * p;
  return (n + 1 / 3) * p + 1 / 3;
}

/**
 * Quantile of scores that are already sorted.
 * @param s ascending scores, at least one
 * @param p probability, 0 to 1
 * @param type Hyndman & Fan type: 6 ((n+1)p), 7 ((n-1)p + 1) or 8 ((n+1/3)p + 1/3)
 * @returns the quantile by linear interpolation between order statistics
 * @throws RangeError when empty or `p` is outside 0 to 1
 * @source Hyndman & Fan (1996), types 6, 7, 8
 * @checked cases `quantile`, rtol 1e-9
 */
export function quantileSorted(s: Float64Array, p: number, type: QuantileType): number {
  const n = s.length;
  if (n === 0) throw new RangeError('*s* must hold at least 1 score; got 0');
  if (!(p >= 0 && p <= 1)) throw new RangeError(`*p* must be between 0 and 1; got ${p}`);
  const position = quantilePosition(n, p, type);
  // A position such as 2.9999999999999996 is meant to be 3: decimal probabilities are not exact.
  const whole = Math.floor(position + 4 * Number.EPSILON * n);
  const part = Math.max(0, position - whole) < 4 * Number.EPSILON * n ? 0 : position - whole;
  const low = s[Math.min(Math.max(whole, 1), n) - 1] as number;
  const high = s[Math.min(Math.max(whole + 1, 1), n) - 1] as number;
  return part === 0 || low === high ? low : low + part * (high - low);
}

/**
 * Quantile at one probability.
 * @param x scores, at least one, finite
 * @param p probability, 0 to 1
 * @param type Hyndman & Fan type (default 7)
 * @returns the quantile, in the scores' unit
 * @throws RangeError when empty, not finite, or `p` is outside 0 to 1
 * @source Hyndman & Fan (1996)
 * @checked cases `quantile`, rtol 1e-9
 */
export function quantile(x: Float64Array, p: number, type: QuantileType = 7): number {
  requireScores(x);
  return quantileSorted(sorted(x), p, type);
}

/**
 * Quantiles at several probabilities.
 * @param x scores, at least one, finite
 * @param probs probabilities, 0 to 1
 * @param type Hyndman & Fan type (default 7)
 * @returns one quantile per probability, in the order given
 * @throws RangeError when empty, not finite, or a probability is outside 0 to 1
 * @source Hyndman & Fan (1996)
 * @checked cases `quantile`, rtol 1e-9
 */
export function quantiles(x: Float64Array, probs: readonly number[], type: QuantileType = 7): number[] {
  requireScores(x);
  const s = sorted(x);
  return probs.map((p) => quantileSorted(s, p, type));
}

/**
 * Hinges of scores that are already sorted.
 * @param s ascending scores, at least one
 * @returns [lower, upper]: medians of the two halves, the middle score counted in both for odd n
 * @throws RangeError when empty
 * @source Tukey (1977), five-number summary
 * @checked cases `tukey_hinges`, rtol 1e-9
 */
export function tukeyHingesSorted(s: Float64Array): [number, number] {
  const half = (s.length + 1) >> 1;
  return [medianSorted(s.subarray(0, half)), medianSorted(s.subarray(s.length - half))];
}

/**
 * Tukey's hinges.
 * @param x scores, at least one, finite
 * @returns [lower, upper] hinge, in the scores' unit
 * @throws RangeError when empty or not finite
 * @source Tukey (1977), five-number summary
 * @checked cases `tukey_hinges`, rtol 1e-9
 */
export function tukeyHinges(x: Float64Array): [number, number] {
  requireScores(x);
  return tukeyHingesSorted(sorted(x));
}

/**
 * Interquartile range of a stated quartile type.
 * @param x scores, at least one, finite
 * @param type Hyndman & Fan type (default 7)
 * @returns upper minus lower quartile, in the scores' unit
 * @throws RangeError when empty or not finite
 * @source Hyndman & Fan (1996)
 * @checked cases `interquartile_range`, rtol 1e-9
 */
export function interquartileRange(x: Float64Array, type: QuantileType = 7): number {
  const [low, high] = quantiles(x, [0.25, 0.75], type) as [number, number];
  return high - low;
}

/**
 * Median absolute deviation of scores that are already sorted, without any factor.
 * @param s ascending scores, at least one
 * @param center what deviations are taken from (default: the median)
 * @returns median of |s - center|
 * @throws RangeError when empty
 * @source Hampel (1974)
 * @checked cases `median_absolute_deviation`, rtol 1e-9
 */
export function madSorted(s: Float64Array, center = medianSorted(s)): number {
  const n = s.length;
  if (n === 0) throw new RangeError('*s* must hold at least 1 score; got 0');
  let right = 0;
  let end = n;
  while (right < end) {
    const middle = (right + end) >> 1;
    if ((s[middle] as number) < center) right = middle + 1;
    else end = middle;
  }
  // Deviations grow outwards from the centre on both sides, so they are merged up to the middle one instead of sorted.
  let left = right - 1;
  let low = 0;
  let high = 0;
  for (let taken = 0; taken <= n >> 1; taken++) {
    low = high;
    const below = left >= 0 ? center - (s[left] as number) : Infinity;
    const above = right < n ? (s[right] as number) - center : Infinity;
    if (below <= above) left--;
    else right++;
    high = Math.min(below, above);
  }
  return n % 2 === 1 || low === high ? high : low + (high - low) / 2;
}

/**
 * Median absolute deviation from the median, without any factor.
 * @param x scores, at least one, finite
 * @returns median |x - median|, in the scores' unit; 0 when more than half the scores are identical
 * @throws RangeError when empty or not finite
 * @source Hampel (1974)
 * @checked cases `median_absolute_deviation`, rtol 1e-9
 */
export function medianAbsoluteDeviation(x: Float64Array): number {
  requireScores(x);
  return madSorted(sorted(x));
}

/**
 * Median absolute deviation from the median, times a factor.
 * @param x scores, at least one, finite
 * @param constant factor (default 1.4826, which makes it estimate the SD of normal scores; 1 gives the raw MAD)
 * @returns constant times median |x - median|, in the scores' unit; 0 when more than half the scores are identical
 * @throws RangeError when empty or not finite
 * @source Hampel (1974)
 * @checked cases `median_absolute_deviation`, rtol 1e-9
 */
export function mad(x: Float64Array, constant = MAD_CONSTANT): number {
  requireScores(x);
  return constant * madSorted(sorted(x));
}
