import { erfcScaled, expOfMinusSquare } from './error-function.ts';
import { upperHalfNormal } from './inverse-normal.ts';
import { requireNumber, requireProbability } from './require.ts';

const ROOT_TWO_PI_INVERSE = 0.3989422804014327;

/** P(Z > z) for z >= 0. */
function farSide(z: number): number {
  if (z > 38.6) return 0;
  const gauss = z < 6 ? Math.exp(-0.5 * z * z) : expOfMinusSquare(z, 0.5);
  return 0.5 * erfcScaled(z * Math.SQRT1_2) * gauss;
}

/**
 * Upper tail of the standard normal distribution.
 * @param z standard deviations from the mean; infinities allowed
 * @returns P(Z > z)
 * @throws RangeError if z is NaN
 * @source Cody 1969: P(Z > z) = erfc(z / sqrt 2) / 2
 * @checked grid norm_cdf, 1e-11 down to 1e-300
 */
export function normalUpper(z: number): number {
  requireNumber('z', z);
  return z >= 0 ? farSide(z) : 1 - farSide(-z);
}

/**
 * Lower tail of the standard normal distribution.
 * @param z standard deviations from the mean; infinities allowed
 * @returns P(Z <= z)
 * @throws RangeError if z is NaN
 * @source Cody 1969: P(Z <= z) = erfc(-z / sqrt 2) / 2
 * @checked grid norm_cdf, 1e-11 down to 1e-300
 */
export function normalLower(z: number): number {
  return normalUpper(-z);
}

/**
 * Density of the standard normal distribution.
 * @param z standard deviations from the mean
 * @returns exp(-z^2 / 2) / sqrt(2 pi)
 * @throws RangeError if z is NaN
 * @source definition
 * @checked by hand, 1e-15
 */
export function normalDensity(z: number): number {
  requireNumber('z', z);
  if (Math.abs(z) > 39) return 0;
  return ROOT_TWO_PI_INVERSE * (Math.abs(z) < 6 ? Math.exp(-0.5 * z * z) : expOfMinusSquare(z, 0.5));
}

/**
 * Natural logarithm of the lower tail, finite where the tail itself is too small for a double.
 * @param z standard deviations from the mean
 * @returns log P(Z <= z)
 * @throws RangeError if z is NaN
 * @source Cody 1969: log(erfcx(-z / sqrt 2) / 2) - z^2 / 2
 * @checked agrees with the log of normalLower, 1e-13
 */
export function normalLogLower(z: number): number {
  requireNumber('z', z);
  if (z >= 0) return Math.log1p(-farSide(z));
  return Math.log(0.5 * erfcScaled(-z * Math.SQRT1_2)) - 0.5 * z * z;
}

/**
 * Value with a given lower tail.
 * @param p 0..1
 * @returns z with P(Z <= z) = p; -Infinity at 0, Infinity at 1
 * @throws RangeError unless 0 <= p <= 1
 * @source Wichura 1988, AS 241, PPND16
 * @checked grid norm_q, 1e-11
 */
export function normalQuantile(p: number): number {
  requireProbability('p', p);
  return p <= 0.5 ? 0 - upperHalfNormal(p) : upperHalfNormal(1 - p);
}

/**
 * Value with a given upper tail.
 * @param p 0..1
 * @returns z with P(Z > z) = p; Infinity at 0, -Infinity at 1
 * @throws RangeError unless 0 <= p <= 1
 * @source Wichura 1988, AS 241, PPND16
 * @checked grid norm_q, 1e-11
 */
export function normalQuantileUpper(p: number): number {
  return 0 - normalQuantile(p);
}
