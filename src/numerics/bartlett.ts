import { type ChiSquareTest, type GroupScores, noChiSquareTest, trimmedSummaries } from './groups.ts';
import { chiSquareUpper } from './tails/chi-square.ts';

/**
 * Bartlett's test of equal variances; it presumes normal scores.
 * @param groups scores of each condition, two conditions or more, finite, two scores or more in each
 * @returns chi2 (with Bartlett's correction), df = k - 1, p; null with a reason when a condition holds fewer than two
 *   scores or its scores do not vary
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Bartlett (1937): [(N-k) ln s_p^2 - sum (n-1) ln s^2] / [1 + (sum 1/(n-1) - 1/(N-k)) / (3 (k-1))]
 * @checked cases `bartlett_test`, rtol 1e-9
 */
export function bartlettTest(groups: GroupScores): ChiSquareTest {
  const summaries = trimmedSummaries(groups, 0);
  if (typeof summaries === 'string') return noChiSquareTest(summaries);
  const flat = summaries.findIndex((one) => one.winsorizedVariance === 0);
  if (flat >= 0) return noChiSquareTest(`scores of condition ${flat + 1} do not vary`);
  const df = summaries.length - 1;
  const dfWithin = summaries.reduce((sum, one) => sum + one.n - 1, 0);
  const pooled = summaries.reduce((sum, one) => sum + ((one.n - 1) / dfWithin) * one.winsorizedVariance, 0);
  const statistic = summaries.reduce((sum, one) => sum - (one.n - 1) * Math.log(one.winsorizedVariance / pooled), 0);
  const inverse = summaries.reduce((sum, one) => sum + 1 / (one.n - 1), 0);
  const chi2 = Math.max(0, statistic / (1 + (inverse - 1 / dfWithin) / (3 * df)));
  return { chi2, df, p: chiSquareUpper(chi2, df) };
}
