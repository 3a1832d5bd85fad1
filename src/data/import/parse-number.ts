import { COMMA, DOT } from './bytes.ts';

const ZERO = 0x30;
const EXACT_POWERS = Float64Array.from({ length: 23 }, (_, power) => Number(`1e${power}`));
/** Digits a double holds whatever they are. */
const SAFE_DIGITS = 15;

/**
 * Reads bytes as one plain decimal number: sign (+, - or a real minus sign), digits with at most one decimal mark,
 * exponent. Nothing else is let in: no grouping, no hexadecimal, no infinity.
 *
 * @param bytes UTF-8 text
 * @param start first byte of the number
 * @param end one past its last byte
 * @param mark byte of the decimal mark, a dot or a comma
 * @returns the double nearest to the number, or NaN where the bytes are not one or it is beyond the largest double
 * @source W. D. Clinger 1990, How to read floating point numbers accurately, section 4: with at most 15 digits and a
 *   power of ten up to 22 one multiplication or division of exact doubles is correctly rounded
 * @checked against Number(text), exactly
 */
export function parseNumber(bytes: Uint8Array, start: number, end: number, mark: number): number {
  let at = start;
  let negative = false;
  const sign = bytes[at];
  if (sign === 0x2d || sign === 0x2b) {
    negative = sign === 0x2d;
    at++;
  } else if (sign === 0xe2 && bytes[at + 1] === 0x88 && bytes[at + 2] === 0x92) {
    negative = true;
    at += 3;
  }
  const digits = at;
  let value = 0;
  let decimals = 0;
  let marks = 0;
  for (; at < end; at++) {
    const digit = (bytes[at] as number) - ZERO;
    if (digit >= 0 && digit < 10) {
      value = value * 10 + digit;
      decimals += marks;
    } else if (bytes[at] === mark && marks === 0) marks = 1;
    else break;
  }
  const count = at - digits - marks;
  if (count <= 0) return Number.NaN;
  let power = -decimals;
  if (at < end) {
    const exponent = parseExponent(bytes, at, end);
    if (Number.isNaN(exponent)) return exponent;
    power += exponent;
  }
  if (count > SAFE_DIGITS || power < -22 || power > 22) return slowNumber(bytes, digits, end, mark, negative);
  if (value === 0) return 0;
  if (power !== 0) {
    const scale = EXACT_POWERS[Math.abs(power)] as number;
    value = power < 0 ? value / scale : value * scale;
  }
  return negative ? -value : value;
}

/** The exponent written at `at` ("e-05"), or NaN. */
function parseExponent(bytes: Uint8Array, at: number, end: number): number {
  if (bytes[at] !== 0x65 && bytes[at] !== 0x45) return Number.NaN;
  at++;
  const sign = bytes[at];
  if (sign === 0x2d || sign === 0x2b) at++;
  if (at >= end) return Number.NaN;
  let value = 0;
  for (; at < end; at++) {
    const digit = (bytes[at] as number) - ZERO;
    if (digit < 0 || digit > 9) return Number.NaN;
    value = Math.min(value * 10 + digit, 100_000);
  }
  return sign === 0x2d ? -value : value;
}

/** The shape is known to be right; the engine rounds it. */
function slowNumber(bytes: Uint8Array, start: number, end: number, mark: number, negative: boolean): number {
  let text = negative ? '-' : '';
  for (let i = start; i < end; i++) text += String.fromCharCode(bytes[i] === mark ? DOT : (bytes[i] as number));
  const value = Number(text);
  if (value === 0) return 0;
  return Number.isFinite(value) ? value : Number.NaN;
}

/**
 * Whether bytes write a whole number that a double does not give back, as long participant codes do.
 *
 * @param bytes UTF-8 text of a number
 * @param start its first byte
 * @param end one past its last byte
 * @param value the double it was read as
 * @returns true where the double is at or beyond 2^53, the text has no decimal mark and no exponent, and the double's
 *   shortest form is another text
 */
