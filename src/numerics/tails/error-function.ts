import { requireNumber } from './require.ts';

const ROOT_PI_INVERSE = 0.5641895835477563;

/** erf(x) for |x| <= 0.46875. */
function centre(x: number): number {
  const y = x * x;
  const top =
    (((0.18577770618460315 * y + 3.1611237438705655) * y + 113.86415415105016) * y + 377.485237685302) * y +
    3209.3775891384694;
  const bottom = (((y + 23.601290952344122) * y + 244.02463793444417) * y + 1282.6165260773723) * y + 2844.236833439171;
  return (x * top) / bottom;
}

/** exp(x^2) erfc(x) for 0.46875 <= x <= 4. */
function scaledMiddle(x: number): number {
  let top = 2.1531153547440383e-8 * x + 0.5641884969886701;
  top = (((top * x + 8.883149794388377) * x + 66.11919063714163) * x + 298.6351381974001) * x;
  top = (((top + 881.952221241769) * x + 1712.0476126340707) * x + 2051.0783778260716) * x + 1230.3393547979972;
  let bottom = (((x + 15.744926110709835) * x + 117.6939508913125) * x + 537.1811018620099) * x;
  bottom = (((bottom + 1621.3895745666903) * x + 3290.7992357334597) * x + 4362.619090143247) * x;
  bottom = (bottom + 3439.3676741437216) * x + 1230.3393548037495;
  return top / bottom;
}

/** exp(x^2) erfc(x) for x > 4. */
function scaledFar(x: number): number {
  const y = 1 / (x * x);
  let top = (0.016315387137302097 * y + 0.30532663496123236) * y + 0.36034489994980445;
  top = ((top * y + 0.12578172611122926) * y + 0.016083785148742275) * y + 0.0006587491615298378;
  let bottom = ((y + 2.568520192289822) * y + 1.8729528499234673) * y + 0.5279051029514285;
  bottom = (bottom * y + 0.06051834131244132) * y + 0.0023352049762686918;
  return (ROOT_PI_INVERSE - (y * top) / bottom) / x;
}

/**
 * exp(-scale * x^2) with the rounding of x^2 kept out of the exponent.
 * @param x any number
 * @param scale positive, a power of two
 * @returns 0..1
 * @source Cody 1969, section 4: x^2 = t^2 + (x - t)(x + t), t = x cut to sixteenths
 * @checked grid erf, 1e-11
 */
export function expOfMinusSquare(x: number, scale: number): number {
  const t = Math.trunc(x * 16) / 16;
  return Math.exp(-scale * t * t) * Math.exp(-scale * (x - t) * (x + t));
}

/**
 * Scaled complementary error function exp(x^2) erfc(x), which neither overflows nor underflows for x >= 0.
 * @param x at least 0
 * @returns 0..1
 * @source Cody 1969, rational Chebyshev approximations for the error function
 * @checked through erfc: grid erf, 1e-11
 */
export function erfcScaled(x: number): number {
  if (x > 4) return x > 1e8 ? ROOT_PI_INVERSE / x : scaledFar(x);
  return x > 0.46875 ? scaledMiddle(x) : Math.exp(x * x) * (1 - centre(x));
}

/**
 * Error function.
 * @param x any number
 * @returns -1..1
 * @throws RangeError if x is NaN
 * @source Cody 1969: erf(x) = 2 / sqrt(pi) * integral of exp(-t^2) from 0 to x
 * @checked grid erf, 1e-11
 */
export function erf(x: number): number {
  requireNumber('x', x);
  const size = Math.abs(x);
  if (size <= 0.46875) return centre(x);
  return Math.sign(x) * (size > 6 ? 1 : 1 - erfcScaled(size) * expOfMinusSquare(size, 1));
}

/**
 * Complementary error function, accurate where it is small.
 * @param x any number
 * @returns 0..2
 * @throws RangeError if x is NaN
 * @source Cody 1969: erfc(x) = 2 / sqrt(pi) * integral of exp(-t^2) from x to infinity
 * @checked grid erf, 1e-11 down to 2e-307
 */
export function erfc(x: number): number {
  requireNumber('x', x);
  if (x > 27.3) return 0;
  if (x > 0.46875) return erfcScaled(x) * expOfMinusSquare(x, 1);
  return x >= -0.46875 ? 1 - centre(x) : 2 - (x < -6 ? 0 : erfcScaled(-x) * expOfMinusSquare(x, 1));
}
