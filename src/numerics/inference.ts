/** What every test of one quantity shares: options, degenerate spread, and p and interval from t or normal. */
import { normalLower, normalQuantileUpper, normalUpper } from './tails/normal.ts';
import { tLower, tQuantileUpper, tTwoSided, tUpper } from './tails/t.ts';

/** Which departures from the null value count: 'greater' = the (first) quantity is larger. */
export type Alternative = 'two-sided' | 'greater' | 'less';

/** [lower, upper]; null = no limit on that side. */
export type Limits = readonly [number | null, number | null];

export interface TestOptions {
  /** Default 'two-sided'. */
  readonly alternative?: Alternative;
  /** Confidence level of the interval, between 0 and 1 (default .95). */
  readonly level?: number;
}

/** A t test of one quantity; what cannot be computed is null, with a reason. */
export interface TTest {
  readonly estimate: number | null;
  readonly se: number | null;
  readonly df: number | null;
  readonly t: number | null;
  readonly p: number | null;
  readonly interval: Limits | null;
  readonly reason?: string;
}

/**
 * Refuses a confidence level outside (0, 1).
 * @param level confidence level
 * @throws RangeError when not strictly between 0 and 1
 * @source common practice
 * @checked by hand
 */
export function requireLevel(level: number): void {
  if (!(level > 0 && level < 1)) throw new RangeError(`*level* must be between 0 and 1; got ${level}`);
}

/**
 * Whether a spread is nothing but rounding error of the scores it comes from.
 * @param spread a standard deviation or standard error, >= 0
 * @param size largest |score| that entered it
 * @returns true when the spread is at most four units in the last place of that score
 * @source common practice: a difference of decimal scores carries an error of one such unit
 * @checked by hand: .3 - .2 and .2 - .1
 */
export function noSpread(spread: number, size: number): boolean {
  return !(spread > 4 * Number.EPSILON * size);
}

/**
 * Largest size among scores.
 * @param vectors scores
 * @returns max |score|, 0 when there are none
 * @source common practice
 * @checked by hand
 */
export function largestSize(...vectors: Float64Array[]): number {
  let size = 0;
  for (const x of vectors) for (let i = 0; i < x.length; i++) size = Math.max(size, Math.abs(x[i] as number));
  return size;
}

/**
 * Joins a lower and an upper limit for a one- or two-sided statement.
 * @param lower lower limit
 * @param upper upper limit
 * @param alternative 'greater' keeps the lower limit only, 'less' the upper only
 * @returns the limits, null where there is none
 * @source common practice: the interval holds the values a test of that direction does not reject
 * @checked by hand
 */
export function limits(lower: number, upper: number, alternative: Alternative): Limits {
  if (alternative === 'greater') return [lower, null];
  return alternative === 'less' ? [null, upper] : [lower, upper];
}

/**
 * p of a t statistic.
 * @param t statistic, finite
 * @param df degrees of freedom, > 0
 * @param alternative direction
 * @returns P(|T| >= |t|), P(T > t) or P(T <= t)
 * @throws RangeError from the tail functions
 * @source Student (1908)
 * @checked cases `one_sample_t`, rtol 1e-9
 */
export function tP(t: number, df: number, alternative: Alternative): number {
  if (alternative === 'greater') return tUpper(t, df);
  return alternative === 'less' ? tLower(t, df) : tTwoSided(t, df);
}

/**
 * p of a normal statistic.
 * @param z statistic, finite
 * @param alternative direction
 * @returns P(|Z| >= |z|), P(Z > z) or P(Z <= z)
 * @source common practice
 * @checked cases `wilcoxon_signed_rank`, rtol 1e-9
 */
export function normalP(z: number, alternative: Alternative): number {
  if (alternative === 'greater') return normalUpper(z);
  return alternative === 'less' ? normalLower(z) : Math.min(1, 2 * normalUpper(Math.abs(z)));
}

/**
 * Upper tail left outside each finite limit of an interval.
 * @param level confidence level
 * @param alternative direction
 * @returns (1 - level) / 2 for two-sided, 1 - level for one-sided
 * @throws RangeError when the level is not strictly between 0 and 1
 * @source common practice
 * @checked by hand
 */
export function outside(level: number, alternative: Alternative): number {
  requireLevel(level);
  return alternative === 'two-sided' ? (1 - level) / 2 : 1 - level;
}

/**
 * Interval estimate -+ critical t times SE.
 * @param estimate estimate
 * @param se standard error, > 0
 * @param df degrees of freedom, > 0
 * @param options direction and level
 * @returns limits, in the estimate's unit
 * @throws RangeError when the level is not strictly between 0 and 1
 * @source Student (1908)
 * @checked cases `one_sample_t`, rtol 1e-9
 */
export function tInterval(estimate: number, se: number, df: number, options: TestOptions = {}): Limits {
  const { alternative = 'two-sided', level = 0.95 } = options;
  const reach = tQuantileUpper(outside(level, alternative), df) * se;
  return limits(estimate - reach, estimate + reach, alternative);
}

/**
 * Interval estimate -+ critical z times SE.
 * @param estimate estimate
 * @param se standard error, > 0
 * @param options direction and level
 * @returns limits, in the estimate's unit
 * @throws RangeError when the level is not strictly between 0 and 1
 * @source common practice
 * @checked cases `brunner_munzel`, rtol 1e-9
 */
export function normalInterval(estimate: number, se: number, options: TestOptions = {}): Limits {
  const { alternative = 'two-sided', level = 0.95 } = options;
  const reach = normalQuantileUpper(outside(level, alternative)) * se;
  return limits(estimate - reach, estimate + reach, alternative);
}

/**
 * The t test of an estimate with its standard error.
 * @param estimate estimate
 * @param nullValue value under the null hypothesis, same unit
 * @param se standard error, > 0
 * @param df degrees of freedom, > 0
 * @param options direction and level
 * @returns estimate, se, df, t = (estimate - nullValue) / se, p, interval of the estimate
 * @throws RangeError when the level is not strictly between 0 and 1
 * @source Student (1908)
 * @checked cases `one_sample_t`, rtol 1e-9
 */
export function tTest(estimate: number, nullValue: number, se: number, df: number, options: TestOptions = {}) {
  const t = (estimate - nullValue) / se;
  const p = tP(t, df, options.alternative ?? 'two-sided');
  return { estimate, se, df, t, p, interval: tInterval(estimate, se, df, options) };
}

/**
 * A t test that cannot be made.
 * @param reason a short clause
 * @param estimate the estimate, where it is still defined
 * @returns the same fields as a t test, null, with the reason
 * @source common practice
 * @checked by hand
 */
export function noTTest(reason: string, estimate: number | null = null): TTest {
  return { estimate, se: null, df: null, t: null, p: null, interval: null, reason };
}
