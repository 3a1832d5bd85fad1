import { mean, standardDeviation } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { tQuantileUpper, tUpper } from '../tails/t.ts';

/** Test of the most extreme score. */
export interface GrubbsTest {
  /** Largest distance from the mean in standard deviations; null with a reason where it is not defined. */
  readonly g: number | null;
  /** Value of g exceeded with probability *alpha* (bound) in a normal sample; null for fewer than 3 scores. */
  readonly critical: number | null;
  /** Two-sided p, at most 1. */
  readonly p: number | null;
  /** Index of the most extreme score (the first, when several are as far). */
  readonly index: number | null;
  /** n marks: 1 where g exceeds the critical value. */
  readonly flags: Uint8Array;
  /** Why g is null. */
  readonly reason?: string;
}

/**
 * Two-sided test whether the score furthest from the mean is too far for one normal sample.
 * @param x scores (n of 3 or more, any unit)
 * @param options alpha: level of the test, between 0 and 1 (.05)
 * @returns g, critical value, p, index and marks; null with a reason for fewer than 3 or equal scores
 * @throws RangeError when *x* holds NaN or an infinity or *alpha* is not between 0 and 1
 * @source Grubbs 1969, Technometrics 11, 1-21: G = max |x - mean| / s, critical (n-1)/sqrt(n) sqrt(t^2/(n-2+t^2)) with t at
 *   alpha / (2n), n-2 df; p = min(1, 2 n P(T > t)), t^2 = n (n-2) G^2 / ((n-1)^2 - n G^2)
 * @checked outside check cases grubbs_test, relative 1e-9
 */
export function grubbsTest(x: Float64Array, options: { readonly alpha?: number } = {}): GrubbsTest {
  const alpha = options.alpha ?? 0.05;
  requireScores(x, 0);
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`*alpha* must be between 0 and 1; got ${alpha}`);
  const n = x.length;
  const flags = new Uint8Array(n);
  if (n < 3) return { g: null, critical: null, p: null, index: null, flags, reason: 'fewer than 3 scores' };
  const t = tQuantileUpper(alpha / (2 * n), n - 2);
  const critical = ((n - 1) / Math.sqrt(n)) * Math.sqrt((t * t) / (n - 2 + t * t));
  const extreme = furthest(x);
  if (extreme === null) return { g: null, critical, p: null, index: null, flags, reason: 'all scores are equal' };
  const { distance: g, index } = extreme;
  const left = (n - 1) ** 2 - n * g * g;
  // With all other scores equal g is at its largest possible value and t is infinite.
  const p = left <= 0 ? 0 : Math.min(1, 2 * n * tUpper(Math.sqrt((n * (n - 2) * g * g) / left), n - 2));
  if (g > critical) flags[index] = 1;
  return { g, critical, p, index, flags };
}

/**
 * The score furthest from the mean, in standard deviations.
 * @param x scores (n, any unit)
 * @returns distance in SD (divisor n-1) and index (the first of equals); null when the scores do not spread
 * @source common practice; max |x - mean| / s
 * @checked by hand, 1e-15
 */
export function furthest(x: Float64Array): { distance: number; index: number } | null {
  if (x.length < 2 || x.every((value) => value === x[0])) return null;
  const center = mean(x);
  let index = 0;
  for (let i = 1; i < x.length; i++) if (Math.abs(x[i]! - center) > Math.abs(x[index]! - center)) index = i;
  return { distance: Math.abs(x[index]! - center) / standardDeviation(x), index };
}
