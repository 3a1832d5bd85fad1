import type { GroupScores } from '../groups.ts';
import { requireLevel } from '../inference.ts';
import { studentizedRangeQuantile, studentizedRangeUpper } from '../tails/studentized-range.ts';
import { oneWayAnova, sumsOfSquares } from './one-way.ts';
import { allPairs, type Pair } from './pairs.ts';

export interface TukeyPair extends Pair {
  /** First mean minus second, units of the scores. */
  readonly difference: number;
  readonly se: number;
  readonly lower: number;
  readonly upper: number;
  /** Adjusted for all pairs. */
  readonly p: number;
}

export interface PairTests<P> {
  /** Every pair in the order of the conditions, or null with a reason. */
  readonly pairs: readonly P[] | null;
  readonly reason?: string;
}

/**
 * Tukey and Kramer's comparison of all pairs of means with one pooled variance.
 * @param groups scores of each condition, two conditions or more, finite
 * @param options `level` of the simultaneous intervals, between 0 and 1 (default .95)
 * @returns for each pair the difference, its se, simultaneous limits (units of the scores) and adjusted p; null with a
 *   reason when the analysis of variance cannot be made
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or the level is out of range
 * @source Tukey (1953), Kramer (1956): q = sqrt(2) |difference| / se, se^2 = MSw (1/n1 + 1/n2), studentized range of k on N - k df
 * @checked cases `tukey_hsd`, p 1e-8 absolute, limits 1e-6
 */
export function tukeyHsd(groups: GroupScores, options: { readonly level?: number } = {}): PairTests<TukeyPair> {
  const { level = 0.95 } = options;
  requireLevel(level);
  const anova = oneWayAnova(groups);
  if (anova.F === null) return { pairs: null, reason: String(anova.reason) };
  const k = groups.length;
  const df = anova.df2!;
  const variance = anova.ssWithin! / df;
  const reach = studentizedRangeQuantile(level, k, df) / Math.SQRT2;
  const { offsets } = sumsOfSquares(groups);
  const pairs = allPairs(k).map(({ first, second }) => {
    const difference = offsets[first]! - offsets[second]!;
    const se = Math.sqrt(variance * (1 / groups[first]!.length + 1 / groups[second]!.length));
    const p = studentizedRangeUpper((Math.abs(difference) / se) * Math.SQRT2, k, df);
    return { first, second, difference, se, lower: difference - reach * se, upper: difference + reach * se, p };
  });
  return { pairs };
}
