import { normalQuantileUpper } from '../tails/normal.ts';
import { rankSumLower } from '../tails/rank-sum.ts';
import { signedRankLower } from '../tails/signed-rank.ts';

/** Beyond these sizes the normal approximation stands in for the exact distribution without ties. */
const MOST_PAIRS = 40_000;
const MOST_SIGNED = 300;

/** Largest whole c from -1 to `top` with twice its lower tail at most alpha. */
function largestBelow(lower: (c: number) => number, top: number, alpha: number): number {
  let [from, to] = [-1, top];
  while (from < to) {
    const middle = Math.ceil((from + to) / 2);
    if (2 * lower(middle) <= alpha) from = middle;
    else to = middle - 1;
  }
  return from;
}

/**
 * Critical values of the rank tests without ties: the test rejects where the smaller statistic is at most the value.
 * @param alpha two-sided level, 0 to 1
 * @returns `rankSum(n1, n2)` of the smaller U, and `signedRank(n)` of the smaller sum of ranks; -1 where nothing rejects
 * @throws RangeError from the tails
 * @source Mann & Whitney (1947), Wilcoxon (1945), exact; beyond 40,000 pairs and 300 differences normal with continuity
 * @checked by hand: 8 for 7 and 8 scores is 10, for 10 differences 8, at .05
 */
export function rankCriticals(alpha: number) {
  const sums = new Map<number, number>();
  const signed = new Map<number, number>();
  const z = normalQuantileUpper(alpha / 2);
  const remember = (store: Map<number, number>, key: number, make: () => number): number => {
    const known = store.get(key);
    if (known !== undefined) return known;
    const value = make();
    store.set(key, value);
    return value;
  };
  return {
    rankSum: (n1: number, n2: number) =>
      remember(sums, n1 * 65_536 + n2, () => {
        const pairs = n1 * n2;
        if (pairs <= MOST_PAIRS) return largestBelow((c) => rankSumLower(c, n1, n2), pairs >> 1, alpha);
        return Math.floor(pairs / 2 - 0.5 - z * Math.sqrt((pairs * (n1 + n2 + 1)) / 12));
      }),
    signedRank: (n: number) =>
      remember(signed, n, () => {
        const all = (n * (n + 1)) / 2;
        if (n <= MOST_SIGNED) return largestBelow((c) => signedRankLower(c, n), all >> 1, alpha);
        return Math.floor(all / 2 - 0.5 - z * Math.sqrt((all * (2 * n + 1)) / 12));
      }),
  };
}
