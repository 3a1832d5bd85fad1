import { type GroupScores, requireGroups, tooFew } from '../groups.ts';
import { normalP } from '../inference.ts';
import { pooledRanks } from '../kruskal-wallis.ts';
import { type Adjustment, adjustP } from '../multiplicity.ts';
import { allPairs, type Pair } from './pairs.ts';
import type { PairTests } from './tukey.ts';

export interface DunnPair extends Pair {
  /** Positive when the first condition ranks higher. */
  readonly z: number;
  /** Two-sided, of this pair alone. */
  readonly p: number;
  readonly pAdjusted: number;
}

/**
 * Dunn's comparison of all pairs by mean ranks.
 * @param groups scores of each condition, two conditions or more, finite
 * @param options `adjust` over all pairs (default holm)
 * @returns for each pair z, p and adjusted p; null with a reason when a condition is empty or all scores are equal
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Dunn (1964): z = (R1 - R2) / sqrt(v (1/n1 + 1/n2)), R mean midranks, v = N (N+1)/12 - sum(t^3 - t) / (12 (N-1))
 * @checked cases `dunn_test`, rtol 1e-9
 */
export function dunnTest(groups: GroupScores, options: { readonly adjust?: Adjustment } = {}): PairTests<DunnPair> {
  requireGroups(groups);
  const few = tooFew(groups, 1);
  if (few !== null) return { pairs: null, reason: few };
  const { meanRanks, sizes, variance } = pooledRanks(groups);
  if (!(variance > 1e-9)) return { pairs: null, reason: 'all scores are equal' };
  const tests = allPairs(groups.length).map(({ first, second }) => {
    const z = (meanRanks[first]! - meanRanks[second]!) / Math.sqrt(variance * (1 / sizes[first]! + 1 / sizes[second]!));
    return { first, second, z, p: normalP(z, 'two-sided') };
  });
  const adjusted = adjustP(
    tests.map((one) => one.p),
    options.adjust ?? 'holm',
  );
  return { pairs: tests.map((one, i) => ({ ...one, pAdjusted: adjusted[i]! })) };
}
