/** Hodges-Lehmann estimates with intervals read off the exact rank distributions. */
import { type Alternative, type Limits, outside, type TestOptions } from './inference.ts';
import { sorted } from './order.ts';
import { requireScores } from './scores.ts';
import { pairDifference, walshAverage } from './selection.ts';
import { normalQuantileUpper, normalUpper } from './tails/normal.ts';
import { feasible, rankSumLower, rankSumQuantile } from './tails/rank-sum.ts';
import { signedRankLower, signedRankQuantile } from './tails/signed-rank.ts';

export interface HodgesLehmann {
  readonly estimate: number;
  readonly interval: Limits | null;
  /** Confidence the interval really has without ties; below the level when even all averages are too few. */
  readonly coverage: number | null;
  /** Ranks behind the limits: 'exact' distribution or its 'normal' approximation (beyond the size cap). */
  readonly how: 'exact' | 'normal';
  readonly reason?: string;
}

/** Beyond this many scores the signed-rank distribution is replaced by its normal approximation. */
const LARGEST_EXACT = 300;

interface Ranking {
  /** Number of averages or differences. */
  readonly count: number;
  readonly pick: (k: number) => number;
  /** Rank of the lower limit for the given tail probability, and P(statistic < that rank). */
  readonly rank: (tail: number) => { k: number; missed: number; how: 'exact' | 'normal' };
}

function normalRank(count: number, variance: number, tail: number) {
  const sd = Math.sqrt(variance);
  const k = Math.max(1, Math.ceil(count / 2 - 0.5 - normalQuantileUpper(tail) * sd));
  return { k, missed: normalUpper((count / 2 - k + 0.5) / sd), how: 'normal' as const };
}

function estimateWithLimits(ranking: Ranking, level: number, alternative: Alternative): HodgesLehmann {
  const { count, pick } = ranking;
  const low = pick((count + 1) >> 1 || 1);
  const high = pick(Math.floor(count / 2) + 1);
  const estimate = count % 2 === 1 || low === high ? low : low + (high - low) / 2;
  const { k, missed, how } = ranking.rank(outside(level, alternative));
  const coverage = 1 - (alternative === 'two-sided' ? 2 : 1) * missed;
  if (coverage <= 0) return { estimate, interval: null, coverage: null, how, reason: 'too few scores for an interval' };
  const lower = alternative === 'less' ? null : pick(k);
  const upper = alternative === 'greater' ? null : pick(count - k + 1);
  return { estimate, interval: [lower, upper], coverage, how };
}

/**
 * Median of the Walsh averages: the estimate that belongs to the signed-rank test, of scores or of differences.
 * @param x scores or differences of pairs, at least one, finite
 * @param options direction and level
 * @returns estimate, interval (order statistics of the averages at the exact quantile, no ties assumed), its coverage
 *   (below the level when even the full range is too narrow); no interval, with a reason, for a single score
 * @throws RangeError when empty, not finite, or the level is not strictly between 0 and 1
 * @source Hodges & Lehmann (1963); limits: the k-th smallest and k-th largest average, k the signed-rank quantile
 * @checked cases `hodges_lehmann_location`, `hodges_lehmann_one_sample`, rtol 1e-9
 */
export function hodgesLehmannPaired(x: Float64Array, options: TestOptions = {}): HodgesLehmann {
  requireScores(x);
  const { level = 0.95, alternative = 'two-sided' } = options;
  const s = sorted(x);
  const n = s.length;
  const count = (n * (n + 1)) / 2;
  const rank = (tail: number) => {
    if (n > LARGEST_EXACT) return normalRank(count, (n * (n + 1) * (2 * n + 1)) / 24, tail);
    const k = Math.max(1, signedRankQuantile(tail, n));
    return { k, missed: signedRankLower(k - 1, n), how: 'exact' as const };
  };
  return estimateWithLimits({ count, pick: (k) => walshAverage(s, k), rank }, level, alternative);
}

/**
 * Median of all differences between two groups: the shift that belongs to the rank-sum test, first minus second.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param options direction and level
 * @returns estimate, interval (order statistics of the differences at the exact quantile, no ties assumed), its coverage
 *   (below the level when even the full range is too narrow); no interval, with a reason, for a single pair of scores
 * @throws RangeError when a group is empty or not finite, or the level is not strictly between 0 and 1
 * @source Hodges & Lehmann (1963); limits: the k-th smallest and k-th largest difference, k the rank-sum quantile
 * @checked cases `hodges_lehmann_shift`, rtol 1e-9
 */
export function hodgesLehmannShift(x: Float64Array, y: Float64Array, options: TestOptions = {}): HodgesLehmann {
  requireScores(x);
  requireScores(y, 1, 'y');
  const { level = 0.95, alternative = 'two-sided' } = options;
  const s = sorted(x);
  const t = sorted(y);
  const n1 = s.length;
  const n2 = t.length;
  const count = n1 * n2;
  const rank = (tail: number) => {
    if (!feasible(n1, n2)) return normalRank(count, (count * (n1 + n2 + 1)) / 12, tail);
    const k = Math.max(1, rankSumQuantile(tail, n1, n2));
    return { k, missed: rankSumLower(k - 1, n1, n2), how: 'exact' as const };
  };
  return estimateWithLimits({ count, pick: (k) => pairDifference(s, t, k), rank }, level, alternative);
}
