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
 * Reads a field that is a number written plainly: a minus sign perhaps, digits, a decimal mark perhaps, digits; at most
 * 15 of them, no leading zero, no exponent, no quotation marks.
 *
 * @param bytes UTF-8 text
 * @param start first byte of the field
 * @param stops 1 for each byte that ends a field
 * @param mark byte of the decimal mark, a dot or a comma
 * @param values gets the number at [row], or NaN where the field is anything else
 * @param row index into the values
 * @returns index of the byte that ends the field, or start where it is anything else
 * @source as parseNumber
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
  let at = begin;
  let value = 0;
  let point = -1;
  for (; at < length; at++) {
    const byte = bytes[at] as number;
    const digit = byte - ZERO;
    if (digit >= 0 && digit < 10) value = value * 10 + digit;
    else if (byte === mark && point < 0) point = at;
    else break;
  }
  const decimals = point < 0 ? 0 : at - point - 1;
  const count = at - begin - (point < 0 ? 0 : 1);
  const leadingZero = count > 1 && bytes[begin] === ZERO && point !== begin + 1;
  if (count < 1 || count > SAFE_DIGITS || leadingZero || (at < length && stops[bytes[at] as number] === 0)) {
    values[row] = Number.NaN;
    return start;
  }
  if (decimals > 0) value /= EXACT_POWERS[decimals] as number;
  values[row] = negative && value !== 0 ? -value : value;
  return at;
}
