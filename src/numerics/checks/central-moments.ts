import { largestSize, noSpread } from '../inference.ts';
import { mean, sum } from '../moments.ts';

/** Averages (divisor n) of powers of the deviations from the mean. */
export interface CentralMoments {
  readonly m2: number;
  readonly m3: number;
  readonly m4: number;
}

/**
 * Second to fourth central moments, divisor n.
 * @param x scores (n of 1 or more)
 * @returns the moments of scores measured in their own largest deviation; null when the scores do not vary
 * @throws RangeError when empty or a score is not finite
 * @source common practice; m_k = sum (x - mean)^k / n
 * @checked by hand, 1e-14
 */
export function centralMoments(x: Float64Array): CentralMoments | null {
  const center = mean(x);
  const deviations = x.map((score) => score - center);
  const unit = largestSize(deviations);
  // Without a unit of their own, fourth powers of large scores would overflow.
  if (noSpread(unit, largestSize(x))) return null;
  const d = deviations.map((value) => value / unit);
  const moment = (power: (value: number) => number) => sum(d.map(power)) / x.length;
  return { m2: moment((v) => v * v), m3: moment((v) => v * v * v), m4: moment((v) => v * v * (v * v)) };
}
