import { sorted } from './order.ts';
import { requireScores } from './scores.ts';

/** Upper .005 point of the standard normal distribution. */
const Z_995 = 2.5758293035489004;

/**
 * McKean & Schrader's standard error of the median, for scores already sorted.
 * @param s ascending scores, at least one
 * @returns se, and the rank k whose order statistics it uses
 * @source McKean & Schrader (1984): k = round((n+1)/2 - z_.995 sqrt(n/4)), at least 1; (x_(n-k+1) - x_(k)) / (2 z_.995)
 * @checked cases `se_median_mckean_schrader`, rtol 1e-9
 */
export function medianStandardErrorSorted(s: Float64Array): { se: number; k: number } {
  const n = s.length;
  const k = Math.max(1, Math.round((n + 1) / 2 - Z_995 * Math.sqrt(n / 4)));
  return { se: ((s[n - k] as number) - (s[k - 1] as number)) / (2 * Z_995), k };
}

/**
 * McKean & Schrader's standard error of the median; misleading with ties at the median.
 * @param x scores, at least two, finite
 * @returns se, in the scores' unit, and the rank k whose order statistics it uses
 * @throws RangeError when fewer than two or not finite
 * @source McKean & Schrader (1984): k = round((n+1)/2 - z_.995 sqrt(n/4)), at least 1; (x_(n-k+1) - x_(k)) / (2 z_.995)
 * @checked cases `se_median_mckean_schrader`, rtol 1e-9
 */
export function medianStandardError(x: Float64Array): { se: number; k: number } {
  requireScores(x, 2);
  return medianStandardErrorSorted(sorted(x));
}
