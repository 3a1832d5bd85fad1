import { chiSquareUpper } from '../tails/chi-square.ts';
import { kurtosis } from './kurtosis.ts';
import { skewness } from './skewness.ts';

/**
 * Skewness and kurtosis of normal scores tested together.
 * @param x scores (n, any unit)
 * @returns K2 = z_skew^2 + z_kurt^2 and p from chi-square on 2 df; null with a reason for fewer than 8 or equal scores
 * @throws RangeError when a score is not finite
 * @source D'Agostino & Pearson 1973, Biometrika 60, 613-622
 * @checked outside check cases dagostino_k2, relative 1e-9
 */
export function dagostinoK2(x: Float64Array): { k2: number | null; p: number | null; reason?: string } {
  const skew = skewness(x);
  const kurt = kurtosis(x);
  if (skew.z === null || kurt.z === null) return { k2: null, p: null, reason: skew.reason ?? kurt.reason ?? 'no test' };
  const k2 = skew.z * skew.z + kurt.z * kurt.z;
  return { k2, p: chiSquareUpper(k2, 2) };
}
