import { medianSorted, quantileSorted, sorted } from '../order.ts';
import { requireScores } from '../scores.ts';
import { ZERO_QUARTILES } from './iqr-fences.ts';
import { limitsAround, noLimits, type RuleLimits } from './limits.ts';

/** Limits with the factor that depends on the number of scores. */
export interface CarlingLimits extends RuleLimits {
  /** Factor of the quartile distance (17.63 n - 23.64) / (7.74 n - 3.71); null without scores. */
  readonly k: number | null;
}

/**
 * Fences around the median whose factor depends on n, so that normal samples of any size lose about the same share.
 * @param x scores (n, any unit)
 * @returns median -+ k (q3 - q1) with ideal fourths, center = median, spread = q3 - q1, in the scores' unit; limits null
 *   with a reason for fewer than two scores or when the quartiles coincide
 * @throws RangeError when *x* holds NaN or an infinity
 * @source Carling 2000, Comput. Stat. Data Anal. 33, 249-258: k = (17.63 n - 23.64) / (7.74 n - 3.71)
 * @checked outside check cases carling_boxplot, relative 1e-9
 */
export function carlingLimits(x: Float64Array): CarlingLimits {
  requireScores(x, 0);
  const n = x.length;
  if (n === 0) return { ...noLimits('there are no scores'), k: null };
  const s = sorted(x);
  const k = (17.63 * n - 23.64) / (7.74 * n - 3.71);
  const spread = quantileSorted(s, 0.75, 8) - quantileSorted(s, 0.25, 8);
  return { ...limitsAround(x, medianSorted(s), spread, k, ZERO_QUARTILES), k };
}
