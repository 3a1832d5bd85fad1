import { betaFraction, betaLogPrefactor } from './beta.ts';
import { fLower, fUpper } from './f.ts';
import { fallingRoot } from './falling-root.ts';
import { gammaFraction, gammaLogPrefactor, gammaSeries } from './gamma.ts';
import { normalQuantile, normalQuantileUpper } from './normal.ts';
import { poissonLower, poissonUpper, type StepFamily } from './poisson-mixture.ts';
import { requireNumber, requirePositive } from './require.ts';

function check(x: number, df1: number, df2: number, ncp: number): void {
  requireNumber('x', x);
  requirePositive('df1', df1);
  requirePositive('df2', df2);
  if (!(ncp >= 0 && ncp < Infinity)) throw new RangeError(`*ncp* must be at least 0 and finite; got ${ncp}`);
}

/** Beta tails of first shape df1 / 2 + j at the share of the numerator. */
function betaFamily(x: number, df1: number, df2: number): StepFamily {
  const odds = (df1 / df2) * x;
  const share = odds > 1 ? 1 / (1 + 1 / odds) : odds / (1 + odds);
  const rest = 1 / (1 + odds);
  const a = 0.5 * df1;
  const b = 0.5 * df2;
  return {
    logTerm: (j) => betaLogPrefactor(share, rest, a + j, b) - Math.log(a + j),
    ratio: (j) => (share * (a + j + b)) / (a + j + 1),
    lowerOverTerm: (j) => (a + j) / betaFraction(share, rest, a + j, b),
    upperOverTerm: (j) => (a + j) / betaFraction(rest, share, b, a + j),
  };
}

/** Gamma tails of shape df1 / 2 + j: the limit of infinite denominator degrees of freedom. */
function gammaFamily(x: number, df1: number): StepFamily {
  const z = 0.5 * df1 * x;
  const a = 0.5 * df1;
  return {
    logTerm: (j) => gammaLogPrefactor(z, a + j),
    ratio: (j) => z / (a + j + 1),
    lowerOverTerm: (j) => gammaSeries(z, a + j),
    upperOverTerm: (j) => gammaFraction(z, a + j),
  };
}

function tail(x: number, df1: number, df2: number, ncp: number, upper: boolean): number {
  if (ncp === 0 || df1 === Infinity || x <= 0 || x === Infinity)
    return upper ? fUpper(x, df1, df2) : fLower(x, df1, df2);
  const family = df2 === Infinity ? gammaFamily(x, df1) : betaFamily(x, df1, df2);
  // The tail away from the middle is summed; the other, about one half or more, is its complement.
  const far = x > 1 + ncp / df1;
  const near = far ? poissonUpper(family, 0.5 * ncp) : poissonLower(family, 0.5 * ncp);
  return far === upper ? near : 1 - near;
}

/**
 * Lower tail of the noncentral F distribution.
 * @param x any number; 0 and below give 0
 * @param df1 numerator degrees of freedom, above 0, Infinity allowed
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @param ncp noncentrality of the numerator, at least 0
 * @returns P(X <= x)
 * @throws RangeError on a wrong argument
 * @source sum of Poisson(j; ncp / 2) I_u(df1 / 2 + j, df2 / 2), u = df1 x / (df1 x + df2)
 * @checked grid ncf_cdf, 1e-11
 */
export function noncentralFLower(x: number, df1: number, df2: number, ncp: number): number {
  check(x, df1, df2, ncp);
  return tail(x, df1, df2, ncp, false);
}

/**
 * Upper tail of the noncentral F distribution.
 * @param x any number; 0 and below give 1
 * @param df1 numerator degrees of freedom, above 0, Infinity allowed
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @param ncp noncentrality of the numerator, at least 0
 * @returns P(X > x)
 * @throws RangeError on a wrong argument
 * @source sum of Poisson(j; ncp / 2) times the complements of I_u(df1 / 2 + j, df2 / 2), u = df1 x / (df1 x + df2)
 * @checked grid ncf_cdf, 1e-11
 */
export function noncentralFUpper(x: number, df1: number, df2: number, ncp: number): number {
  check(x, df1, df2, ncp);
  return tail(x, df1, df2, ncp, true);
}

/**
 * Noncentrality at which an F value has a given lower tail: one limit of the interval of a proportion of variance.
 * @param x any finite number above 0
 * @param df1 numerator degrees of freedom, above 0, finite
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @param p strictly between 0 and 1
 * @returns ncp with P(X <= x) = p; it falls as p rises; 0 where the central lower tail is already below p
 * @throws RangeError on a wrong argument
 * @source false position on the normal quantile of the smaller tail, in the root of ncp
 * @checked grid ncf_ncp, 1e-11
 */
export function noncentralFParameter(x: number, df1: number, df2: number, p: number): number {
  check(x, df1, df2, 0);
  if (!(x > 0 && x < Infinity)) throw new RangeError(`*x* must be above 0 and finite; got ${x}`);
  if (df1 === Infinity) throw new RangeError('*df1* must be finite; got Infinity');
  if (!(p > 0 && p < 1)) throw new RangeError(`*p* must be strictly between 0 and 1; got ${p}`);
  const aim = normalQuantile(p);
  const miss = (root: number) => {
    const at =
      p > 0.5
        ? normalQuantileUpper(tail(x, df1, df2, root * root, true))
        : normalQuantile(tail(x, df1, df2, root * root, false));
    return at - aim;
  };
  const root = fallingRoot(miss, Math.sqrt(df1 * x) - aim, 0.3 + 0.1 * Math.sqrt((df1 * x) / df2), 0);
  return root === null ? 0 : root * root;
}
