import { deviance } from './deviance.ts';
import { newtonOnLog } from './newton-on-log.ts';
import { normalQuantileUpper } from './normal.ts';
import { requirePositive, requireProbability } from './require.ts';
import { logBeta, stirlingError } from './special.ts';

const TWO_PI = 2 * Math.PI;
const TINY = 1e-300;
/** Stirling error of one half, which every t needs. */
const ERROR_OF_HALF = 0.15342640972002736;

function errorOf(a: number): number {
  return a === 0.5 ? ERROR_OF_HALF : stirlingError(a);
}

/**
 * Logarithm of x^a y^b / B(a, b).
 * @param x above 0, below 1
 * @param y 1 - x, given beside x so that neither loses digits
 * @param a above 0, finite
 * @param b above 0, finite
 * @returns the logarithm, which does not underflow
 * @source Loader 2000, equations 3 to 5: Stirling errors and deviances
 * @checked through the grids of beta, t, F and noncentral F
 */
export function betaLogPrefactor(x: number, y: number, a: number, b: number): number {
  const n = a + b;
  const exponent = errorOf(n) - errorOf(a) - errorOf(b) - deviance(a, n * x) - deviance(b, n * y);
  return exponent + 0.5 * Math.log((a / n) * (b / TWO_PI));
}

/** The same not as a logarithm, which saves the time of one. */
function prefactor(x: number, y: number, a: number, b: number): number {
  const n = a + b;
  const exponent = errorOf(n) - errorOf(a) - errorOf(b) - deviance(a, n * x) - deviance(b, n * y);
  return Math.sqrt((a / n) * (b / TWO_PI)) * Math.exp(exponent);
}

/**
 * Prefactor x^a y^b / B(a, b) over the lower tail, for x at most about the mean a / (a + b).
 * @param x above 0, below 1
 * @param y 1 - x
 * @param a above 0, finite
 * @param b above 0, finite
 * @returns the ratio, above 0
 * @throws RangeError if it does not end (both shapes beyond about 1e12)
 * @source Didonato & Morris 1992, equation 8: the even part of the continued fraction, by the modified Lentz method
 * @checked through the grids of beta, t, F and noncentral F
 */
export function betaFraction(x: number, y: number, a: number, b: number): number {
  const lead = a * y - b * x + 1;
  let f = (a * lead) / (a + 1);
  let c = f;
  let d = 0;
  let previous = 1 / (a + 1);
  for (let m = 1; m < 5_000_000; m++) {
    const following = 1 / (a + 2 * m + 1);
    const step = m * (b - m) * x * previous;
    const top = (a + m - 1) * (a + b + m - 1) * x * previous * step;
    const bottom = m + step + (a + m) * (lead + m * (1 + y)) * following;
    d = 1 / (bottom + top * d || TINY);
    c = bottom + top / c || TINY;
    const change = c * d;
    f *= change;
    if (Math.abs(change - 1) < 3e-16) return f;
    previous = following;
  }
  throw new RangeError(`*a* and *b* must be below about 1e12; got ${a} and ${b}`);
}

/**
 * Regularised incomplete beta function with both arguments given, either tail.
 * @param x 0..1
 * @param y 1 - x, given separately so that a small one keeps its digits
 * @param a above 0, finite
 * @param b above 0, finite
 * @param upper true for the upper tail
 * @returns I_x(a, b), or its complement I_y(b, a)
 * @throws RangeError if the continued fraction does not end (both shapes beyond about 1e12)
 * @source Loader 2000 (prefactor); continued fraction, Didonato & Morris 1992, equation 8, even part
 * @checked grid beta_cdf, 1e-11 (1e-10 where a shape is 1e5 or more)
 */
export function betaTail(x: number, y: number, a: number, b: number, upper: boolean): number {
  if (x <= 0 || y <= 0) return x <= 0 === upper ? 1 : 0;
  const left = x * (a + b + 2) <= a + 1;
  const near = left ? prefactor(x, y, a, b) : prefactor(y, x, b, a);
  const tail = near === 0 ? 0 : near / (left ? betaFraction(x, y, a, b) : betaFraction(y, x, b, a));
  return left === upper ? 1 - Math.min(tail, 1) : tail;
}

