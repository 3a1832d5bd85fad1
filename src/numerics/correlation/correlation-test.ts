import { type Alternative, type Limits, largestSize, limits, noSpread, outside, tP } from '../inference.ts';
import { covariance, sumOfSquares } from '../moments.ts';
import { normalQuantileUpper } from '../tails/normal.ts';

/** A correlation with its t test; what cannot be computed is null, with a reason. */
export interface Correlation {
  /** Between -1 and 1. */
  readonly r: number | null;
  /** Pairs. */
  readonly n: number;
  readonly t: number | null;
  readonly df: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * A correlation that cannot be computed.
 * @param n pairs
 * @param reason short clause for the reader
 * @param r the correlation, where only its test is missing
 * @returns nulls with the reason
 * @source common practice
 * @checked by hand
 */
export function noCorrelation(n: number, reason: string, r: number | null = null): Correlation {
  return { r, n, t: null, df: null, p: null, reason };
}

/**
 * Product-moment correlation without test.
 * @param x scores (n of 2 or more)
 * @param y scores paired with *x*
 * @returns r between -1 and 1, or null with the name of the vector that does not vary
 * @throws RangeError when lengths differ, fewer than two pairs or a score is not finite
 * @source Pearson 1896: sum (x - mean x)(y - mean y) / sqrt(SS_x SS_y)
 * @checked outside check cases pearson_correlation, relative 1e-9
 */
export function productMoment(x: Float64Array, y: Float64Array): { r: number } | { r: null; flat: 'x' | 'y' } {
  const n = x.length;
  const together = covariance(x, y);
  const sx = Math.sqrt(sumOfSquares(x) / (n - 1));
  const sy = Math.sqrt(sumOfSquares(y) / (n - 1));
  if (noSpread(sx, largestSize(x))) return { r: null, flat: 'x' };
  if (noSpread(sy, largestSize(y))) return { r: null, flat: 'y' };
  return { r: Math.max(-1, Math.min(1, together / sx / sy)) };
}

/**
 * t test of a correlation against 0.
 * @param r correlation, between -1 and 1
 * @param n pairs, 3 or more
 * @param df degrees of freedom, above 0
 * @param alternative 'greater': positive correlation
 * @returns t = r sqrt((n - 2) / (1 - r^2)) and its p on *df*; when |r| = 1 t is null with a reason and p its limit
 * @throws RangeError when *df* is not above 0
 * @source Fisher 1915, Biometrika 10, 507-521
 * @checked outside check cases pearson_correlation, relative 1e-9
 */
export function correlationTest(r: number, n: number, df: number, alternative: Alternative = 'two-sided'): Correlation {
  const rest = (1 - r) * (1 + r);
  if (rest <= 4 * Number.EPSILON) {
    const against = alternative === 'greater' ? r < 0 : alternative === 'less' && r > 0;
    return { r, n, t: null, df, p: against ? 1 : 0, reason: 'the pairs lie exactly on a line: t has no finite value' };
  }
  const t = r * Math.sqrt((n - 2) / rest);
  return { r, n, t, df, p: tP(t, df, alternative) };
}

/**
 * Interval of a product-moment correlation.
 * @param r correlation, strictly between -1 and 1
 * @param n pairs, 4 or more
 * @param options level (.95) and direction
 * @returns limits between -1 and 1, null where there is none
 * @throws RangeError when the level is not between 0 and 1
 * @source Fisher 1921, Metron 1, 3-32: atanh(r) -+ z / sqrt(n - 3)
 * @checked outside check cases pearson_correlation, relative 1e-9
 */
export function fisherInterval(
  r: number,
  n: number,
  options: { readonly level?: number; readonly alternative?: Alternative } = {},
): Limits {
  const { level = 0.95, alternative = 'two-sided' } = options;
  const reach = normalQuantileUpper(outside(level, alternative)) / Math.sqrt(n - 3);
  return limits(Math.tanh(Math.atanh(r) - reach), Math.tanh(Math.atanh(r) + reach), alternative);
}
