import { gammaLower, gammaQuantile, gammaQuantileUpper, gammaUpper } from './gamma.ts';
import { requirePositive } from './require.ts';

/**
 * Lower tail of the chi-square distribution.
 * @param x any number; 0 and below give 0
 * @param df degrees of freedom, above 0; Infinity is its limit, 0
 * @returns P(X <= x)
 * @throws RangeError if x is NaN or df is not positive
 * @source gamma distribution of shape df / 2 at x / 2
 * @checked grid chisq_cdf, 1e-11 (1e-10 from df 1e5 on)
 */
export function chiSquareLower(x: number, df: number): number {
  requirePositive('df', df);
  return gammaLower(0.5 * x, 0.5 * df);
}

/**
 * Upper tail of the chi-square distribution.
 * @param x any number; 0 and below give 1
 * @param df degrees of freedom, above 0; Infinity is its limit, 1
 * @returns P(X > x)
 * @throws RangeError if x is NaN or df is not positive
 * @source gamma distribution of shape df / 2 at x / 2
 * @checked grid chisq_cdf, 1e-11 (1e-10 from df 1e5 on)
 */
export function chiSquareUpper(x: number, df: number): number {
  requirePositive('df', df);
  return gammaUpper(0.5 * x, 0.5 * df);
}

/**
 * Value of the chi-square distribution with a given lower tail.
 * @param p 0..1
 * @param df degrees of freedom, above 0; Infinity is its limit
 * @returns x with P(X <= x) = p; Infinity at 1
 * @throws RangeError unless 0 <= p <= 1 and df > 0
 * @source twice the gamma quantile of shape df / 2
 * @checked grid chisq_q, 1e-11
 */
export function chiSquareQuantile(p: number, df: number): number {
  requirePositive('df', df);
  return 2 * gammaQuantile(p, 0.5 * df);
}

/**
 * Value of the chi-square distribution with a given upper tail.
 * @param p 0..1
 * @param df degrees of freedom, above 0; Infinity is its limit
 * @returns x with P(X > x) = p; Infinity at 0
 * @throws RangeError unless 0 <= p <= 1 and df > 0
 * @source twice the gamma quantile of shape df / 2
 * @checked grid chisq_q, 1e-11
 */
export function chiSquareQuantileUpper(p: number, df: number): number {
  requirePositive('df', df);
  return 2 * gammaQuantileUpper(p, 0.5 * df);
}
