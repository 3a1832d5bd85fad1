import { variance } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { trimmedMean } from '../trimmed-mean.ts';
import { winsorizedVariance } from '../winsorized.ts';
import { winsorizedNormalSd } from './akp-robust-d.ts';

export interface ExplanatoryEffect {
  /** Variance of the trimmed means over the rescaled winsorized variance of all scores. */
  readonly xiSquared: number | null;
  readonly xi: number | null;
  /** Winsorized variance of all scores, rescaled to the variance of normal scores. */
  readonly totalVariance: number | null;
  readonly reason?: string;
}

/**
 * Explanatory measure of effect size of two or more independent groups of EQUAL size.
 * @param groups scores of each group, at least two groups of the same size, finite
 * @param options `trim` integer percentage at each end (default 20)
 * @returns xiSquared, xi, totalVariance; null with a reason for unequal sizes or no spread
 * @throws RangeError when there are fewer than two groups, a group is empty or not finite, or `trim` is not 0 to 49
 * @source Wilcox & Tian (2011): variance (J-1) of the trimmed means over the winsorized variance of the pooled scores / c^2
 * @checked cases `explanatory_effect_size`, rtol 1e-9
 */
export function explanatoryEffect(
  groups: readonly Float64Array[],
  options: { readonly trim?: number } = {},
): ExplanatoryEffect {
  if (groups.length < 2) throw new RangeError(`*groups* must be at least two; got ${groups.length}`);
  for (const group of groups) requireScores(group, 1, 'groups');
  const { trim = 20 } = options;
  const none = { xiSquared: null, xi: null, totalVariance: null };
  const [first] = groups as [Float64Array];
  if (groups.some((group) => group.length !== first.length)) {
    return { ...none, reason: 'the conditions differ in size' };
  }
  const all = Float64Array.from(groups.flatMap((group) => [...group]));
  const constant = winsorizedNormalSd(trim);
  const totalVariance = winsorizedVariance(all, trim) / (constant * constant);
  if (totalVariance === 0) return { ...none, totalVariance, reason: 'all winsorized scores are equal' };
  const xiSquared = variance(Float64Array.from(groups, (group) => trimmedMean(group, trim))) / totalVariance;
  return { xiSquared, xi: Math.sqrt(xiSquared), totalVariance };
}
