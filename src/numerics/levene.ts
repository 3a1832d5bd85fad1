import { oneWayAnova } from './anova/one-way.ts';
import { type FTest, type GroupScores, noFTest, requireGroups, tooFew } from './groups.ts';
import { mean } from './moments.ts';
import { median, sorted } from './order.ts';
import { trimCount } from './scores.ts';

export interface LeveneOptions {
  /** What deviations are taken from (default the median, the test of Brown & Forsythe). */
  readonly center?: 'mean' | 'median' | 'trimmed';
  /** Integer percentage at each end for the trimmed mean, 0 to 49 (default 10); ALL deviations are kept. */
  readonly trim?: number;
}

/**
 * Levene's test of equal spread: analysis of variance of the distances |score - centre|.
 * @param groups scores of each condition, two conditions or more, finite
 * @param options centre, and trim of a trimmed centre
 * @returns F, df1 = k - 1, df2 = N - k, p; null with a reason when a condition is empty, no condition holds two scores,
 *   or the distances do not vary within conditions
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or `trim` is out of range
 * @source Levene (1960) for the mean; Brown & Forsythe (1974) for the median and the trimmed mean
 * @checked cases `levene_test`, rtol 1e-9
 */
export function leveneTest(groups: GroupScores, options: LeveneOptions = {}): FTest {
  requireGroups(groups);
  const { center = 'median', trim = 10 } = options;
  const few = tooFew(groups, 1);
  if (few !== null) return noFTest(few);
  const distances = groups.map((scores) => {
    const middle = centerOf(scores, center, trim);
    return scores.map((score) => Math.abs(score - middle));
  });
  const { F, df1, df2, p, reason } = oneWayAnova(distances);
  if (F === null) return noFTest(reason === 'scores do not vary within conditions' ? flatReason : String(reason));
  return { F, df1, df2, p };
}

const flatReason = 'distances from the centre do not vary within conditions';

function centerOf(scores: Float64Array, center: 'mean' | 'median' | 'trimmed', trim: number): number {
  if (center === 'mean') return mean(scores);
  if (center === 'median') return median(scores);
  const g = trimCount(scores.length, trim);
  return mean(sorted(scores).subarray(g, scores.length - g));
}
