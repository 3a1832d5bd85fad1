import { binomialTerm } from './binomial.ts';
import { requireInteger, requireNumber } from './require.ts';

function check(N: number, K: number, n: number): void {
  requireInteger('N', N, 0);
  requireInteger('K', K, 0, N);
  requireInteger('n', n, 0, N);
}

/** P(X = k) for k inside the support. */
function mass(k: number, N: number, K: number, n: number): number {
  if (n === 0 || n === N) return 1;
  const p = n / N;
  const q = (N - n) / N;
  return (binomialTerm(k, K, p, q) * binomialTerm(n - k, N - K, p, q)) / binomialTerm(n, N, p, q);
}

/** Sum of the masses from k to the lowest or the highest value, by their ratios. */
function sumOutward(k: number, N: number, K: number, n: number, upward: boolean): number {
  const lowest = Math.max(0, n - (N - K));
  const highest = Math.min(n, K);
  let term = 1;
  let sum = 0;
  for (let x = k; x >= lowest && x <= highest && term > 1e-17 * sum; x += upward ? 1 : -1) {
    sum += term;
    if (upward) term *= ((n - x) * (K - x)) / ((x + 1) * (N - K - n + x + 1));
    else term *= (x * (N - K - n + x)) / ((n - x + 1) * (K - x + 1));
  }
  return sum * mass(k, N, K, n);
}

function tail(k: number, N: number, K: number, n: number, upper: boolean): number {
  requireNumber('k', k);
  check(N, K, n);
  const whole = Math.floor(k);
  if (whole < Math.max(0, n - (N - K))) return upper ? 1 : 0;
  if (whole >= Math.min(n, K)) return upper ? 0 : 1;
  // The side away from the mean is summed; the other is its complement.
  const left = whole + 0.5 < (n * K) / N;
  const near = left ? sumOutward(whole, N, K, n, false) : sumOutward(whole + 1, N, K, n, true);
  return left === upper ? 1 - Math.min(near, 1) : near;
}

/**
 * Probability of exactly k marked items in a draw without replacement.
 * @param k marked items drawn; anything but a whole number in the support gives 0
 * @param N items, whole
 * @param K marked items, whole, 0..N
 * @param n items drawn, whole, 0..N
 * @returns P(X = k)
 * @throws RangeError if k is NaN or a count is out of range
 * @source Loader 2000, section 4: product of binomial terms at p = n / N
 * @checked grid hyper_cdf, 1e-11
 */
export function hypergeometricMass(k: number, N: number, K: number, n: number): number {
  requireNumber('k', k);
  check(N, K, n);
  const possible = Number.isInteger(k) && k >= Math.max(0, n - (N - K)) && k <= Math.min(n, K);
  return possible ? mass(k, N, K, n) : 0;
}

/**
 * Probability of at most k marked items in a draw without replacement.
 * @param k any number
 * @param N items, whole
 * @param K marked items, whole, 0..N
 * @param n items drawn, whole, 0..N
 * @returns P(X <= k)
 * @throws RangeError if k is NaN or a count is out of range
 * @source Loader 2000 (mass); ratio sum from the smaller tail
 * @checked grid hyper_cdf, 1e-11
 */
export function hypergeometricLower(k: number, N: number, K: number, n: number): number {
  return tail(k, N, K, n, false);
}

/**
 * Probability of more than k marked items in a draw without replacement.
 * @param k any number
 * @param N items, whole
 * @param K marked items, whole, 0..N
 * @param n items drawn, whole, 0..N
 * @returns P(X > k)
 * @throws RangeError if k is NaN or a count is out of range
 * @source Loader 2000 (mass); ratio sum from the smaller tail
 * @checked grid hyper_cdf, 1e-11
 */
export function hypergeometricUpper(k: number, N: number, K: number, n: number): number {
  return tail(k, N, K, n, true);
}
