import { betaTail } from './beta.ts';
import { deviance } from './deviance.ts';
import { requireInteger, requireNumber, requireProbability } from './require.ts';
import { stirlingError } from './special.ts';

const TWO_PI = 2 * Math.PI;

/**
 * Binomial probability with the probability of failure given beside that of success.
 * @param k successes, whole, 0..n
 * @param n trials, whole
 * @param p probability of success, 0..1
 * @param q 1 - p, given separately so that a small one keeps its digits
 * @returns C(n, k) p^k q^(n - k)
 * @source Loader 2000, equations 3 to 5: saddle-point form with deviances
 * @checked grid binom_cdf, 1e-11
 */
export function binomialTerm(k: number, n: number, p: number, q: number): number {
  if (p === 0 || q === 0) return k === (p === 0 ? 0 : n) ? 1 : 0;
  if (k === 0) return Math.exp(n * (p < 0.1 ? Math.log1p(-p) : Math.log(q)));
  if (k === n) return Math.exp(n * (q < 0.1 ? Math.log1p(-q) : Math.log(p)));
  const errors = stirlingError(n) - stirlingError(k) - stirlingError(n - k);
  const exponent = errors - deviance(k, n * p) - deviance(n - k, n * q);
  return Math.sqrt(n / (TWO_PI * k * (n - k))) * Math.exp(exponent);
}

function check(n: number, p: number): void {
  requireInteger('n', n, 0);
  requireProbability('p', p);
}

function tail(k: number, n: number, p: number, upper: boolean): number {
  requireNumber('k', k);
  check(n, p);
  const whole = Math.floor(k);
  if (whole < 0) return upper ? 1 : 0;
  if (whole >= n) return upper ? 0 : 1;
  return betaTail(p, 1 - p, whole + 1, n - whole, !upper);
}

/**
 * Probability of exactly k successes.
 * @param k successes; anything but a whole number in 0..n gives 0
 * @param n trials, whole, at least 0
 * @param p probability of success, 0..1
 * @returns P(X = k)
 * @throws RangeError if k is NaN or n or p is out of range
 * @source Loader 2000
 * @checked grid binom_cdf, 1e-11
 */
export function binomialMass(k: number, n: number, p: number): number {
  requireNumber('k', k);
  check(n, p);
  return Number.isInteger(k) && k >= 0 && k <= n ? binomialTerm(k, n, p, 1 - p) : 0;
}

/**
 * Probability of at most k successes.
 * @param k any number
 * @param n trials, whole, at least 0
 * @param p probability of success, 0..1
 * @returns P(X <= k)
 * @throws RangeError if k is NaN or n or p is out of range
 * @source 1 - I_p(k + 1, n - k), computed as I_(1-p)(n - k, k + 1)
 * @checked grid binom_cdf, 1e-11
 */
export function binomialLower(k: number, n: number, p: number): number {
  return tail(k, n, p, false);
}

/**
 * Probability of more than k successes.
 * @param k any number
 * @param n trials, whole, at least 0
 * @param p probability of success, 0..1
 * @returns P(X > k)
 * @throws RangeError if k is NaN or n or p is out of range
 * @source I_p(k + 1, n - k)
 * @checked grid binom_cdf, 1e-11
 */
export function binomialUpper(k: number, n: number, p: number): number {
  return tail(k, n, p, true);
}

/**
 * Smallest number of successes whose lower tail reaches a probability.
 * @param prob 0..1; a lower tail within 1e-14 of it counts as reaching it
 * @param n trials, whole, at least 0
 * @param p probability of success, 0..1
 * @returns the smallest whole k with P(X <= k) >= prob
 * @throws RangeError if an argument is out of range
 * @source definition, by bisection
 * @checked by hand, exact
 */
export function binomialQuantile(prob: number, n: number, p: number): number {
  requireProbability('prob', prob);
  check(n, p);
  const aim = prob * (1 - 1e-14);
  let below = -1;
  let reached = n;
  while (reached - below > 1) {
    const middle = Math.floor((below + reached) / 2);
    if (tail(middle, n, p, false) >= aim) reached = middle;
    else below = middle;
  }
  return reached;
}
