import { type GroupScores, trimmedSummaries } from '../groups.ts';
import { type Adjustment, adjustP } from '../multiplicity.ts';
import { tTwoSided } from '../tails/t.ts';
import { allPairs, type Pair } from './pairs.ts';
import type { PairTests } from './tukey.ts';

export interface WelchPair extends Pair {
  /** First (trimmed) mean minus second, units of the scores. */
  readonly difference: number;
  readonly se: number;
  readonly t: number;
  readonly df: number;
  /** Two-sided, of this pair alone. */
  readonly p: number;
  readonly pAdjusted: number;
}

export interface PairwiseWelchOptions {
  /** Over all pairs (default holm). */
  readonly adjust?: Adjustment;
  /** Integer percentage at each end, 0 to 49 (default 0; above 0 each pair is a test of Yuen and Welch). */
  readonly trim?: number;
}

/**
 * Welch's t test for all pairs of conditions, p values adjusted.
 * @param groups scores of each condition, two conditions or more, finite
 * @param options adjustment and trim
 * @returns for each pair difference, se, t, df, p and adjusted p; null with a reason when a condition keeps fewer than two
 *   scores, or the scores of two conditions do not vary
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or `trim` is out of range
 * @source Welch (1938), Yuen (1974): t = difference / sqrt(d1 + d2), df = (d1 + d2)^2 / sum d^2 / (h - 1)
 * @checked cases `pairwise_welch`, rtol 1e-9
 */
export function pairwiseWelch(groups: GroupScores, options: PairwiseWelchOptions = {}): PairTests<WelchPair> {
  const summaries = trimmedSummaries(groups, options.trim ?? 0);
  if (typeof summaries === 'string') return { pairs: null, reason: summaries };
  if (summaries.filter((one) => one.squaredError === 0).length > 1) {
    return { pairs: null, reason: 'scores of two conditions do not vary' };
  }
  const tests = allPairs(groups.length).map(({ first, second }) => {
    const a = summaries[first]!;
    const b = summaries[second]!;
    const difference = a.mean - b.mean;
    const squared = a.squaredError + b.squaredError;
    const df = 1 / ((a.squaredError / squared) ** 2 / (a.h - 1) + (b.squaredError / squared) ** 2 / (b.h - 1));
    const se = Math.sqrt(squared);
    return { first, second, difference, se, t: difference / se, df, p: tTwoSided(difference / se, df) };
  });
  const adjusted = adjustP(
    tests.map((one) => one.p),
    options.adjust ?? 'holm',
  );
  return { pairs: tests.map((one, i) => ({ ...one, pAdjusted: adjusted[i]! })) };
}
