import { type FTest, noFTest } from './groups.ts';
import { ranks } from './order.ts';
import { type RepeatedScores, requireRepeated } from './repeated.ts';
import { fUpper } from './tails/f.ts';

/**
 * Quade's test of repeated scores: ranks within participants, weighted by the rank of the participant's range.
 * @param scores one vector a level (two or more), one score a participant, finite
 * @returns F on k - 1 and (n-1)(k-1) df, p; null with a reason when there are fewer than two participants, every
 *   participant's scores are all equal, or all participants rank the levels alike
 * @throws RangeError when there are fewer than two levels, lengths differ, or a score is not finite
 * @source Quade (1979): S = Q (r - (k+1)/2), B = sum_j (sum_i S)^2 / n, F = (n-1) B / (sum S^2 - B)
 * @checked cases `quade_test`, rtol 1e-9
 */
export function quadeTest(scores: RepeatedScores): FTest {
  requireRepeated(scores);
  const k = scores.length;
  const n = scores[0]!.length;
  if (n < 2) return noFTest('fewer than 2 participants with a score under every level');
  const rows = Array.from({ length: n }, (_, i) => Float64Array.from(scores, (level) => level[i]!));
  const weights = ranks(Float64Array.from(rows, (row) => Math.max(...row) - Math.min(...row))).ranks;
  const totals = new Float64Array(k);
  let all = 0;
  rows.forEach((row, i) => {
    ranks(row).ranks.forEach((rank, j) => {
      const score = weights[i]! * (rank - (k + 1) / 2);
      totals[j] = totals[j]! + score;
      all += score * score;
    });
  });
  if (all === 0) return noFTest("every participant's scores are all equal");
  const between = totals.reduce((sum, total) => sum + total * total, 0) / n;
  if (!(all - between > 1e-12 * all)) return noFTest('all participants rank the levels alike');
  const F = ((n - 1) * between) / (all - between);
  const df1 = k - 1;
  const df2 = (n - 1) * (k - 1);
  return { F, df1, df2, p: fUpper(F, df1, df2) };
}
