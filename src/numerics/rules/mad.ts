import { MAD_CONSTANT, madSorted, medianSorted, sorted } from '../order.ts';
import { requireScores } from '../scores.ts';
import { limitsAround, noLimits, type RuleLimits, requirePositive } from './limits.ts';

/**
 * Limits of the median-distance rule: median -+ cutoff constant MAD.
 * @param x scores (n, any unit)
 * @param options cutoff in scaled MADs, above 0; constant: what the MAD is multiplied by (1.4826 makes it estimate the
 *   SD of normal scores)
 * @returns lower and upper limit, center = median, spread = constant MAD, all in the scores' unit; limits null with a
 *   reason when the MAD is 0
 * @throws RangeError when *x* holds NaN or an infinity, or *cutoff* or *constant* is not above 0
 * @source Leys, Ley, Klein, Bernard & Licata 2013, J. Exp. Soc. Psychol. 49, 764-766: M -+ c b MAD, b = 1.4826
 * @checked outside check cases mad_median_rule, relative 1e-9
 */
export function madLimits(
  x: Float64Array,
  options: { readonly cutoff: number; readonly constant?: number },
): RuleLimits {
  const constant = options.constant ?? MAD_CONSTANT;
  requireScores(x, 0);
  requirePositive(options.cutoff, 'cutoff');
  requirePositive(constant, 'constant');
  if (x.length === 0) return noLimits('there are no scores');
  const s = sorted(x);
  const center = medianSorted(s);
  return limitsAround(x, center, constant * madSorted(s, center), options.cutoff, ZERO_MAD);
}

/** Why the MAD is 0 when the scores are not all equal. */
export const ZERO_MAD = 'at least half the scores are identical (MAD = 0)';
