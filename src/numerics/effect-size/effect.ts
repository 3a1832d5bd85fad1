/** What the effect sizes share. */
import { type Alternative, type Limits, limits, outside } from '../inference.ts';
import { noncentralTParameter } from '../tails/noncentral-t.ts';

/** An effect size with its interval; what cannot be computed is null, with a reason. */
export interface Effect {
  readonly value: number | null;
  readonly interval: Limits | null;
  readonly reason?: string;
}

/**
 * Interval of a standardized difference by inverting the noncentral t distribution.
 * @param t its t statistic, finite
 * @param df degrees of freedom, > 0
 * @param scale d = t / scale
 * @param level confidence level, between 0 and 1
 * @param alternative direction
 * @returns limits of the noncentrality for which t is at the outer tail, divided by `scale`
 * @throws RangeError when the level is out of range
 * @source Hedges & Olkin (1985), chapter 5: P(T <= t; lower limit) = 1 - alpha/2
 * @checked cases `cohens_d`, `cohens_d_paired`, rtol 1e-8
 */
export function noncentralInterval(
  t: number,
  df: number,
  scale: number,
  level: number,
  alternative: Alternative,
): Limits {
  const tail = outside(level, alternative);
  const low = alternative === 'less' ? Number.NaN : noncentralTParameter(t, df, 1 - tail) / scale;
  const high = alternative === 'greater' ? Number.NaN : noncentralTParameter(t, df, tail) / scale;
  return limits(low, high, alternative);
}

/**
 * Limits times a positive factor.
 * @param interval limits, null where there is none
 * @param factor factor, > 0
 * @returns the scaled limits
 * @source common practice
 * @checked by hand
 */
export function scaled(interval: Limits | null, factor: number): Limits | null {
  if (interval === null) return null;
  const [low, high] = interval;
  return [low === null ? null : factor * low, high === null ? null : factor * high];
}
