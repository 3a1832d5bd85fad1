/** Winsorized scores, their mean, variance and covariance, and the test of Dixon & Tukey. */
import { largestSize, noSpread, noTTest, type TestOptions, type TTest, tTest } from './inference.ts';
import { covariance, mean, standardDeviation, variance } from './moments.ts';
import { sorted } from './order.ts';
import { requireScores, trimCount } from './scores.ts';

/**
 * Winsorized scores, in the order given.
 * @param x scores, at least one, finite
 * @param trim integer percentage at each end, 0 to 49
 * @returns the scores with the g lowest set to the (g+1)-th smallest and the g highest to the (g+1)-th largest
 * @throws RangeError when empty, not finite, or `trim` is not 0 to 49
 * @source Dixon & Tukey (1968); g = floor(trim n / 100)
 * @checked by hand
 */
export function winsorized(x: Float64Array, trim: number): Float64Array {
  requireScores(x);
  const g = trimCount(x.length, trim);
  const s = sorted(x);
  const low = s[g] as number;
  const high = s[x.length - 1 - g] as number;
  return x.map((score) => Math.min(Math.max(score, low), high));
}

/**
 * Mean and sum of squared deviations of winsorized scores, for scores already sorted; copies nothing.
 * @param s ascending scores, at least one
 * @param g number drawn in at EACH end, 0 <= g, 2g < n
 * @returns mean (scores' unit) and squares (squared units; divide by n - 1 for the winsorized variance)
 * @throws RangeError when nothing would be left
 * @source Dixon & Tukey (1968)
 * @checked agrees with winsorizedMean and winsorizedVariance, rtol 1e-13
 */
export function winsorizedSorted(s: Float64Array, g: number): { mean: number; squares: number } {
  const n = s.length;
  if (!(g >= 0 && n - 2 * g > 0)) throw new RangeError(`*g* must leave a score of ${n}; got ${g}`);
  const low = s[g] as number;
  const high = s[n - 1 - g] as number;
  const center = s[n >> 1] as number;
  let total = g * (low - center + (high - center));
  for (let i = g; i < n - g; i++) total += (s[i] as number) - center;
  const middle = center + total / n;
  let squares = g * ((low - middle) * (low - middle) + (high - middle) * (high - middle));
  let drift = g * (low - middle + (high - middle));
  for (let i = g; i < n - g; i++) {
    const gap = (s[i] as number) - middle;
    squares += gap * gap;
    drift += gap;
  }
  return { mean: middle + drift / n, squares: Math.max(0, squares - (drift * drift) / n) };
}

/**
 * Winsorized mean.
 * @param x scores, at least one, finite
 * @param trim integer percentage at each end, 0 to 49
 * @returns mean of the winsorized scores, in the scores' unit
 * @throws RangeError when empty, not finite, or `trim` is not 0 to 49
 * @source Dixon & Tukey (1968)
 * @checked cases `winsorized_mean`, rtol 1e-9
 */
export function winsorizedMean(x: Float64Array, trim: number): number {
  return mean(winsorized(x, trim));
}

/**
 * Winsorized variance.
 * @param x scores, at least two, finite
 * @param trim integer percentage at each end, 0 to 49
 * @returns variance (divisor n - 1) of the winsorized scores, in squared units
 * @throws RangeError when fewer than two, not finite, or `trim` is not 0 to 49
 * @source Dixon & Tukey (1968); divisor n - 1
 * @checked cases `winsorized_variance`, rtol 1e-9
 */
export function winsorizedVariance(x: Float64Array, trim: number): number {
  return variance(winsorized(x, trim));
}

/**
 * Winsorized standard deviation.
 * @param x scores, at least two, finite
 * @param trim integer percentage at each end, 0 to 49
 * @returns square root of the winsorized variance, in the scores' unit
 * @throws RangeError when fewer than two, not finite, or `trim` is not 0 to 49
 * @source Dixon & Tukey (1968); divisor n - 1
 * @checked cases `winsorized_variance`, rtol 1e-9
 */
export function winsorizedSd(x: Float64Array, trim: number): number {
  return standardDeviation(winsorized(x, trim));
}

/**
 * Winsorized covariance of pairs, each variable winsorized on its own and the pairs kept.
 * @param x scores, at least two, finite
 * @param y scores, same length
 * @param trim integer percentage at each end, 0 to 49
 * @returns covariance (divisor n - 1) of the winsorized pairs
 * @throws RangeError when fewer than two, of unequal length, not finite, or `trim` is not 0 to 49
 * @source Wilcox (2012), section 5.9.5
 * @checked cases `yuen_paired`, rtol 1e-9
 */
export function winsorizedCovariance(x: Float64Array, y: Float64Array, trim: number): number {
  return covariance(winsorized(x, trim), winsorized(y, trim));
}

/**
 * t test of a winsorized mean.
 * @param x scores, finite
 * @param options `trim` integer percentage at each end (default 20), `mu` null value (default 0), direction, level
 * @returns estimate (winsorized mean), se, df = h - 1, t, p, interval, g and h; null with a reason when h < 2 or the
 *   winsorized scores are all equal
 * @throws RangeError when empty, not finite, or an option is out of range
 * @source Dixon & Tukey (1968): se = s_w (n-1) / ((h-1) sqrt n), h = n - 2g, t on h - 1 df
 * @checked by hand; at 0 % it is the one-sample t test
 */
export function winsorizedMeanTest(
  x: Float64Array,
  options: TestOptions & { readonly trim?: number; readonly mu?: number } = {},
): TTest & { readonly g: number; readonly h: number } {
  const { trim = 20, mu = 0 } = options;
  const n = x.length;
  const w = winsorized(x, trim);
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  const estimate = mean(w);
  if (h < 2) return { ...noTTest(`${h} of ${n} scores left after winsorizing`, estimate), g, h };
  const sd = standardDeviation(w);
  if (noSpread(sd, largestSize(w))) return { ...noTTest('all winsorized scores are equal', estimate), g, h };
  return { ...tTest(estimate, mu, (sd * (n - 1)) / ((h - 1) * Math.sqrt(n)), h - 1, options), g, h };
}
