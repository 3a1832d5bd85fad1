import { mean, standardDeviation } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { limitsAround, noLimits, type RuleLimits, requirePositive } from './limits.ts';

/**
 * Limits of the standard-deviation rule: mean -+ cutoff SD, the score itself included in mean and SD.
 * @param x scores (n, any unit)
 * @param options cutoff in standard deviations, above 0
 * @returns lower and upper limit, center = mean, spread = SD (divisor n-1), all in the scores' unit; limits null with a
 *   reason for fewer than two scores or equal scores
 * @throws RangeError when *x* holds NaN or an infinity, or *cutoff* is not above 0
 * @source common practice; mean - c s, mean + c s with s^2 = sum (x - mean)^2 / (n - 1)
 * @checked outside check cases z_score_rule, relative 1e-9
 */
export function zScoreLimits(x: Float64Array, options: { readonly cutoff: number }): RuleLimits {
  requireScores(x, 0);
  requirePositive(options.cutoff, 'cutoff');
  if (x.length === 0) return noLimits('there are no scores');
  if (x.length === 1) return noLimits('one score has no spread', x[0]!);
  return limitsAround(x, mean(x), standardDeviation(x), options.cutoff, 'all scores are equal');
}

/**
 * Largest number of standard deviations any score of n can lie from the mean: a rule with a larger cutoff flags nothing.
 * @param n number of scores, a whole number of 1 or more
 * @returns (n - 1) / sqrt(n), in standard deviations (divisor n-1)
 * @throws RangeError when *n* is not a whole number of 1 or more
 * @source Shiffler 1988, American Statistician 42, 79-80: max |z| = (n - 1) / sqrt(n)
 * @checked by hand, 1e-15
 */
export function largestZ(n: number): number {
  if (!Number.isInteger(n) || n < 1) throw new RangeError(`*n* must be a whole number of 1 or more; got ${n}`);
  return (n - 1) / Math.sqrt(n);
}