/** Where the lower tail is p <= 0.5, as log(x / y). */
function logitLower(p: number, a: number, b: number): number {
  const power = (Math.log(p) + Math.log(a) + logBeta(a, b)) / a;
  if (power + Math.log(Math.max(1, b)) < -40) return power;
  const middle = Math.log(a / b);
  const normal = middle - normalQuantileUpper(p) * Math.sqrt(1 / a + 1 / b);
  const start = p < 1e-3 || a < 1 ? Math.min(power, middle) : normal;
  const target = Math.log(p);
  const at = (w: number) => {
    const x = 1 / (1 + Math.exp(-w));
    const y = 1 / (1 + Math.exp(w));
    const tail = betaTail(x, y, a, b, false);
    return { value: Math.log(tail) - target, slope: prefactor(x, y, a, b) / tail };
  };
  return newtonOnLog(at, start, true);
}

/**
 * Quantile of the beta distribution on the scale log(x / (1 - x)), where neither end loses digits.
 * @param p tail probability, strictly between 0 and 1
 * @param a above 0, finite
 * @param b above 0, finite
 * @param upper whether p is an upper tail
 * @returns log(x / (1 - x))
 * @source safeguarded Newton on the log of the smaller tail; for a tiny x the leading term x^a / (a B(a, b))
 * @checked through the grids beta_q, t_q, f_q: 1e-11
 */
export function betaLogit(p: number, a: number, b: number, upper: boolean): number {
  const lower = upper ? p > 0.5 : p <= 0.5;
  const small = p <= 0.5 ? p : 1 - p;
  return lower ? logitLower(small, a, b) : -logitLower(small, b, a);
}

function check(x: number, a: number, b: number): void {
  requireProbability('x', x);
  for (const [name, shape] of [
    ['a', a],
    ['b', b],
  ] as const) {
    requirePositive(name, shape);
    if (shape === Infinity) throw new RangeError(`*${name}* must be finite; got Infinity`);
  }
}

/**
 * Lower tail of the beta distribution.
 * @param x 0..1
 * @param a first shape, above 0
 * @param b second shape, above 0
 * @returns P(X <= x) = I_x(a, b)
 * @throws RangeError unless 0 <= x <= 1 and both shapes are positive and finite
 * @source Didonato & Morris 1992; Loader 2000
 * @checked grid beta_cdf, 1e-11 (1e-10 where a shape is 1e5 or more)
 */
export function betaLower(x: number, a: number, b: number): number {
  check(x, a, b);
  return betaTail(x, 1 - x, a, b, false);
}

/**
 * Upper tail of the beta distribution.
 * @param x 0..1
 * @param a first shape, above 0
 * @param b second shape, above 0
 * @returns P(X > x) = I_(1-x)(b, a)
 * @throws RangeError unless 0 <= x <= 1 and both shapes are positive and finite
 * @source Didonato & Morris 1992; Loader 2000
 * @checked grid beta_cdf, 1e-11 (1e-10 where a shape is 1e5 or more)
 */
export function betaUpper(x: number, a: number, b: number): number {
  check(x, a, b);
  return betaTail(x, 1 - x, a, b, true);
}

function quantile(p: number, a: number, b: number, upper: boolean): number {
  requireProbability('p', p);
  check(0, a, b);
  if (p === 0 || p === 1) return (p === 0) === upper ? 1 : 0;
  const w = betaLogit(p, a, b, upper);
  return w > 0 ? 1 / (1 + Math.exp(-w)) : Math.exp(w) / (1 + Math.exp(w));
}

/**
 * Value of the beta distribution with a given lower tail.
 * @param p 0..1
 * @param a first shape, above 0
 * @param b second shape, above 0
 * @returns x with P(X <= x) = p; 0 or 1 where it is nearer to them than a double can be
 * @throws RangeError on a wrong argument
 * @source safeguarded Newton on the log of the smaller tail, in log(x / (1 - x))
 * @checked grid beta_q, 1e-11
 */
export function betaQuantile(p: number, a: number, b: number): number {
  return quantile(p, a, b, false);
}

/**
 * Value of the beta distribution with a given upper tail.
 * @param p 0..1
 * @param a first shape, above 0
 * @param b second shape, above 0
 * @returns x with P(X > x) = p; 0 or 1 where it is nearer to them than a double can be
 * @throws RangeError on a wrong argument
 * @source safeguarded Newton on the log of the smaller tail, in log(x / (1 - x))
 * @checked grid beta_q, 1e-11
 */
export function betaQuantileUpper(p: number, a: number, b: number): number {
  return quantile(p, a, b, true);
}
