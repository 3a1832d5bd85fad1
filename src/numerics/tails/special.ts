import { upperHalfNormal } from './inverse-normal.ts';
import { polynomial } from './polynomial.ts';
import { requireNumber, requirePositive, requireProbability } from './require.ts';

export { erf, erfc } from './error-function.ts';

const HALF_LOG_TWO_PI = 0.9189385332046728;

/** (-1)^k (zeta(k) - 1) / k for k = 2, 3, ...: the series of log gamma about 2. */
const ABOUT_TWO = [
  0.3224670334241132, -0.0673523010531981, 0.020580808427784546, -0.007385551028673986, 0.0028905103307415234,
  -0.001192753911703261, 0.0005096695247430425, -0.00022315475845357939, 9.945751278180853e-5, -4.492623673813314e-5,
  2.050721277567069e-5, -9.439488275268397e-6, 4.374866789907488e-6, -2.039215753801366e-6, 9.55141213040742e-7,
  -4.492469198764566e-7, 2.1207184805554665e-7, -1.0043224823968099e-7, 4.7698101693639804e-8, -2.2711094608943164e-8,
  1.0838659214896955e-8, -5.183475041970047e-9, 2.4836745438024785e-9, -1.1921401405860912e-9, 5.731367241678862e-10,
  -2.7595228851242334e-10, 1.330476437424449e-10, -6.4229645638381e-11,
];
const ONE_MINUS_EULER = 0.42278433509846713;

/** The only positive root of digamma in two parts, and the Taylor coefficients there: psi^(k)(root) / k!. */
const DIGAMMA_ROOT = 1.4616321449683622;
const DIGAMMA_ROOT_REST = 9.549995429965697e-17;
const DIGAMMA_TAYLOR = [
  0.9676722454476212, -0.4427631689835921, 0.258499760955651, -0.16394270544240652, 0.10782405069126237,
  -0.07219956125645471, 0.04880428816414311, -0.03316112647484736, 0.022597648232218104, -0.01542476590494896,
  0.010538791616612175, -0.007204534386356869,
];

/** log gamma(2 + z) for |z| <= 0.5. */
function logGammaAboutTwo(z: number): number {
  return z * (ONE_MINUS_EULER + z * polynomial(ABOUT_TWO, z));
}

/** sin(pi x) for x >= 0 with the whole part of x removed before it is multiplied. */
function sinPi(x: number): number {
  const rest = x - 2 * Math.floor(x / 2);
  if (rest > 1) return -sinPi(rest - 1);
  return rest > 0.5 ? Math.sin(Math.PI * (1 - rest)) : Math.sin(Math.PI * rest);
}

/**
 * What Stirling's formula leaves out of log gamma(a + 1) at large arguments.
 * @param a at least 10
 * @returns the error term, about 1 / (12 a)
 * @source Loader 2000, equation 3: log gamma(a + 1) = (a + 1/2) log a - a + log(2 pi) / 2 + error
 * @checked through lgamma: grid lgamma, 1e-14
 */
export function stirlingSeries(a: number): number {
  const r = 1 / (a * a);
  const late = 1 / 1188 - r * (691 / 360360 - r * (1 / 156 - r * (3617 / 122400)));
  return (1 / 12 - r * (1 / 360 - r * (1 / 1260 - r * (1 / 1680 - r * late)))) / a;
}

function logGammaPositive(x: number): number {
  if (x >= 10) {
    // (x - 1/2) (log x - 1) keeps the two large terms of the formula from overflowing apart.
    return (x - 0.5) * (Math.log(x) - 1) - 0.5 + HALF_LOG_TWO_PI + stirlingSeries(x);
  }
  if (x > 2.5) {
    let product = 1;
    let y = x;
    while (y > 2.5) {
      y -= 1;
      product *= y;
    }
    return Math.log(product) + logGammaAboutTwo(y - 2);
  }
  if (x >= 1.5) return logGammaAboutTwo(x - 2);
  if (x >= 0.5) return logGammaAboutTwo(x - 1) - Math.log1p(x - 1);
  return logGammaAboutTwo(x) - Math.log1p(x) - Math.log(x);
}

/**
 * Natural logarithm of the absolute gamma function.
 * @param x any number except 0, -1, -2, ...
 * @returns log |gamma(x)|; Infinity where it exceeds the largest double
 * @throws RangeError if x is NaN or a pole
 * @source Stirling series from 10 on, else recurrence to 2 and the zeta series there; reflection for x < 0
 * @checked grid lgamma, 1e-14 max(1, |value|)
 */
