import { type GroupScores, requireGroups, tooFew } from './groups.ts';
import { ranks } from './order.ts';
import { chiSquareUpper } from './tails/chi-square.ts';

export interface KruskalWallis {
  /** Corrected for ties; referred to chi-square on `df`. */
  readonly H: number | null;
  readonly df: number | null;
  readonly p: number | null;
  readonly epsilon2: number | null;
  readonly eta2H: number | null;
  readonly reason?: string;
}

/** Ranks of all scores together, split again by condition. */
export interface PooledRanks {
  readonly n: number;
  readonly meanRanks: readonly number[];
  readonly sizes: readonly number[];
  /** Variance of a rank, divisor N - 1, with ties: N (N + 1) / 12 - sum(t^3 - t) / (12 (N - 1)). */
  readonly variance: number;
}

/**
 * Mean midrank of each condition among all scores.
 * @param groups scores of each condition, each at least one, finite
 * @returns mean ranks, sizes, and the variance of the ranks
 * @throws RangeError when a score is not finite
 * @source Kruskal & Wallis (1952)
 * @checked by hand; cases `kruskal_wallis`, `dunn_test`
 */
export function pooledRanks(groups: GroupScores): PooledRanks {
  const sizes = groups.map((scores) => scores.length);
  const n = sizes.reduce((sum, size) => sum + size, 0);
  const all = new Float64Array(n);
  let at = 0;
  for (const scores of groups) {
    all.set(scores, at);
    at += scores.length;
  }
  const { ranks: own, tieSum } = ranks(all);
  let from = 0;
  const meanRanks = sizes.map((size) => {
    let sum = 0;
    for (let i = from; i < from + size; i++) sum += own[i]!;
    from += size;
    return sum / size;
  });
  return { n, meanRanks, sizes, variance: (n * (n + 1)) / 12 - tieSum / (12 * (n - 1)) };
}

/**
 * Kruskal and Wallis's rank test of several independent conditions.
 * @param groups scores of each condition, two conditions or more, finite
 * @returns H corrected for ties, df = k - 1, p from chi-square, epsilon2 and eta2H (shares, not cut off at 0); null with
 *   a reason when a condition is empty or all scores are equal
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Kruskal & Wallis (1952): H = sum n (R - (N+1)/2)^2 / variance of the ranks; epsilon2 = H / (N-1);
 *   eta2H = (H - k + 1) / (N - k) (Tomczak & Tomczak 2014)
 * @checked cases `kruskal_wallis`, rtol 1e-9
 */
export function kruskalWallis(groups: GroupScores): KruskalWallis {
  requireGroups(groups);
  const none = (reason: string) => ({ H: null, df: null, p: null, epsilon2: null, eta2H: null, reason });
  const few = tooFew(groups, 1);
  if (few !== null) return none(few);
  const { n, meanRanks, sizes, variance } = pooledRanks(groups);
  // The variance is a multiple of 1 / (12 (N - 1)), so anything below that is an exact 0 lost to rounding.
  if (!(variance > 1e-9)) return none('all scores are equal');
  const k = groups.length;
  const center = (n + 1) / 2;
  const between = meanRanks.reduce((sum, rank, j) => sum + sizes[j]! * (rank - center) ** 2, 0);
  const H = between / variance;
  return {
    H,
    df: k - 1,
    p: chiSquareUpper(H, k - 1),
    epsilon2: H / (n - 1),
    eta2H: n > k ? (H - k + 1) / (n - k) : null,
  };
}
