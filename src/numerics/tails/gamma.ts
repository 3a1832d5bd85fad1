import { deviance } from './deviance.ts';
import { newtonOnLog } from './newton-on-log.ts';
import { normalQuantileUpper, normalUpper } from './normal.ts';
import { polynomial } from './polynomial.ts';
import { requireNumber, requirePositive, requireProbability } from './require.ts';
import { lgamma, lgammaOnePlus, stirlingError } from './special.ts';

const TWO_PI = 2 * Math.PI;
/** From this shape on the first correction of the uniform normal expansion is enough. */
const UNIFORM_FROM = 1e8;
/** Temme's first coefficient c0 as a series in eta. */
const TEMME = [-1 / 3, 1 / 12, -2 / 135, 1 / 864, 1 / 2835];

/**
 * Logarithm of x^shape e^-x / gamma(shape + 1).
 * @param x above 0, finite
 * @param shape above 0, finite
 * @returns the logarithm, which does not underflow
 * @source Loader 2000, equations 3 to 5
 * @checked through the grids of gamma and chi-square
 */
export function gammaLogPrefactor(x: number, shape: number): number {
  return -stirlingError(shape) - deviance(shape, x) - 0.5 * Math.log(TWO_PI * shape);
}

/** The same not as a logarithm. */
function prefactor(x: number, shape: number): number {
  return Math.exp(-stirlingError(shape) - deviance(shape, x)) / Math.sqrt(TWO_PI * shape);
}

/**
 * Lower tail over the prefactor, for x at most about the shape.
 * @param x above 0
 * @param shape above 0, finite
 * @returns 1 + x / (shape + 1) + x^2 / ((shape + 1)(shape + 2)) + ...
 * @source power series of the incomplete gamma function
 * @checked through the grids of gamma and chi-square
 */
export function gammaSeries(x: number, shape: number): number {
  let term = 1;
  let sum = 1;
  for (let n = 1; term > 1e-17 * sum; n++) {
    term *= x / (shape + n);
    sum += term;
  }
  return sum;
}

/**
 * Upper tail over the prefactor, for x at least about the shape.
 * @param x above 0
 * @param shape above 0, finite
 * @returns the ratio, above 0
 * @source continued fraction of the incomplete gamma function, by the modified Lentz method
 * @checked through the grids of gamma and chi-square
 */
export function gammaFraction(x: number, shape: number): number {
  let b = x + 1 - shape;
  let c = 1e300;
  let d = 1 / b;
  let h = d;
  for (let i = 1; ; i++) {
    const a = -i * (i - shape);
    b += 2;
    d = 1 / (a * d + b || 1e-300);
    c = b + a / c || 1e-300;
    const change = c * d;
    h *= change;
    if (Math.abs(change - 1) < 3e-16) return shape * h;
  }
}

/** Upper tail where it is the small rest of a lower tail near one: shape below 1 and x below 1.5. */
function upperOfSmallShape(x: number, shape: number): number {
  const rise = Math.expm1(shape * Math.log(x) - lgammaOnePlus(shape));
  let term = 1;
  let sum = 0;
  for (let n = 1; Math.abs(term) > 1e-18; n++) {
    term *= -x / n;
    sum += term / (shape + n);
  }
  return -rise - (1 + rise) * shape * sum;
}

/** Either tail for a very large shape. */
function uniform(x: number, shape: number, upper: boolean): number {
  const half = deviance(shape, x);
  const sign = x > shape ? 1 : -1;
  const eta = sign * Math.sqrt((2 * half) / shape);
  if (half > 800) return upper === x > shape ? 0 : 1;
  const correction = (Math.exp(-half) / Math.sqrt(TWO_PI * shape)) * polynomial(TEMME, eta);
  const z = sign * Math.sqrt(2 * half);
  return upper ? normalUpper(z) + correction : normalUpper(-z) - correction;
}

