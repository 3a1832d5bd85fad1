import { betaLogit, betaTail } from './beta.ts';
import { chiSquareLower, chiSquareQuantile, chiSquareQuantileUpper, chiSquareUpper } from './chi-square.ts';
import { requireNumber, requirePositive, requireProbability } from './require.ts';

function check(df1: number, df2: number): void {
  requirePositive('df1', df1);
  requirePositive('df2', df2);
}

function tail(x: number, df1: number, df2: number, upper: boolean): number {
  requireNumber('x', x);
  check(df1, df2);
  if (x <= 0 || x === Infinity) return x <= 0 === upper ? 1 : 0;
  if (df1 === Infinity && df2 === Infinity) return x >= 1 === upper ? 0 : 1;
  if (df2 === Infinity) return upper ? chiSquareUpper(df1 * x, df1) : chiSquareLower(df1 * x, df1);
  if (df1 === Infinity) return upper ? chiSquareLower(df2 / x, df2) : chiSquareUpper(df2 / x, df2);
  const odds = (df1 / df2) * x;
  // Both forms are needed: the ratio may leave the range of a double at either end.
  const share = odds > 1 ? 1 / (1 + 1 / odds) : odds / (1 + odds);
  return betaTail(share, 1 / (1 + odds), 0.5 * df1, 0.5 * df2, upper);
}

/**
 * Lower tail of the F distribution.
 * @param x any number; 0 and below give 0
 * @param df1 numerator degrees of freedom, above 0, Infinity allowed
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @returns P(X <= x)
 * @throws RangeError if x is NaN or a df is not positive
 * @source I_u(df1 / 2, df2 / 2) with u = df1 x / (df1 x + df2)
 * @checked grid f_cdf, 1e-11 (1e-10 where a df is 1e5 or more)
 */
export function fLower(x: number, df1: number, df2: number): number {
  return tail(x, df1, df2, false);
}

/**
 * Upper tail of the F distribution.
 * @param x any number; 0 and below give 1
 * @param df1 numerator degrees of freedom, above 0, Infinity allowed
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @returns P(X > x)
 * @throws RangeError if x is NaN or a df is not positive
 * @source the complement of I_u(df1 / 2, df2 / 2) with u = df1 x / (df1 x + df2)
 * @checked grid f_cdf, 1e-11 (1e-10 where a df is 1e5 or more)
 */
export function fUpper(x: number, df1: number, df2: number): number {
  return tail(x, df1, df2, true);
}

function quantile(p: number, df1: number, df2: number, upper: boolean): number {
  requireProbability('p', p);
  check(df1, df2);
  if (p === 0 || p === 1) return (p === 0) === upper ? Infinity : 0;
  if (df1 === Infinity && df2 === Infinity) return 1;
  if (df2 === Infinity) return (upper ? chiSquareQuantileUpper(p, df1) : chiSquareQuantile(p, df1)) / df1;
  if (df1 === Infinity) return df2 / (upper ? chiSquareQuantile(p, df2) : chiSquareQuantileUpper(p, df2));
  return Math.exp(betaLogit(p, 0.5 * df1, 0.5 * df2, upper) + Math.log(df2 / df1));
}

/**
 * Value of the F distribution with a given lower tail.
 * @param p 0..1
 * @param df1 numerator degrees of freedom, above 0, Infinity allowed
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @returns x with P(X <= x) = p; Infinity at 1
 * @throws RangeError unless 0 <= p <= 1 and both df are positive
 * @source beta quantile on the scale log(u / (1 - u)) = log(df1 x / df2)
 * @checked grid f_q, 1e-11
 */
export function fQuantile(p: number, df1: number, df2: number): number {
  return quantile(p, df1, df2, false);
}

/**
 * Value of the F distribution with a given upper tail.
 * @param p 0..1
 * @param df1 numerator degrees of freedom, above 0, Infinity allowed
 * @param df2 denominator degrees of freedom, above 0, Infinity allowed
 * @returns x with P(X > x) = p; Infinity at 0
 * @throws RangeError unless 0 <= p <= 1 and both df are positive
 * @source beta quantile on the scale log(u / (1 - u)) = log(df1 x / df2)
 * @checked grid f_q, 1e-11
 */
export function fQuantileUpper(p: number, df1: number, df2: number): number {
  return quantile(p, df1, df2, true);
}
