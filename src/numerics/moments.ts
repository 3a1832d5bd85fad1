/** Sums, means and variances that keep their digits when scores lie far from zero. */
import { requireScores } from './scores.ts';

/**
 * Compensated sum.
 * @param x numbers, any length
 * @returns their sum, with an error of about one unit in the last place
 * @source Neumaier (1974): the low-order parts lost at each addition are summed apart
 * @checked by hand: 1, 1e100, 1, -1e100 sum to 2
 */
export function sum(x: ArrayLike<number>): number {
  let total = 0;
  let lost = 0;
  for (let i = 0; i < x.length; i++) {
    const value = x[i] as number;
    const next = total + value;
    lost += Math.abs(total) >= Math.abs(value) ? total - next + value : value - next + total;
    total = next;
  }
  return total + lost;
}

/**
 * Arithmetic mean.
 * @param x scores, at least one, finite
 * @returns the mean, corrected by the mean of the residuals from a first estimate
 * @throws RangeError when empty or not finite
 * @source Chan, Golub & LeVeque (1983), two passes with correction
 * @checked NIST StRD univariate offsets, rtol 1e-15
 */
export function mean(x: Float64Array): number {
  requireScores(x);
  return meanUnchecked(x);
}

function meanUnchecked(x: Float64Array): number {
  const n = x.length;
  const first = sum(x) / n;
  let rest = 0;
  for (let i = 0; i < n; i++) rest += (x[i] as number) - first;
  return first + rest / n;
}

/**
 * Sum of squared deviations from the mean.
 * @param x scores, at least one, finite
 * @param center the mean, when already known
 * @returns sum (x - mean)^2, in squared units; exactly 0 when all scores are identical
 * @throws RangeError when empty or not finite
 * @source Chan, Golub & LeVeque (1983): sum d^2 - (sum d)^2 / n, d = x - mean
 * @checked NIST StRD univariate offsets, rtol 1e-9
 */
export function sumOfSquares(x: Float64Array, center?: number): number {
  requireScores(x);
  const n = x.length;
  const m = center ?? meanUnchecked(x);
  let squares = 0;
  let lost = 0;
  let drift = 0;
  for (let i = 0; i < n; i++) {
    const d = (x[i] as number) - m;
    const value = d * d;
    const next = squares + value;
    lost += squares >= value ? squares - next + value : value - next + squares;
    squares = next;
    drift += d;
  }
  return Math.max(0, squares + lost - (drift * drift) / n);
}

/**
 * Variance.
 * @param x scores, at least two, finite
 * @returns sum of squared deviations / (n - 1), in squared units
 * @throws RangeError when fewer than two or not finite
 * @source common practice: divisor n - 1
 * @checked cases `standard_deviation`, rtol 1e-9
 */
export function variance(x: Float64Array): number {
  requireScores(x, 2);
  return sumOfSquares(x) / (x.length - 1);
}

/**
 * Standard deviation.
 * @param x scores, at least two, finite
 * @returns sqrt(variance), in the scores' unit
 * @throws RangeError when fewer than two or not finite
 * @source common practice: divisor n - 1
 * @checked cases `standard_deviation`, rtol 1e-9
 */
export function standardDeviation(x: Float64Array): number {
  return Math.sqrt(variance(x));
}

/**
 * Covariance of pairs.
 * @param x scores, at least two, finite
 * @param y scores, same length
 * @returns sum (x - mean x)(y - mean y) / (n - 1)
 * @throws RangeError when fewer than two, of unequal length or not finite
 * @source common practice: divisor n - 1
 * @checked by hand, invariance
 */
export function covariance(x: Float64Array, y: Float64Array): number {
  requireScores(x, 2);
  requireScores(y, 2, 'y');
  if (x.length !== y.length) throw new RangeError(`*y* must be as long as *x* (${x.length}); got ${y.length}`);
  const mx = meanUnchecked(x);
  const my = meanUnchecked(y);
  const products = new Float64Array(x.length);
  for (let i = 0; i < x.length; i++) products[i] = ((x[i] as number) - mx) * ((y[i] as number) - my);
  return sum(products) / (x.length - 1);
}

/**
 * Mean with its standard error.
 * @param x scores, at least one, finite
 * @returns `estimate`, `n`, and `se` = SD / sqrt(n), null for a single score
 * @throws RangeError when empty or not finite
 * @source common practice
 * @checked cases `mean`, rtol 1e-9
 */
export function meanWithError(x: Float64Array): { estimate: number; n: number; se: number | null } {
  const n = x.length;
  return { estimate: mean(x), n, se: n < 2 ? null : standardDeviation(x) / Math.sqrt(n) };
}