export function losesDigits(bytes: Uint8Array, start: number, end: number, value: number): boolean {
  if (!(Math.abs(value) >= 2 ** 53)) return false;
  let digits = '';
  for (let i = end - 1; i >= start; i--) {
    const digit = (bytes[i] as number) - ZERO;
    if (digit >= 0 && digit < 10) digits = digit + digits;
    else if (bytes[i] === DOT || bytes[i] === COMMA || bytes[i] === 0x65 || bytes[i] === 0x45) return false;
  }
  return digits.replace(/^0+/, '') !== String(Math.abs(value));
}

/**
 * Reads a field that is a number written plainly: a minus sign perhaps, digits, a decimal mark perhaps, digits; no
 * leading zero, no exponent, no quotation marks; at most 19 digits, of whole numbers at most 15.
 *
 * @param bytes UTF-8 text
 * @param start first byte of the field
 * @param stops 1 for each byte that ends a field
 * @param mark byte of the decimal mark, a dot or a comma
 * @param values gets the number at [row], or NaN where the field is anything else
 * @param row index into the values
 * @returns index of the byte that ends the field, or start where it is anything else
 * @source as parseNumber; beyond 15 digits divideLong
 * @checked against Number(text), exactly
 */
export function scanNumber(
  bytes: Uint8Array,
  start: number,
  stops: Uint8Array,
  mark: number,
  values: Float64Array,
  row: number,
): number {
  const length = bytes.length;
  const negative = start < length && bytes[start] === 0x2d;
  const begin = negative ? start + 1 : start;
  const safe = begin + SAFE_DIGITS;
  let at = begin;
  let value = 0;
  let tail = 0;
  let point = -1;
  for (; at < length; at++) {
    const byte = bytes[at] as number;
    const digit = byte - ZERO;
    if (digit >= 0 && digit < 10) {
      if (at < safe) value = value * 10 + digit;
      else tail = tail * 10 + digit;
    } else if (byte === mark && point < 0) point = at;
    else break;
  }
  const decimals = point < 0 ? 0 : at - point - 1;
  const count = at - begin - (point < 0 ? 0 : 1);
  const leadingZero = count > 1 && bytes[begin] === ZERO && point !== begin + 1;
  const long = at > safe;
  const isPlain = count > 0 && !leadingZero && (at >= length || stops[bytes[at] as number] === 1);
  if (!isPlain || (long && (point < 0 || point >= safe || count > 19))) {
    values[row] = Number.NaN;
    return start;
  }
  if (long) value = divideLong(value, at - safe, tail, decimals);
  else if (decimals > 0) value /= EXACT_POWERS[decimals] as number;
  values[row] = negative && value !== 0 ? -value : value;
  return Number.isNaN(value) ? start : at;
}

/**
 * The double nearest to (head * 10^more + tail) / 10^decimals.
 *
 * @param head whole number below 10^15
 * @param more digits of the tail, 1 to 5
 * @param tail whole number below 10^more
 * @param decimals 1 to 22
 * @returns the quotient, or NaN where the arithmetic cannot tell which of two neighbours is nearer
 * @source T. J. Dekker 1971, A floating-point technique for extending the available precision, sections 4 and 5
 *   (product and quotient of doubled precision); A. Ziv 1991 (round only where the error cannot change the result)
 * @checked against Number(text), exactly
 */
export function divideLong(head: number, more: number, tail: number, decimals: number): number {
  const scale = EXACT_POWERS[more] as number;
  const divisor = EXACT_POWERS[decimals] as number;
  const product = head * scale;
  // Both parts are small whole numbers, so their sum is exact.
  const rest = productError(head, scale, product) + tail;
  const high = product + rest;
  const low = rest - (high - product);
  const quotient = high / divisor;
  const back = quotient * divisor;
  const remainder = high - back - productError(quotient, divisor, back) + low;
  const correction = remainder / divisor;
  const slack = Math.abs(correction) * 2 ** -40 + quotient * 2 ** -95;
  const result = quotient + (correction + slack);
  return result === quotient + (correction - slack) ? result : Number.NaN;
}

/** a * b minus its rounded value, exactly. */
function productError(a: number, b: number, product: number): number {
  const splitA = a * 134217729;
  const highA = splitA - (splitA - a);
  const lowA = a - highA;
  const splitB = b * 134217729;
  const highB = splitB - (splitB - b);
  const lowB = b - highB;
  return lowA * lowB - (product - highA * highB - lowA * highB - highA * lowB);
}
