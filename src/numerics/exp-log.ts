/**
 * exp and log from + - * / and bit patterns only, so that every engine gives the same digits (the built-in ones differ
 * in the last place between engines).
 */

// ln 2 in two parts; the first ends in zeros, so that k times it is exact.
const LN2_HIGH = 0.6931471803691238;
const LN2_LOW = 1.9082149292705877e-10;

/** Coefficients 2 B_2n / (2n)! of r coth(r/2) = 2 + r^2/6 - r^4/360 + ..., B the Bernoulli numbers. */
const COTH = [1 / 6, -1 / 360, 1 / 15_120, -1 / 604_800, 1 / 23_950_080, -691 / 653_837_184_000, 1 / 37_362_124_800];

/** Coefficients of log((1+s)/(1-s)) / s - 2 over s^2: 2/3, 2/5, ... */
const ATANH = [2 / 3, 2 / 5, 2 / 7, 2 / 9, 2 / 11, 2 / 13, 2 / 15, 2 / 17, 2 / 19];

const SQRT_HALF = Math.SQRT1_2;

const bits = new DataView(new ArrayBuffer(8));

function horner(coefficients: readonly number[], at: number): number {
  let value = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) value = value * at + (coefficients[i] as number);
  return value;
}

/** x times 2^k for k from -1100 to 1100, by exact powers of two. */
function timesPowerOfTwo(x: number, k: number): number {
  if (k > 1023) return x * 2 ** 1023 * powerOfTwo(k - 1023);
  if (k < -1022) return x * powerOfTwo(k + 1000) * 2 ** -1000;
  return x * powerOfTwo(k);
}

/** 2^k for k from -1022 to 1023, written into the exponent field. */
function powerOfTwo(k: number): number {
  bits.setInt32(0, (k + 1023) << 20);
  bits.setInt32(4, 0);
  return bits.getFloat64(0);
}

/**
 * Portable exponential function.
 * @param x finite or infinite number
 * @returns e^x, within two units in the last place; 0 below -745.2, Infinity above 709.8
 * @throws RangeError when x is NaN
 * @source Tang (1989): x = k ln 2 + r, |r| <= ln 2 / 2, ln 2 in two parts; Taylor series of r / 2, squared
 * @checked agrees with a 40-digit series, 2 ulp
 */
export function portableExp(x: number): number {
  if (Number.isNaN(x)) throw new RangeError('*x* must be a number; got NaN');
  if (x > 709.782712893384) return Infinity;
  if (x < -745.133219101941) return 0;
  const k = Math.floor(x / Math.LN2 + 0.5);
  const high = x - k * LN2_HIGH;
  const low = k * LN2_LOW;
  const r = high - low;
  // e^r = 1 + r + r q / (2 - q), r - q the even series of r coth(r/2) - 2: the added term is small, so its error is too.
  const s = r * r;
  const q = r - s * horner(COTH, s);
  const value = 1 - (low - (r * q) / (2 - q) - high);
  return timesPowerOfTwo(value, k);
}

/**
 * Portable natural logarithm.
 * @param x number, >= 0
 * @returns log x, within two units in the last place; -Infinity at 0, Infinity at Infinity
 * @throws RangeError when x is negative or NaN
 * @source Tang (1990): x = 2^k m, sqrt(1/2) <= m < sqrt 2, s = (m-1)/(m+1), log m = 2s + 2s^3/3 + ..., ln 2 in two parts
 * @checked agrees with a 40-digit series, 2 ulp
 */
export function portableLog(x: number): number {
  if (!(x >= 0)) throw new RangeError(`*x* must be at least 0; got ${x}`);
  if (x === 0) return -Infinity;
  if (x === Infinity) return Infinity;
  let k = 0;
  if (x < 2 ** -1022) {
    x *= 2 ** 54;
    k = -54;
  }
  bits.setFloat64(0, x);
  const top = bits.getInt32(0);
  k += (top >> 20) - 1022;
  bits.setInt32(0, (top & 0xfffff) | (1022 << 20));
  let m = bits.getFloat64(0);
  if (m < SQRT_HALF) {
    m *= 2;
    k--;
  }
  const f = m - 1;
  const s = f / (2 + f);
  const z = s * s;
  const tail = z * horner(ATANH, z);
  // log(1 + f) = f - f^2/2 + s (f^2/2 + tail): f itself is exact.
  const half = (f * f) / 2;
  return k * LN2_HIGH - (half - (s * (half + tail) + k * LN2_LOW) - f);
}