function tail(x: number, shape: number, upper: boolean): number {
  if (x <= 0 || x === Infinity) return x <= 0 === upper ? 1 : 0;
  if (shape >= UNIFORM_FROM) return shape === Infinity ? (upper ? 1 : 0) : uniform(x, shape, upper);
  if (shape < 1 && x < 1.5 && upper) return upperOfSmallShape(x, shape);
  const left = x < shape + (shape < 1 ? 0.5 : 1);
  const near = prefactor(x, shape);
  const small = near === 0 ? 0 : near * (left ? gammaSeries(x, shape) : gammaFraction(x, shape));
  return left === upper ? 1 - Math.min(small, 1) : small;
}

/**
 * Lower tail of the gamma distribution of scale 1.
 * @param x any number; 0 and below give 0
 * @param shape above 0; Infinity is its limit, 0
 * @returns P(X <= x)
 * @throws RangeError if x is NaN or shape is not positive
 * @source Loader 2000 (prefactor); power series for x < shape + 1, else continued fraction; Temme 1979 from shape 1e8 on
 * @checked grid gamma_cdf, 1e-11 (1e-10 where shape is 1e5 or more)
 */
export function gammaLower(x: number, shape: number): number {
  requireNumber('x', x);
  requirePositive('shape', shape);
  return tail(x, shape, false);
}

/**
 * Upper tail of the gamma distribution of scale 1.
 * @param x any number; 0 and below give 1
 * @param shape above 0; Infinity is its limit, 1
 * @returns P(X > x)
 * @throws RangeError if x is NaN or shape is not positive
 * @source Loader 2000 (prefactor); power series for x < shape + 1, else continued fraction; Temme 1979 from shape 1e8 on
 * @checked grid gamma_cdf, 1e-11 (1e-10 where shape is 1e5 or more)
 */
export function gammaUpper(x: number, shape: number): number {
  requireNumber('x', x);
  requirePositive('shape', shape);
  return tail(x, shape, true);
}

/** A first guess on the scale log x: Wilson & Hilferty 1931, or the leading term where that fails. */
function guess(small: number, shape: number, upper: boolean): number {
  const z = (upper ? 1 : -1) * normalQuantileUpper(small);
  const root = 1 - 1 / (9 * shape) + z / (3 * Math.sqrt(shape));
  if (upper) return shape < 1 ? Math.log(1 - Math.log(small)) : Math.log(shape) + 3 * Math.log(Math.max(root, 1));
  const leading = (Math.log(small) + lgamma(shape + 1)) / shape;
  return root < 0.3 ? leading : Math.max(leading, Math.log(shape) + 3 * Math.log(root));
}

function quantile(p: number, shape: number, pIsUpper: boolean): number {
  requireProbability('p', p);
  requirePositive('shape', shape);
  if (p === 0 || p === 1) return (p === 0) === pIsUpper ? Infinity : 0;
  if (shape === Infinity) return Infinity;
  const small = p <= 0.5 ? p : 1 - p;
  const upper = pIsUpper === p <= 0.5;
  const target = Math.log(small);
  const leading = (target + lgamma(shape + 1)) / shape;
  if (!upper && leading < -40) return Math.exp(leading);
  const at = (w: number) => {
    const x = Math.exp(w);
    const height = tail(x, shape, upper);
    return { value: Math.log(height) - target, slope: ((upper ? -shape : shape) * prefactor(x, shape)) / height };
  };
  return Math.exp(newtonOnLog(at, guess(small, shape, upper), !upper));
}

/**
 * Value of the gamma distribution of scale 1 with a given lower tail.
 * @param p 0..1
 * @param shape above 0; Infinity is its limit
 * @returns x with P(X <= x) = p; Infinity at 1
 * @throws RangeError unless 0 <= p <= 1 and shape > 0
 * @source safeguarded Newton on the log of the smaller tail, in log x
 * @checked grid gamma_q, 1e-11
 */
export function gammaQuantile(p: number, shape: number): number {
  return quantile(p, shape, false);
}

/**
 * Value of the gamma distribution of scale 1 with a given upper tail.
 * @param p 0..1
 * @param shape above 0; Infinity is its limit
 * @returns x with P(X > x) = p; Infinity at 0
 * @throws RangeError unless 0 <= p <= 1 and shape > 0
 * @source safeguarded Newton on the log of the smaller tail, in log x
 * @checked grid gamma_q, 1e-11
 */
export function gammaQuantileUpper(p: number, shape: number): number {
  return quantile(p, shape, true);
}
