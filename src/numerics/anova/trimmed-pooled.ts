import { type FTest, type GroupScores, noFTest, trimmedSummaries } from '../groups.ts';
import { fUpper } from '../tails/f.ts';

/**
 * One-way test of trimmed means with one pooled winsorized variance.
 * @param groups scores of each condition, two conditions or more, finite
 * @param options `trim` integer percentage at each end, 0 to 49 (default 20)
 * @returns F, df1 = k - 1, df2 = sum(h) - k, p; null with a reason when a condition keeps fewer than two scores or the
 *   winsorized scores do not vary within any condition
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or `trim` is out of range
 * @source Lee & Fung (1985): F = [sum h (m - m.)^2 / (k-1)] / [sum (n-1) s_w^2 / (H-k)], m. = sum h m / H, H = sum h
 * @checked cases `trimmed_pooled_anova`, rtol 1e-9
 */
export function trimmedPooledAnova(groups: GroupScores, options: { readonly trim?: number } = {}): FTest {
  const summaries = trimmedSummaries(groups, options.trim ?? 20);
  if (typeof summaries === 'string') return noFTest(summaries);
  const df1 = summaries.length - 1;
  const kept = summaries.reduce((sum, one) => sum + one.h, 0);
  const df2 = kept - summaries.length;
  const within = summaries.reduce((sum, one) => sum + (one.n - 1) * one.winsorizedVariance, 0);
  if (within === 0) return noFTest('winsorized scores do not vary within conditions');
  const base = summaries[0]!.mean;
  const center = summaries.reduce((sum, one) => sum + one.h * (one.mean - base), 0) / kept;
  const between = summaries.reduce((sum, one) => sum + one.h * (one.mean - base - center) ** 2, 0);
  const F = between / df1 / (within / df2);
  return { F, df1, df2, p: fUpper(F, df1, df2) };
}
