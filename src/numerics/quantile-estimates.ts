/** Quantiles as weighted sums of all order statistics, and their standard errors. */
import { sorted } from './order.ts';
import { requireScores } from './scores.ts';
import { betaLower, betaUpper } from './tails/beta.ts';

/** P(low < Beta(a, b) <= high), from whichever tail is the smaller. */
function betaBetween(low: number, high: number, a: number, b: number): number {
  const lower = betaLower(high, a, b);
  return lower < 0.5 ? lower - betaLower(low, a, b) : betaUpper(low, a, b) - betaUpper(high, a, b);
}

function betaWeights(n: number, a: number, b: number): Float64Array {
  return Float64Array.from({ length: n }, (_, i) => betaBetween(i / n, (i + 1) / n, a, b));
}

/**
 * Harrell-Davis quantile.
 * @param x scores, at least one, finite
 * @param p probability, strictly between 0 and 1
 * @returns sum of the order statistics weighted by Beta((n+1)p, (n+1)(1-p)) over [(i-1)/n, i/n], in the scores' unit
 * @throws RangeError when empty, not finite, or p is not strictly between 0 and 1
 * @source Harrell & Davis (1982)
 * @checked cases `harrell_davis`, rtol 1e-9
 */
export function harrellDavis(x: Float64Array, p: number): number {
  requireScores(x);
  if (!(p > 0 && p < 1)) throw new RangeError(`*p* must be strictly between 0 and 1; got ${p}`);
  const n = x.length;
  const s = sorted(x);
  const center = s[n >> 1] as number;
  const weights = betaWeights(n, (n + 1) * p, (n + 1) * (1 - p));
  let moved = 0;
  for (let i = 0; i < n; i++) moved += (weights[i] as number) * ((s[i] as number) - center);
  return center + moved;
}

/**
 * Maritz-Jarrett standard error of a quantile.
 * @param x scores, at least two, finite
 * @param p probability, strictly between 0 and 1
 * @param variant 'order-statistic' (default; weights Beta(m, n-m+1), exactly the bootstrap SD of x_(m)) or 'm-minus-1'
 *   (Beta(m-1, n-m), found in circulated code; off for small n)
 * @returns se, in the scores' unit, and m = floor(p n + .5); se null with a reason where a weight does not exist
 * @throws RangeError when fewer than two, not finite, or p is not strictly between 0 and 1
 * @source Maritz & Jarrett (1978)
 * @checked cases `se_quantile_maritz_jarrett`, rtol 1e-9
 */
export function quantileStandardError(
  x: Float64Array,
  p: number,
  variant: 'order-statistic' | 'm-minus-1' = 'order-statistic',
): { readonly se: number | null; readonly m: number; readonly reason?: string } {
  requireScores(x, 2);
  if (!(p > 0 && p < 1)) throw new RangeError(`*p* must be strictly between 0 and 1; got ${p}`);
  const n = x.length;
  const m = Math.floor(p * n + 0.5 + 1e-9);
  const [a, b] = variant === 'order-statistic' ? [m, n - m + 1] : [m - 1, n - m];
  if (a < 1 || b < 1) return { se: null, m, reason: 'too few scores for this quantile' };
  const s = sorted(x);
  const center = s[n >> 1] as number;
  const weights = betaWeights(n, a, b);
  let first = 0;
  for (let i = 0; i < n; i++) first += (weights[i] as number) * ((s[i] as number) - center);
  let second = 0;
  for (let i = 0; i < n; i++) {
    const gap = (s[i] as number) - center - first;
    second += (weights[i] as number) * gap * gap;
  }
  return { se: Math.sqrt(second), m };
}
