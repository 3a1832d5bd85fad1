/** Rank effect sizes of resampled participants, read from counts: nobody's ranks are found anew in every resample. */

import type { GroupScores } from '../numerics/groups.ts';
import { ranks } from '../numerics/order.ts';
import type { RepeatedScores } from '../numerics/repeated.ts';

/** The effect size of a resample, given how often each participant of each group was drawn; null = not defined. */
export type ShareOfCounts = (counts: readonly Int32Array[]) => number | null;

/**
 * Epsilon squared of Kruskal and Wallis for resampled groups.
 *
 * @param groups scores of each group, each at least one
 * @returns reader of H / (N - 1) from counts per group: the share of the variance of the pooled midranks between groups
 * @source Kruskal & Wallis 1952; Tomczak & Tomczak 2014
 * @checked agrees with kruskalWallis of the groups written out, 12 digits
 */
export function kruskalShare(groups: GroupScores): ShareOfCounts {
  const all = groups.flatMap((scores, group) => Array.from(scores, (score, who) => ({ score, group, who })));
  all.sort((a, b) => a.score - b.score);
  const sizes = groups.map((scores) => scores.length);
  const n = all.length;
  const center = (n + 1) / 2;
  return (counts) => {
    const sums = new Float64Array(groups.length);
    let squares = 0;
    let passed = 0;
    for (let at = 0; at < n; ) {
      let end = at;
      let times = 0;
      while (end < n && all[end]?.score === all[at]?.score) times += timesOf(all[end++], counts);
      const rank = passed + (times + 1) / 2 - center;
      for (let i = at; i < end; i++) {
        const one = all[i] as (typeof all)[number];
        sums[one.group] = (sums[one.group] as number) + timesOf(one, counts) * rank;
      }
      squares += times * rank * rank;
      passed += times;
      at = end;
    }
    const between = sums.reduce((total, sum, j) => total + (sum * sum) / (sizes[j] as number), 0);
    return squares > 1e-9 ? between / squares : null;
  };
}

function timesOf(
  one: { readonly group: number; readonly who: number } | undefined,
  counts: readonly Int32Array[],
): number {
  return one === undefined ? 0 : ((counts[one.group] as Int32Array)[one.who] as number);
}

/** Each participant's midranks about their middle, participants x levels. */
function ownRanks(columns: RepeatedScores): Float64Array[] {
  const center = (columns.length + 1) / 2;
  const n = columns[0]?.length ?? 0;
  return Array.from({ length: n }, (_, i) =>
    ranks(Float64Array.from(columns, (column) => column[i] as number)).ranks.map((rank) => rank - center),
  );
}

/** Squared weighted totals of the levels over the weight times the weighted squares: 1 where all rank alike. */
function agreementOf(rows: readonly Float64Array[], counts: Int32Array, weights: Float64Array | null): number | null {
  const k = rows[0]?.length ?? 0;
  const totals = new Float64Array(k);
  let squares = 0;
  let all = 0;
  rows.forEach((row, i) => {
    const weight = (counts[i] as number) * (weights === null ? 1 : (weights[i] as number));
    if (weight === 0) return;
    all += weight;
    for (let j = 0; j < k; j++) {
      const rank = row[j] as number;
      totals[j] = (totals[j] as number) + weight * rank;
      squares += weight * rank * rank;
    }
  });
  return squares > 0 ? totals.reduce((sum, total) => sum + total * total, 0) / (all * squares) : null;
}

/**
 * Kendall's coefficient of agreement of resampled participants.
 *
 * @param columns one vector a level, one score a participant
 * @returns reader of W = chi-square of Friedman / (n (k - 1)), 0 to 1, from counts
 * @source Friedman 1937; Kendall & Babington Smith 1939
 * @checked agrees with friedmanTest of the participants written out, 12 digits
 */
export function friedmanShare(columns: RepeatedScores): ShareOfCounts {
  const rows = ownRanks(columns);
  return ([counts]) => agreementOf(rows, counts as Int32Array, null);
}

/**
 * Weighted agreement of resampled participants: each weighs by the midrank of the range of their scores.
 *
 * @param columns one vector a level, one score a participant
 * @returns reader of Kendall's W with those weights, 0 to 1, from counts: sum of squared weighted totals over the weight
 *   times the weighted squares of the ranks
 * @source weights of Quade 1979; W: Kendall & Babington Smith 1939
 * @checked by hand; with equal ranges it is Kendall's W, 12 digits
 */
export function quadeShare(columns: RepeatedScores): ShareOfCounts {
  const rows = ownRanks(columns);
  const ranges = rows.map((_, i) => {
    const own = columns.map((column) => column[i] as number);
    return Math.max(...own) - Math.min(...own);
  });
  const order = ranges.map((_, i) => i).sort((a, b) => (ranges[a] as number) - (ranges[b] as number));
  const weights = new Float64Array(rows.length);
  return ([own]) => {
    const counts = own as Int32Array;
    let passed = 0;
    for (let at = 0; at < order.length; ) {
      let end = at;
      let times = 0;
      while (end < order.length && ranges[order[end] as number] === ranges[order[at] as number]) {
        times += counts[order[end++] as number] as number;
      }
      for (let i = at; i < end; i++) weights[order[i] as number] = passed + (times + 1) / 2;
      passed += times;
      at = end;
    }
    return agreementOf(rows, counts, weights);
  };
}
