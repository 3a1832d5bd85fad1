import { type GroupScores, type TrimmedSummary, trimmedSummaries } from '../groups.ts';
import { requireLevel } from '../inference.ts';
import { studentizedRangeQuantile, studentizedRangeUpper } from '../tails/studentized-range.ts';
import { allPairs } from './pairs.ts';
import type { PairTests, TukeyPair } from './tukey.ts';

export interface GamesHowellPair extends TukeyPair {
  readonly t: number;
  /** Satterthwaite's, of this pair. */
  readonly df: number;
}

/**
 * Games and Howell's comparison of all pairs of means under unequal spread.
 * @param groups scores of each condition, two conditions or more, finite, two scores or more in each
 * @param options `level` of the simultaneous intervals, between 0 and 1 (default .95)
 * @returns for each pair difference, se of the difference, t, df, simultaneous limits (units) and adjusted p; null with a
 *   reason when a condition holds fewer than two scores, or two conditions' scores do not vary
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or the level is out of range
 * @source Games & Howell (1976): q = sqrt(2) |t|, se^2 = s1^2/n1 + s2^2/n2, Satterthwaite df, studentized range of k
 * @checked cases `games_howell`, p 1e-8 absolute, limits 1e-6
 */
export function gamesHowell(
  groups: GroupScores,
  options: { readonly level?: number } = {},
): PairTests<GamesHowellPair> {
  const { level = 0.95 } = options;
  requireLevel(level);
  const summaries = trimmedSummaries(groups, 0);
  if (typeof summaries === 'string') return { pairs: null, reason: summaries };
  if (summaries.filter((one) => one.squaredError === 0).length > 1) {
    return { pairs: null, reason: 'scores of two conditions do not vary' };
  }
  const pairs = allPairs(groups.length).map(({ first, second }) => ({
    first,
    second,
    ...compare(summaries[first]!, summaries[second]!, groups.length, level),
  }));
  return { pairs };
}

function compare(a: TrimmedSummary, b: TrimmedSummary, k: number, level: number) {
  const difference = a.mean - b.mean;
  const squared = a.squaredError + b.squaredError;
  const se = Math.sqrt(squared);
  const df = 1 / ((a.squaredError / squared) ** 2 / (a.n - 1) + (b.squaredError / squared) ** 2 / (b.n - 1));
  const t = difference / se;
  const reach = (studentizedRangeQuantile(level, k, df) / Math.SQRT2) * se;
  const p = studentizedRangeUpper(Math.abs(t) * Math.SQRT2, k, df);
  return { difference, se, t, df, lower: difference - reach, upper: difference + reach, p };
}
