import { largestSize, noSpread } from '../inference.ts';
import { requireScores } from '../scores.ts';

/** Which scores a rule's limits leave outside. */
export type Sides = 'both' | 'above' | 'below';

/** The two limits of an outlier rule; a score exactly on a limit is kept. */
export interface RuleLimits {
  /** Lower limit in the scores' unit; null with a reason where the rule has none. */
  readonly lower: number | null;
  /** Upper limit in the scores' unit; null with a reason where the rule has none. */
  readonly upper: number | null;
  /** The middle the rule measures from, in the scores' unit; null without scores. */
  readonly center: number | null;
  /** The spread it measures with, in the scores' unit; 0 where the scores do not spread, null where it is not defined. */
  readonly spread: number | null;
  /** Why the limits are null. */
  readonly reason?: string;
}

/**
 * Limits that do not exist, with the reason.
 * @param reason short clause shown to the reader
 * @param center middle of the scores, where it exists
 * @param spread spread of the scores, where it exists
 * @returns limits that are null
 * @source common practice
 * @checked by hand, exact
 */
export function noLimits(reason: string, center: number | null = null, spread: number | null = null): RuleLimits {
  return { lower: null, upper: null, center, spread, reason };
}

/**
 * Refuse anything that is not a finite number above 0.
 * @param value number to check
 * @param name name of the argument in the message
 * @throws RangeError when *value* is not a finite number above 0
 * @source common practice
 * @checked by hand
 */
export function requirePositive(value: number, name: string): void {
  if (!(value > 0) || value === Number.POSITIVE_INFINITY) {
    throw new RangeError(`*${name}* must be a finite number above 0; got ${value}`);
  }
}

/**
 * Limits at a multiple of a spread around a middle, or none when the spread is nothing but rounding.
 * @param x the scores (n of 1 or more), for the size of their rounding
 * @param center middle, in the scores' unit
 * @param spread spread, in the scores' unit
 * @param cutoff multiple of the spread, above 0
 * @param reason why there is no spread, when the scores are not all equal
 * @returns center -+ cutoff spread; limits null with a reason where the spread is 0
 * @source common practice
 * @checked by hand, exact
 */
export function limitsAround(
  x: Float64Array,
  center: number,
  spread: number,
  cutoff: number,
  reason: string,
): RuleLimits {
  if (noSpread(spread, largestSize(x))) return noLimits(zeroSpreadReason(x, reason), center, 0);
  const reach = cutoff * spread;
  return { lower: center - reach, upper: center + reach, center, spread };
}

/**
 * Why scores have no spread.
 * @param x scores (n of 1 or more)
 * @param otherwise the reason when they are not all equal
 * @returns short clause for the reader
 * @source common practice
 * @checked by hand, exact
 */
export function zeroSpreadReason(x: Float64Array, otherwise: string): string {
  if (x.length === 1) return 'one score has no spread';
  return x.every((value) => value === x[0]) ? 'all scores are equal' : otherwise;
}

/**
 * Mark the scores strictly outside two limits.
 * @param x scores (n, any unit)
 * @param limits lower and upper limit in the same unit; a null limit flags nothing on its side
 * @param sides which side counts: both, above or below
 * @returns n marks: 1 = strictly outside, 0 = kept; exactly on a limit is kept
 * @throws RangeError when *x* holds NaN or an infinity
 * @source common practice: only scores strictly beyond the limit are flagged
 * @checked by hand, exact
 */
export function flagOutside(
  x: Float64Array,
  limits: { readonly lower: number | null; readonly upper: number | null },
  sides: Sides = 'both',
): Uint8Array {
  requireScores(x, 0);
  const lower = sides === 'above' ? null : limits.lower;
  const upper = sides === 'below' ? null : limits.upper;
  const flags = new Uint8Array(x.length);
  for (let i = 0; i < x.length; i++) {
    const value = x[i] as number;
    if ((lower !== null && value < lower) || (upper !== null && value > upper)) flags[i] = 1;
  }
  return flags;
}