export function lgamma(x: number): number {
  requireNumber('x', x);
  if (x === Infinity) return Infinity;
  if (x > 0) return logGammaPositive(x);
  if (Number.isInteger(x) || x === -Infinity) throw new RangeError(`*x* must not be a pole of gamma; got ${x}`);
  const sine = Math.abs(sinPi(-x));
  // A tiny sine times a tiny x would underflow as a product.
  return Math.log(Math.PI) - Math.log(sine) - Math.log(-x) - logGammaPositive(-x);
}

/**
 * Natural logarithm of gamma(1 + z), with full relative precision for a small z.
 * @param z above -1
 * @returns log gamma(1 + z)
 * @source zeta series about 2 for |z| <= 0.5, else log gamma
 * @checked by hand: -0.5772156649 z for a tiny z, 1e-15
 */
export function lgammaOnePlus(z: number): number {
  return Math.abs(z) <= 0.5 ? logGammaAboutTwo(z) - Math.log1p(z) : logGammaPositive(1 + z);
}

/** psi at positive arguments away from its root. */
function digammaPositive(x: number): number {
  let shift = 0;
  let y = x;
  while (y < 10) {
    shift += 1 / y;
    y += 1;
  }
  const r = 1 / (y * y);
  const late = 1 / 240 - r * (1 / 132 - r * (691 / 32760 - r * (1 / 12 - (r * 3617) / 8160)));
  return Math.log(y) - 0.5 / y - r * (1 / 12 - r * (1 / 120 - r * (1 / 252 - r * late))) - shift;
}

/**
 * Digamma function, the derivative of log gamma.
 * @param x any number except 0, -1, -2, ...
 * @returns psi(x)
 * @throws RangeError if x is NaN or a pole
 * @source asymptotic series from 10 on after recurrence; Taylor series about its positive root; reflection for x < 0
 * @checked grid digamma, 1e-11
 */
export function digamma(x: number): number {
  requireNumber('x', x);
  if (x === Infinity) return Infinity;
  if (x > 0) {
    const away = x - DIGAMMA_ROOT - DIGAMMA_ROOT_REST;
    if (Math.abs(away) < 0.05) return away * polynomial(DIGAMMA_TAYLOR, away);
    return digammaPositive(x);
  }
  if (Number.isInteger(x) || x === -Infinity) throw new RangeError(`*x* must not be a pole of digamma; got ${x}`);
  return digammaPositive(1 - x) + (Math.PI * sinPi(0.5 - x)) / sinPi(-x);
}

/**
 * Error of Stirling's formula for log gamma(a + 1), at any positive argument.
 * @param a above 0
 * @returns log gamma(a + 1) - (a + 1/2) log a + a - log(2 pi) / 2
 * @source Loader 2000, equation 3
 * @checked through the grids of gamma_cdf and beta_cdf, 1e-11
 */
export function stirlingError(a: number): number {
  if (a >= 10) return stirlingSeries(a);
  return logGammaPositive(a + 1) - (a + 0.5) * Math.log(a) + a - HALF_LOG_TWO_PI;
}

/**
 * Natural logarithm of the beta function.
 * @param a above 0, finite
 * @param b above 0, finite
 * @returns log of gamma(a) gamma(b) / gamma(a + b)
 * @throws RangeError unless a > 0 and b > 0
 * @source log gammas for small arguments, Stirling errors (Loader 2000) for large ones
 * @checked by hand and at B(1, n) = 1 / n, 1e-13
 */
export function logBeta(a: number, b: number): number {
  requirePositive('a', a);
  requirePositive('b', b);
  const small = Math.min(a, b);
  const large = Math.max(a, b);
  if (large < 10) return lgamma(small) + lgamma(large) - lgamma(small + large);
  const ratio = Math.log1p(small / large);
  const errors = stirlingSeries(large) - stirlingSeries(small + large);
  if (small < 10) return lgamma(small) + errors + small - small * (Math.log(large) + ratio) - (large - 0.5) * ratio;
  const balance = small * (Math.log(small / large) - ratio) - (large - 0.5) * ratio;
  return balance + errors + stirlingSeries(small) + HALF_LOG_TWO_PI - 0.5 * Math.log(small);
}

/**
 * Inverse of the complementary error function.
 * @param p 0..2
 * @returns x with erfc(x) = p; Infinity at 0 and -Infinity at 2
 * @throws RangeError unless 0 <= p <= 2
 * @source Wichura 1988, AS 241: erfc(x) = 2 P(Z > x sqrt 2)
 * @checked erfc of the result, 1e-13; grid norm_q
 */
export function erfcInverse(p: number): number {
  requireProbability('p / 2', p / 2);
  return p <= 1 ? upperHalfNormal(p / 2) / Math.SQRT2 : -upperHalfNormal((2 - p) / 2) / Math.SQRT2;
}
