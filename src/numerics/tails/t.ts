import { betaLogit, betaTail } from './beta.ts';
import { normalQuantileUpper, normalUpper } from './normal.ts';
import { requireNumber, requirePositive, requireProbability } from './require.ts';
import { logBeta } from './special.ts';

/** Beyond this many degrees of freedom the tails above 1e-300 are the normal ones to 1e-12. */
const NORMAL_FROM = 1e18;

/** P(|T| >= size) for size >= 0. */
function bothTails(size: number, df: number): number {
  if (df >= NORMAL_FROM) return 2 * normalUpper(size);
  // The square of a larger size overflows; there the first term of the series is exact.
  if (size > 1e140 * Math.sqrt(df)) {
    if (size === Infinity) return 0;
    const half = 0.5 * df;
    return Math.exp(half * (Math.log(df) - 2 * Math.log(size)) - Math.log(half) - logBeta(half, 0.5));
  }
  const square = size * size;
  return betaTail(df / (df + square), square / (df + square), 0.5 * df, 0.5, false);
}

/**
 * Both tails of Student's t distribution.
 * @param t any number; infinities allowed
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @returns P(|T| >= |t|)
 * @throws RangeError if t is NaN or df is not positive
 * @source I_x(df / 2, 1 / 2) with x = df / (df + t^2)
 * @checked through grid t_cdf, 1e-11
 */
export function tTwoSided(t: number, df: number): number {
  requireNumber('t', t);
  requirePositive('df', df);
  return bothTails(Math.abs(t), df);
}

/**
 * Upper tail of Student's t distribution.
 * @param t any number; infinities allowed
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @returns P(T > t)
 * @throws RangeError if t is NaN or df is not positive
 * @source I_x(df / 2, 1 / 2) / 2 with x = df / (df + t^2), t >= 0
 * @checked grid t_cdf, 1e-11 down to 1e-300 (1e-10 from df 1e5 on)
 */
export function tUpper(t: number, df: number): number {
  requireNumber('t', t);
  requirePositive('df', df);
  const far = 0.5 * bothTails(Math.abs(t), df);
  return t >= 0 ? far : 1 - far;
}

/**
 * Lower tail of Student's t distribution.
 * @param t any number; infinities allowed
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @returns P(T <= t)
 * @throws RangeError if t is NaN or df is not positive
 * @source I_x(df / 2, 1 / 2) / 2 with x = df / (df + t^2), t <= 0
 * @checked grid t_cdf, 1e-11 down to 1e-300 (1e-10 from df 1e5 on)
 */
export function tLower(t: number, df: number): number {
  return tUpper(-t, df);
}

/** Value with upper tail p <= 0.5. */
function farQuantile(p: number, df: number): number {
  if (p === 0) return Infinity;
  if (p === 0.5) return 0;
  if (df >= NORMAL_FROM) return normalQuantileUpper(p);
  // 1 - 2p is exact near the middle, so the value itself is solved for there, not its complement.
  const logit = p > 0.25 ? betaLogit(1 - 2 * p, 0.5, 0.5 * df, false) : -betaLogit(2 * p, 0.5 * df, 0.5, false);
  return Math.exp(0.5 * (logit + Math.log(df)));
}

/**
 * Value of Student's t distribution with a given upper tail.
 * @param p 0..1
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @returns t with P(T > t) = p; infinite at 0 and 1 and where it exceeds the largest double
 * @throws RangeError unless 0 <= p <= 1 and df > 0
 * @source safeguarded Newton on the log of the tail in log(t^2 / df)
 * @checked grid t_q, 1e-11
 */
export function tQuantileUpper(p: number, df: number): number {
  requireProbability('p', p);
  requirePositive('df', df);
  return p <= 0.5 ? farQuantile(p, df) : 0 - farQuantile(1 - p, df);
}

/**
 * Value of Student's t distribution with a given lower tail.
 * @param p 0..1
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @returns t with P(T <= t) = p; infinite at 0 and 1 and where it exceeds the largest double
 * @throws RangeError unless 0 <= p <= 1 and df > 0
 * @source safeguarded Newton on the log of the tail in log(t^2 / df)
 * @checked grid t_q, 1e-11
 */
export function tQuantile(p: number, df: number): number {
  return 0 - tQuantileUpper(p, df);
}
