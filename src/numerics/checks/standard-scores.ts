import { largestSize, noSpread } from '../inference.ts';
import { mean, standardDeviation } from '../moments.ts';
import { sorted } from '../order.ts';

/**
 * Ordered scores in standard deviations from their mean.
 * @param x scores (n of 2 or more, any unit)
 * @returns ascending (x - mean) / SD, divisor n-1; null when the scores do not vary
 * @throws RangeError when fewer than two or a score is not finite
 * @source common practice
 * @checked by hand, 1e-15
 */
export function standardScores(x: Float64Array): Float64Array | null {
  const sd = standardDeviation(x);
  if (noSpread(sd, largestSize(x))) return null;
  const center = mean(x);
  return sorted(x).map((score) => (score - center) / sd);
}
