import { type FTest, type GroupScores, noFTest, trimmedSummaries } from './groups.ts';
import { fUpper } from './tails/f.ts';

/**
 * Welch's one-way test that allows unequal spread, on means or trimmed means.
 * @param groups scores of each condition, two conditions or more, finite
 * @param options `trim` integer percentage at each end, 0 to 49 (default 0)
 * @returns F, df1 = k - 1, df2, p; null with a reason when a condition keeps fewer than two scores, or the (winsorized)
 *   scores of one do not vary
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or `trim` is out of range
 * @source Welch (1951); trimmed: Lix & Keselman (1998), Wilcox (2012) 7.1: w = h (h-1) / ((n-1) s_w^2), U = sum w,
 *   F = [sum w (m - m.)^2 / (k-1)] / [1 + 2 (k-2) L / (k^2-1)], L = sum (1 - w/U)^2 / (h-1), df2 = (k^2-1) / (3 L)
 * @checked cases `welch_anova`, rtol 1e-9
 */
export function welchAnova(groups: GroupScores, options: { readonly trim?: number } = {}): FTest {
  const summaries = trimmedSummaries(groups, options.trim ?? 0);
  if (typeof summaries === 'string') return noFTest(summaries);
  const flat = summaries.findIndex((one) => one.winsorizedVariance === 0);
  if (flat >= 0) return noFTest(`scores of condition ${flat + 1} do not vary`);
  const k = summaries.length;
  // Weights as shares of their sum, so that neither very small nor very large units overflow.
  const least = Math.min(...summaries.map((one) => one.squaredError));
  const weights = summaries.map((one) => least / one.squaredError);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  const base = summaries[0]!.mean;
  const center = weights.reduce((sum, weight, j) => sum + (weight / total) * (summaries[j]!.mean - base), 0);
  let between = 0;
  let imbalance = 0;
  summaries.forEach((one, j) => {
    const weight = weights[j]!;
    const distance = one.mean - base - center;
    between += (weight * distance * distance) / least;
    imbalance += (1 - weight / total) ** 2 / (one.h - 1);
  });
  const df1 = k - 1;
  const df2 = (k * k - 1) / (3 * imbalance);
  const F = between / df1 / (1 + (2 * (k - 2) * imbalance) / (k * k - 1));
  return { F, df1, df2, p: fUpper(F, df1, df2) };
}
