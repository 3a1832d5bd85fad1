import { chiMixture } from './chi-mixture.ts';
import { chiSquareLower, chiSquareUpper } from './chi-square.ts';
import { fallingRoot } from './falling-root.ts';
import { normalDensity, normalLower, normalQuantile } from './normal.ts';
import { requireFinite, requireNumber, requirePositive } from './require.ts';
import { tLower, tUpper } from './t.ts';

/** From here on chi over its root df is 1 to more digits than a double has. */
const NORMAL_FROM = 1e20;

function check(t: number, df: number, ncp: number): void {
  requireNumber('t', t);
  requirePositive('df', df);
  requireFinite('ncp', ncp);
}

/**
 * Lower tail for t > 0 where the noncentrality dwarfs the spread of the normal part: the mean over Z of the tail of S
 * beyond (Z + ncp) / t, by the trapezoid rule; `below` takes the other tail, which is P(T > t).
 */
function overNormal(t: number, df: number, ncp: number, below: boolean): number {
  const step = 0.25;
  const tail = below ? chiSquareLower : chiSquareUpper;
  let sum = 0;
  for (let i = -156; i <= 156; i++) {
    const root = (i * step + ncp) / t;
    sum += normalDensity(i * step) * tail(df * root * root, df);
  }
  return Math.min(1, sum * step);
}

/** P(T <= t), from positive terms. */
function lower(t: number, df: number, ncp: number): number {
  if (ncp === 0) return tLower(t, df);
  if (Math.abs(t) === Infinity) return t > 0 ? 1 : 0;
  if (df >= NORMAL_FROM) return normalLower(t - ncp);
  if (Math.abs(ncp) < 40 || ncp * ncp < 18 * df) return chiMixture(t, ncp, df);
  // Opposite signs are farther apart than the smallest double.
  if (ncp > 0) return t > 0 ? overNormal(t, df, ncp, false) : 0;
  return t < 0 ? overNormal(-t, df, -ncp, true) : 1;
}

/**
 * Lower tail of the noncentral t distribution.
 * @param t any number; infinities allowed
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @param ncp noncentrality, any finite number
 * @returns P(T <= t)
 * @throws RangeError on NaN, a df that is not positive or an infinite ncp
 * @source definition T = (Z + ncp) / S: the mean of P(Z <= t S - ncp) over S, by quadrature
 * @checked grid nct_cdf, 1e-11
 */
export function noncentralTLower(t: number, df: number, ncp: number): number {
  check(t, df, ncp);
  return lower(t, df, ncp);
}

/**
 * Upper tail of the noncentral t distribution.
 * @param t any number; infinities allowed
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @param ncp noncentrality, any finite number
 * @returns P(T > t)
 * @throws RangeError on NaN, a df that is not positive or an infinite ncp
 * @source P(T > t; ncp) = P(T <= -t; -ncp)
 * @checked grid nct_cdf, 1e-11
 */
export function noncentralTUpper(t: number, df: number, ncp: number): number {
  check(t, df, ncp);
  return ncp === 0 ? tUpper(t, df) : lower(-t, df, -ncp);
}

/** Noncentrality with lower tail p <= 0.5. */
function parameterFor(t: number, df: number, p: number): number {
  const aim = normalQuantile(p);
  const spread = Math.sqrt(1 + (0.5 * t * t) / df);
  const root = fallingRoot((ncp) => normalQuantile(lower(t, df, ncp)) - aim, t - aim * spread, 0.1 * spread);
  if (root === null) throw new RangeError(`*t* must be small enough for a noncentrality to exist; got ${t}`);
  return root;
}

/**
 * Noncentrality at which a t value has a given lower tail: one limit of the interval of a standardised difference.
 * @param t any finite number
 * @param df degrees of freedom, above 0, fractions and Infinity allowed
 * @param p strictly between 0 and 1
 * @returns ncp with P(T <= t) = p; it falls as p rises
 * @throws RangeError unless t is finite, df > 0 and 0 < p < 1
 * @source secant and bisection on the normal quantile of the smaller tail, nearly linear in ncp
 * @checked grid nct_ncp, 1e-11
 */
export function noncentralTParameter(t: number, df: number, p: number): number {
  requireFinite('t', t);
  requirePositive('df', df);
  if (!(p > 0 && p < 1)) throw new RangeError(`*p* must be strictly between 0 and 1; got ${p}`);
  if (p > 0.5) return 0 - parameterFor(-t, df, 1 - p);
  return parameterFor(t, df, p);
}
