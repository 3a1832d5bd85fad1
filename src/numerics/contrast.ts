import { type GroupScores, trimmedSummaries } from './groups.ts';
import { noTTest, requireLevel, type TestOptions, type TTest, tTest } from './inference.ts';

export interface ContrastOptions extends TestOptions {
  /** Integer percentage at each end, 0 to 49 (default 0). */
  readonly trim?: number;
  /** 'welch' = each condition's own variance (default); 'pooled' = one common variance. */
  readonly variance?: 'welch' | 'pooled';
}

/**
 * t test of a weighted sum of (trimmed) means.
 * @param groups scores of each condition, two conditions or more, finite
 * @param weights one weight a condition, not all zero; a comparison of means when they add up to 0
 * @param options trim, variance, direction, level
 * @returns estimate = sum w m (units), se, df, t, p, interval; null with a reason when a condition keeps fewer than two
 *   scores or the (winsorized) scores of the weighted conditions do not vary
 * @throws RangeError when weights do not fit the conditions or are all zero, a score is not finite, or an option is out of range
 * @source Wilcox (2012) 7.4: se^2 = sum w^2 d, d = (n-1) s_w^2 / (h (h-1)), df = (sum w^2 d)^2 / sum [w^4 d^2 / (h-1)];
 *   pooled: se^2 = s_p^2 sum w^2 / h, s_p^2 = sum (n-1) s_w^2 / (H - k) on H - k df
 * @checked cases `linear_contrast`, rtol 1e-9
 */
export function linearContrast(groups: GroupScores, weights: ArrayLike<number>, options: ContrastOptions = {}): TTest {
  requireLevel(options.level ?? 0.95);
  if (weights.length !== groups.length) {
    throw new RangeError(`*weights* must be ${groups.length} numbers; got ${weights.length}`);
  }
  const own = Float64Array.from(weights);
  if (!own.every(Number.isFinite) || own.every((weight) => weight === 0)) {
    throw new RangeError(`*weights* must be finite and not all zero; got ${own.join(', ')}`);
  }
  const summaries = trimmedSummaries(groups, options.trim ?? 0);
  if (typeof summaries === 'string') return noTTest(summaries);
  const over = (term: (j: number) => number) => summaries.reduce((sum, _, j) => sum + term(j), 0);
  const estimate = over((j) => own[j]! * summaries[j]!.mean);
  if (options.variance === 'pooled') {
    const df = over((j) => summaries[j]!.h - 1);
    const pooled = over((j) => (summaries[j]!.n - 1) * summaries[j]!.winsorizedVariance) / df;
    if (pooled === 0) return noTTest('scores do not vary within conditions', estimate);
    const se = Math.sqrt(pooled * over((j) => own[j]! ** 2 / summaries[j]!.h));
    return tTest(estimate, 0, se, df, options);
  }
  const squared = over((j) => own[j]! ** 2 * summaries[j]!.squaredError);
  if (squared === 0) return noTTest('scores of the weighted conditions do not vary', estimate);
  const df = 1 / over((j) => ((own[j]! ** 2 * summaries[j]!.squaredError) / squared) ** 2 / (summaries[j]!.h - 1));
  return tTest(estimate, 0, Math.sqrt(squared), df, options);
}
