import { expOfMinusSquare } from './error-function.ts';
import { requireInteger, requireNumber } from './require.ts';

export { kolmogorovOneSampleLower, kolmogorovOneSampleUpper } from './kolmogorov-one-sample.ts';

/** Sum for the lower tail, which converges at once for x <= 1. */
function smallLimit(x: number): number {
  const rate = (Math.PI / x) * (Math.PI / x) * 0.125;
  let sum = 0;
  for (let k = 1; k <= 9; k += 2) sum += Math.exp(-k * k * rate);
  return (Math.sqrt(2 * Math.PI) / x) * sum;
}

/** Sum for the upper tail, which converges at once for x >= 1. */
function largeLimit(x: number): number {
  if (x > 20) return 0;
  let sum = 0;
  for (let k = 5; k >= 1; k--) sum = expOfMinusSquare(k * x, 2) - sum;
  return 2 * sum;
}

/**
 * Lower tail of Kolmogorov's limiting distribution.
 * @param x root of n times the distance; 0 and below give 0
 * @returns P(K <= x)
 * @throws RangeError if x is NaN
 * @source Kolmogorov 1933: sqrt(2 pi) / x * sum exp(-(2k - 1)^2 pi^2 / (8 x^2))
 * @checked grid kolm_lim, 1e-11
 */
export function kolmogorovLimitLower(x: number): number {
  requireNumber('x', x);
  if (x <= 0) return 0;
  return x < 1 ? smallLimit(x) : 1 - largeLimit(x);
}

/**
 * Upper tail of Kolmogorov's limiting distribution.
 * @param x root of n times the distance; 0 and below give 1
 * @returns P(K > x)
 * @throws RangeError if x is NaN
 * @source Kolmogorov 1933: 2 * sum (-1)^(k - 1) exp(-2 k^2 x^2)
 * @checked grid kolm_lim, 1e-11
 */
export function kolmogorovLimitUpper(x: number): number {
  requireNumber('x', x);
  if (x <= 0) return 1;
  return x < 1 ? 1 - smallLimit(x) : largeLimit(x);
}

/** Probability that a random path of m steps right and n up stays inside (lower) or touches the bounds (upper). */
function paths(d: number, m: number, n: number): { lower: number; upper: number } {
  // Distances are whole multiples of 1 / (m n); d itself may have been rounded.
  const bound = Math.ceil(d * m * n - 1e-7);
  if (bound <= 0) return { lower: 0, upper: 1 };
  let mass: Float64Array = new Float64Array(n + 1);
  mass[0] = 1;
  let upper = 0;
  for (let i = 0; i <= m; i++) {
    const next = new Float64Array(n + 1);
    for (let j = 0; j <= n; j++) {
      const here = mass[j]!;
      if (here === 0 || i + j === m + n) continue;
      const left = m + n - i - j;
      const right = (here * (m - i)) / left;
      const up = (here * (n - j)) / left;
      if (Math.abs((i + 1) * n - j * m) < bound) next[j]! += right;
      else upper += right;
      if (j === n) continue;
      if (Math.abs(i * n - (j + 1) * m) < bound) mass[j + 1]! += up;
      else upper += up;
    }
    if (i < m) mass = next;
  }
  return { lower: mass[n]!, upper: Math.min(1, upper) };
}

function check(d: number, m: number, n: number): void {
  requireNumber('d', d);
  requireInteger('n1', m, 1);
  requireInteger('n2', n, 1);
  if (m * n > 25_000_000) throw new RangeError(`*n1 n2* must be at most 25,000,000; got ${m * n}`);
}

/**
 * Probability that two samples' distributions differ by less than a distance everywhere, exact, no ties.
 * @param d distance; 0 and below give 0, above 1 gives 1
 * @param n1 size of the first sample, whole, at least 1
 * @param n2 size of the second sample, whole, at least 1
 * @returns P(D < d)
 * @throws RangeError if d is NaN, a size is not a positive whole number or n1 n2 > 25,000,000
 * @source Hodges 1958: lattice paths that stay strictly between the bounds
 * @checked grid kolm_2s, 1e-11
 */
export function kolmogorovTwoSampleLower(d: number, n1: number, n2: number): number {
  check(d, n1, n2);
  return paths(d, n1, n2).lower;
}

/**
 * Probability that two samples' distributions differ by at least a distance somewhere, exact, no ties.
 * @param d distance; 0 and below give 1, above 1 gives 0
 * @param n1 size of the first sample, whole, at least 1
 * @param n2 size of the second sample, whole, at least 1
 * @returns P(D >= d)
 * @throws RangeError if d is NaN, a size is not a positive whole number or n1 n2 > 25,000,000
 * @source Hodges 1958: lattice paths summed where they first reach a bound, so that a small tail keeps its digits
 * @checked grid kolm_2s, 1e-11
 */
export function kolmogorovTwoSampleUpper(d: number, n1: number, n2: number): number {
  check(d, n1, n2);
  return paths(d, n1, n2).upper;
}
