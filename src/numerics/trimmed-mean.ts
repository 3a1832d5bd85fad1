/** Trimmed means, their standard errors, and the test of Tukey & McLaughlin. */
import { largestSize, noSpread, noTTest, type TestOptions, type TTest, tTest } from './inference.ts';
import { sum } from './moments.ts';
import { sorted } from './order.ts';
import { requireScores, trimCount } from './scores.ts';
import { winsorizedSd } from './winsorized.ts';

/**
 * Trimmed mean of scores that are already sorted.
 * @param s ascending scores, at least one
 * @param g number of scores left out at EACH end, 0 <= g, 2g < n
 * @returns mean of s[g] to s[n-1-g], in the scores' unit
 * @throws RangeError when nothing would be left
 * @source Tukey & McLaughlin (1963)
 * @checked cases `trimmed_mean`, rtol 1e-9
 */
export function trimmedMeanSorted(s: Float64Array, g: number): number {
  const h = s.length - 2 * g;
  if (!(g >= 0 && h > 0)) throw new RangeError(`*g* must leave a score of ${s.length}; got ${g}`);
  const kept = s.subarray(g, s.length - g);
  const first = sum(kept) / h;
  let rest = 0;
  for (let i = 0; i < h; i++) rest += (kept[i] as number) - first;
  return first + rest / h;
}

/**
 * Trimmed mean.
 * @param x scores, at least one, finite
 * @param trim integer percentage left out at EACH end, 0 to 49
 * @returns mean of the middle h = n - 2g scores, g = floor(trim n / 100), in the scores' unit
 * @throws RangeError when empty, not finite, or `trim` is not 0 to 49
 * @source Tukey & McLaughlin (1963)
 * @checked cases `trimmed_mean`, rtol 1e-9
 */
export function trimmedMean(x: Float64Array, trim: number): number {
  requireScores(x);
  return trimmedMeanSorted(sorted(x), trimCount(x.length, trim));
}

/** The three standard errors of a trimmed mean in circulation. */
export interface TrimmedMeanErrors {
  /** s_w / ((1 - 2 gamma) sqrt n): nominal fraction trimmed. */
  readonly tukeyMcLaughlin: number | null;
  /** s_w sqrt(n) / h: fraction really trimmed. */
  readonly actualFraction: number | null;
  /** sqrt((n-1) s_w^2 / (h (h-1))). */
  readonly yuen: number | null;
}

/**
 * Standard errors of a trimmed mean.
 * @param x scores, at least one, finite
 * @param trim integer percentage left out at EACH end, 0 to 49
 * @returns the three standard errors, in the scores' unit; null when fewer than two scores are left
 * @throws RangeError when empty, not finite, or `trim` is not 0 to 49
 * @source Tukey & McLaughlin (1963); Yuen (1974)
 * @checked cases `trimmed_mean`, rtol 1e-9
 */
export function trimmedMeanErrors(x: Float64Array, trim: number): TrimmedMeanErrors {
  requireScores(x);
  const n = x.length;
  const h = n - 2 * trimCount(n, trim);
  if (n < 2) return { tukeyMcLaughlin: null, actualFraction: null, yuen: null };
  const sd = winsorizedSd(x, trim);
  return {
    tukeyMcLaughlin: (100 * sd) / ((100 - 2 * trim) * Math.sqrt(n)),
    actualFraction: (sd * Math.sqrt(n)) / h,
    yuen: h < 2 ? null : sd * Math.sqrt((n - 1) / (h * (h - 1))),
  };
}

/**
 * t test of a trimmed mean.
 * @param x scores, finite
 * @param options `trim` integer percentage at each end (default 20), `mu` null value (default 0), direction, level
 * @returns estimate (trimmed mean), se, df = h - 1, t, p, interval, g and h; null with a reason when fewer than two
 *   scores are left or the winsorized scores are all equal
 * @throws RangeError when empty, not finite, or an option is out of range
 * @source Tukey & McLaughlin (1963): t = (m_t - mu) (1 - 2 gamma) sqrt(n) / s_w on h - 1 df
 * @checked cases `trimmed_one_sample_t`, `trimmed_paired_differences_t`, rtol 1e-9
 */
export function trimmedMeanTest(
  x: Float64Array,
  options: TestOptions & { readonly trim?: number; readonly mu?: number } = {},
): TTest & { readonly g: number; readonly h: number } {
  const { trim = 20, mu = 0 } = options;
  const n = x.length;
  const estimate = trimmedMean(x, trim);
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  if (h < 2) return { ...noTTest(`${h} of ${n} scores left after trimming`, estimate), g, h };
  const sd = winsorizedSd(x, trim);
  if (noSpread(sd, largestSize(x))) {
    return { ...noTTest(g === 0 ? 'all scores are equal' : 'all winsorized scores are equal', estimate), g, h };
  }
  return { ...tTest(estimate, mu, (100 * sd) / ((100 - 2 * trim) * Math.sqrt(n)), h - 1, options), g, h };
}
