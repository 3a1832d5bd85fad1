import { chiLogDensity } from './chi-mixture.ts';
import { fallingRoot } from './falling-root.ts';
import { normalQuantile, normalQuantileUpper } from './normal.ts';
import { normalRangeLower, normalRangeUpper } from './normal-range.ts';
import { requireInteger, requireNumber, requirePositive, requireProbability } from './require.ts';
import { tQuantileUpper } from './t.ts';

/** From here on the spread of chi over its root df is lost beside that of the range. */
const NORMAL_FROM = 1e14;

function check(k: number, df: number): void {
  requireInteger('k', k, 2);
  requirePositive('df', df);
}

/** Trapezoid sum over w = log s from a starting place outward; the terms have one peak. */
function mixture(range: (w: number, k: number) => number, q: number, k: number, df: number, start: number): number {
  const logDensity = chiLogDensity(df);
  const at = (w: number) => {
    const log = logDensity(w);
    return log < -745 ? 0 : Math.exp(log) * range(q * Math.exp(w), k);
  };
  // Both the spread of S and the bend of the range's tail set how fine the steps must be.
  const bend = 2 + Math.min(q * Math.exp(start), 40);
  const step = Math.min(0.12, 0.6 / Math.sqrt(2 * (df + k) + bend * bend));
  let sum = at(start);
  for (const direction of [-step, step]) {
    let previous = sum;
    for (let i = 1; i < 1e6; i++) {
      const term = at(start + i * direction);
      sum += term;
      if (term <= 1e-17 * sum && term <= previous) break;
      previous = term;
    }
  }
  return Math.min(1, sum * step);
}

function lower(q: number, k: number, df: number): number {
  if (q <= 0 || q === Infinity) return q <= 0 ? 0 : 1;
  if (df >= NORMAL_FROM) return normalRangeLower(q, k);
  return mixture(normalRangeLower, q, k, df, q < 2 ? 0.5 * Math.log1p((k - 1) / df) : 0);
}

function upper(q: number, k: number, df: number): number {
  if (q <= 0 || q === Infinity) return q <= 0 ? 1 : 0;
  if (df >= NORMAL_FROM) return normalRangeUpper(q, k);
  // The range's tail falls like exp(-w^2 / 4), which puts the peak here.
  return mixture(normalRangeUpper, q, k, df, -0.5 * Math.log1p((0.5 * q * q) / df));
}

/**
 * Lower tail of the studentized range.
 * @param q range over its independent standard error; 0 and below give 0
 * @param k number of means, whole, at least 2
 * @param df degrees of freedom of the standard error, above 0, fractions and Infinity allowed
 * @returns P(Q <= q)
 * @throws RangeError if q is NaN, k is not a whole number above 1 or df is not positive
 * @source definition: the range's lower tail at q s averaged over s, by the trapezoid rule in log s
 * @checked grid tukey_cdf, 1e-9
 */
export function studentizedRangeLower(q: number, k: number, df: number): number {
  requireNumber('q', q);
  check(k, df);
  return lower(q, k, df);
}

/**
 * Upper tail of the studentized range, from positive terms.
 * @param q range over its independent standard error; 0 and below give 1
 * @param k number of means, whole, at least 2
 * @param df degrees of freedom of the standard error, above 0, fractions and Infinity allowed
 * @returns P(Q > q)
 * @throws RangeError if q is NaN, k is not a whole number above 1 or df is not positive
 * @source definition: the range's upper tail at q s averaged over s, by the trapezoid rule in log s
 * @checked grid tukey_cdf, 1e-9
 */
export function studentizedRangeUpper(q: number, k: number, df: number): number {
  requireNumber('q', q);
  check(k, df);
  return upper(q, k, df);
}

/**
 * Value of the studentized range with a given lower tail.
 * @param p lower tail probability, 0..1
 * @param k number of means, whole, at least 2
 * @param df degrees of freedom of the standard error, above 0, fractions and Infinity allowed
 * @returns q with P(Q <= q) = p; Infinity at 1
 * @throws RangeError unless 0 <= p <= 1, k is a whole number above 1 and df > 0
 * @source false position on the normal quantile of the smaller tail, in log q
 * @checked grid tukey_q, 1e-9
 */
export function studentizedRangeQuantile(p: number, k: number, df: number): number {
  requireProbability('p', p);
  check(k, df);
  if (p === 0 || p === 1) return p === 0 ? 0 : Infinity;
  const aim = normalQuantile(p);
  const miss = (w: number) => {
    const q = Math.exp(w);
    return aim - (p > 0.5 ? normalQuantileUpper(upper(q, k, df)) : normalQuantile(lower(q, k, df)));
  };
  const guess = Math.SQRT2 * tQuantileUpper(Math.min(0.4, (1 - p) / (k * (k - 1))), df);
  const root = fallingRoot(miss, Math.log(guess), 0.1);
  if (root === null) throw new RangeError(`*p* must be far enough from 0 and 1; got ${p}`);
  return Math.exp(root);
}
