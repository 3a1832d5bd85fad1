import { type ChiSquareTest, type GroupScores, noChiSquareTest, requireGroups, tooFew } from './groups.ts';
import { largestSize, noSpread } from './inference.ts';
import { sumOfSquares } from './moments.ts';
import { ranks, sorted } from './order.ts';
import { chiSquareUpper } from './tails/chi-square.ts';
import { normalQuantileUpper } from './tails/normal.ts';

/**
 * Fligner and Killeen's rank test of equal spread, median-centred.
 * @param groups scores of each condition, two conditions or more, finite
 * @returns chi2, df = k - 1, p; null with a reason when a condition is empty or all distances from the medians are equal
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Fligner & Killeen (1976), Conover, Johnson & Johnson (1981): a = normal quantile of (1 + rank / (N+1)) / 2 of the
 *   pooled |score - median|, chi2 = sum n (a_j - a.)^2 / variance of a (divisor N - 1)
 * @checked cases `fligner_killeen`, rtol 1e-9
 */
export function flignerKilleen(groups: GroupScores): ChiSquareTest {
  requireGroups(groups);
  const few = tooFew(groups, 1);
  if (few !== null) return noChiSquareTest(few);
  const distances = Float64Array.from(groups.flatMap((scores) => Array.from(distancesFromMedian(scores))));
  const n = distances.length;
  const ordered = sorted(distances);
  if (noSpread(ordered[n - 1]! - ordered[0]!, largestSize(...groups)))
    return noChiSquareTest('all distances from the medians are equal');
  const { ranks: own } = ranks(distances);
  const scores = own.map((rank) => normalQuantileUpper((n + 1 - rank) / (2 * (n + 1))));
  const center = scores.reduce((sum, score) => sum + score, 0) / n;
  let from = 0;
  let between = 0;
  for (const { length } of groups) {
    let sum = 0;
    for (let i = from; i < from + length; i++) sum += scores[i]! - center;
    between += (sum * sum) / length;
    from += length;
  }
  const chi2 = between / (sumOfSquares(scores, center) / (n - 1));
  const df = groups.length - 1;
  return { chi2, df, p: chiSquareUpper(chi2, df) };
}

function distancesFromMedian(scores: Float64Array): Float64Array {
  const s = sorted(scores);
  // The plain mean of the two middle scores: distances that tie in the published computations must tie here too.
  const middle = (s[(s.length - 1) >> 1]! + s[s.length >> 1]!) / 2;
  return scores.map((score) => Math.abs(score - middle));
}
