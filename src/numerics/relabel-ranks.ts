/** Rank tests under relabelling: the conditional distribution stays, so each statistic's Z is looked up. */
import { rankZ, tailP } from './rank-test.ts';
import { normalFromP } from './relabel-z.ts';
import { feasible } from './tails/rank-sum.ts';

/** Beyond this many differences the signed-rank test is the normal one (as in signedRankTest). */
const LARGEST_EXACT = 300;

/** Z of every sum of a distribution, from masses over sums 0, 1, 2, ... */
function zOfSums(mass: Float64Array, centre: number): Float64Array {
  const size = mass.length;
  const all = mass.reduce((sum, each) => sum + each, 0);
  const z = new Float64Array(size);
  const upper = new Float64Array(size);
  let sofar = 0;
  for (let i = size - 1; i >= 0; i--) {
    sofar += mass[i] as number;
    upper[i] = sofar / all;
  }
  sofar = 0;
  for (let i = 0; i < size; i++) {
    sofar += mass[i] as number;
    z[i] = normalFromP(tailP(sofar / all, upper[i] as number, 'two-sided'), i - centre);
  }
  return z;
}

/**
 * Z of the signed-rank test for every sum of positive ranks.
 * @param ranks midranks of the differences that are not zero
 * @returns z of a sum of positive ranks, two-sided p as in signedRankTest turned into a deviate with its sign
 * @source Wilcoxon (1945); Streitberg & Roehmel (1986): shifts by each doubled midrank
 * @checked agrees with signedRankTest, 1e-9
 */
export function signedRankZ(ranks: Float64Array): (positive: number) => number {
  const n = ranks.length;
  let total = 0;
  for (const rank of ranks) total += rank;
  if (n > LARGEST_EXACT) {
    const sd = Math.sqrt(ranks.reduce((sum, rank) => sum + rank * rank, 0) / 4);
    return (positive) => {
      const gap = positive - total / 2;
      return normalFromP(rankZ(gap, sd, true, 'two-sided').p, gap);
    };
  }
  let mass = new Float64Array(2 * total + 1);
  mass[0] = 1;
  let reached = 0;
  for (const rank of ranks) {
    const step = 2 * rank;
    const next = mass.map((each) => each / 2);
    for (let sum = 0; sum <= reached; sum++) next[sum + step]! += (mass[sum] as number) / 2;
    reached += step;
    mass = next;
  }
  const z = zOfSums(mass, total);
  return (positive) => z[Math.round(2 * positive)] as number;
}

/** Ways to choose k whole ranks, by how far their sum lies above the least one. */
function chosenSums(sorted: Int32Array, most: number): Float64Array[] {
  const N = sorted.length;
  const least = new Int32Array(most + 1);
  const reach = new Int32Array(most + 1);
  for (let k = 1; k <= most; k++) {
    least[k] = (least[k - 1] as number) + (sorted[k - 1] as number);
    reach[k] = (reach[k - 1] as number) + (sorted[N - k] as number) - (sorted[k - 1] as number);
  }
  const ways = Array.from(reach, (width) => new Float64Array(width + 1));
  ways[0]![0] = 1;
  for (let used = 0; used < N; used++) {
    const step = sorted[used] as number;
    for (let k = Math.min(most, used + 1); k >= 1; k--) {
      const from = ways[k - 1] as Float64Array;
      const into = ways[k] as Float64Array;
      const shift = step + (least[k - 1] as number) - (least[k] as number);
      const last = Math.min(from.length, into.length - shift);
      for (let sum = 0; sum < last; sum++) into[sum + shift]! += from[sum] as number;
    }
  }
  return ways;
}

/**
 * Z of the Mann-Whitney test for every split of the same midranks.
 * @param midranks midranks of all scores
 * @returns z of U of the first group and its size, two-sided p as in mannWhitney turned into a deviate with its sign; 0
 *   where all scores are equal or a group is empty
 * @source Mann & Whitney (1947); Streitberg & Roehmel (1986): ways to choose n1 of the doubled midranks by their sum
 * @checked agrees with mannWhitney, 1e-9
 */
export function rankSumZ(midranks: Float64Array): (u: number, n1: number) => number {
  const N = midranks.length;
  const sorted = midranks.slice().sort();
  const equal = N > 0 && sorted[0] === sorted[N - 1];
  const factor = sorted.some((rank) => !Number.isInteger(rank)) ? 2 : 1;
  const whole = Int32Array.from(sorted, (rank) => Math.round(factor * rank));
  const tables = new Map<number, Float64Array>();
  let ways: Float64Array[] = [];
  const tableOf = (n1: number): Float64Array => {
    let table = tables.get(n1);
    if (table === undefined) {
      if (ways.length <= n1) ways = chosenSums(whole, Math.floor(N / 2));
      let least = 0;
      for (let i = 0; i < n1; i++) least += whole[i] as number;
      table = zOfSums(ways[n1] as Float64Array, (factor * n1 * (N + 1)) / 2 - least);
      tables.set(n1, table);
    }
    return table;
  };
  const leastU = (n1: number) => {
    let least = 0;
    for (let i = 0; i < n1; i++) least += sorted[i] as number;
    return least - (n1 * (n1 + 1)) / 2;
  };
  const variance = N + 1 - tieSumOf(sorted) / (N * (N - 1));
  return (u, n1) => {
    const n2 = N - n1;
    if (equal || n1 === 0 || n2 === 0) return 0;
    if (feasible(n1, n2)) {
      // The smaller group is counted: turning the groups round turns the sign.
      if (n1 > n2) return -(tableOf(n2)[Math.round(factor * (n1 * n2 - u - leastU(n2)))] as number);
      return tableOf(n1)[Math.round(factor * (u - leastU(n1)))] as number;
    }
    const gap = u - (n1 * n2) / 2;
    return normalFromP(rankZ(gap, Math.sqrt(((n1 * n2) / 12) * variance), true, 'two-sided').p, gap);
  };
}

/** Sum of t^3 - t over groups of equal midranks. */
function tieSumOf(sorted: Float64Array): number {
  let sum = 0;
  for (let start = 0; start < sorted.length; ) {
    let end = start + 1;
    while (end < sorted.length && sorted[end] === sorted[start]) end++;
    sum += (end - start) ** 3 - (end - start);
    start = end;
  }
  return sum;
}
