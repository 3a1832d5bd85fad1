import { exactUnits } from './exact-units.ts';
import { pooled } from './mann-whitney.ts';
import { mean } from './moments.ts';
import { requireScores } from './scores.ts';

/** Work allowed: additions over whole units, else the number of splits. */
const MOST_STEPS = 3e8;
const MOST_STATES = 1e7;
const MOST_ENUMERATED = 5e6;

export interface TwoGroupPermutation {
  /** Difference of means, first minus second. */
  readonly estimate: number;
  /** C(N, n1). */
  readonly splits: number;
  /** Share of splits with |difference| at least the observed. */
  readonly pTwoSided: number | null;
  /** min(1, twice the smaller one-sided p). */
  readonly pDoubled: number | null;
  readonly pGreater: number | null;
  readonly pLess: number | null;
  readonly reason?: string;
}

interface Shares {
  readonly both: number;
  readonly above: number;
  readonly below: number;
}

function splitsOf(N: number, n1: number): number {
  let count = 1;
  for (let i = 1; i <= Math.min(n1, N - n1); i++) count = (count * (N - Math.min(n1, N - n1) + i)) / i;
  return count < 2 ** 53 ? Math.round(count) : count;
}

/** How a sum of the first group compares with the observed one, by difference of means: N sum - n1 total, up to a factor. */
function shares(sums: Iterable<readonly [number, number]>, observed: number, center: number, grain: number): Shares {
  let both = 0;
  let above = 0;
  let below = 0;
  let all = 0;
  const gap = Math.abs(observed - center);
  for (const [sum, times] of sums) {
    all += times;
    if (Math.abs(sum - center) >= gap - grain) both += times;
    if (sum >= observed - grain) above += times;
    if (sum <= observed + grain) below += times;
  }
  return { both: both / all, above: above / all, below: below / all };
}

/** Number of ways each sum of n1 of the units arises; the units are moved to start at 0. */
function sumCounts(units: Float64Array, n1: number, width: number): Float64Array {
  const ways = new Float64Array((n1 + 1) * width);
  ways[0] = 1;
  units.forEach((unit, used) => {
    for (let k = Math.min(n1, used + 1); k >= 1; k--) {
      const to = k * width;
      const from = to - width;
      for (let sum = width - 1; sum >= unit; sum--) ways[to + sum]! += ways[from + sum - unit] as number;
    }
  });
  return ways.subarray(n1 * width);
}

function fromUnits(units: Float64Array, n1: number): Shares | null {
  const N = units.length;
  const least = units.reduce((low, value) => Math.min(low, value), Infinity);
  const moved = units.map((value) => value - least);
  const top = moved
    .slice()
    .sort()
    .subarray(N - n1);
  const width = top.reduce((all, value) => all + value, 0) + 1;
  if (width * (n1 + 1) > MOST_STATES || width * n1 * N > MOST_STEPS) return null;
  const ways = sumCounts(moved, n1, width);
  const total = moved.reduce((all, value) => all + value, 0);
  let observed = 0;
  for (let i = 0; i < n1; i++) observed += moved[i] as number;
  return shares(ways.entries(), observed, (n1 * total) / N, 1e-9);
}

/** Every split in turn, by the next combination in order. */
function* sumsOfSplits(all: Float64Array, n1: number): Generator<readonly [number, number]> {
  const N = all.length;
  const chosen = Int32Array.from({ length: n1 }, (_, i) => i);
  for (;;) {
    let sum = 0;
    for (const i of chosen) sum += all[i] as number;
    yield [sum, 1];
    let at = n1 - 1;
    while (at >= 0 && chosen[at] === N - n1 + at) at--;
    if (at < 0) return;
    chosen[at]!++;
    for (let i = at + 1; i < n1; i++) chosen[i] = (chosen[i - 1] as number) + 1;
  }
}

function enumerated(all: Float64Array, n1: number): Shares {
  const center = mean(all);
  const moved = all.map((score) => score - center);
  let observed = 0;
  let size = 0;
  for (let i = 0; i < n1; i++) observed += moved[i] as number;
  for (const value of moved) size += Math.abs(value);
  return shares(sumsOfSplits(moved, n1), observed, 0, 1e-12 * size);
}

/**
 * Exact permutation test of a difference of means of two independent groups: all splits.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @returns estimate, splits, pTwoSided (by |difference|), pDoubled, pGreater, pLess; null with a reason when the splits can
 *   neither be counted over whole units nor enumerated
 * @throws RangeError when a group is empty or not finite
 * @source Pitman (1937); counting over whole units: Pagano & Tritchler (1983)
 * @checked cases `permutation_mean_difference`, rtol 1e-9
 */
export function permutationTwoGroups(x: Float64Array, y: Float64Array): TwoGroupPermutation {
  requireScores(x);
  requireScores(y, 1, 'y');
  const all = pooled(x, y);
  const n1 = x.length;
  const splits = splitsOf(all.length, n1);
  const counts = { estimate: mean(x) - mean(y), splits };
  const exact = exactUnits(all, 2 ** 45);
  const own = (exact && fromUnits(exact.units, n1)) ?? (splits <= MOST_ENUMERATED ? enumerated(all, n1) : null);
  if (own === null) {
    const none = { pTwoSided: null, pDoubled: null, pGreater: null, pLess: null };
    return { ...counts, ...none, reason: 'too many splits to try every one' };
  }
  const pDoubled = Math.min(1, 2 * Math.min(own.above, own.below));
  return { ...counts, pTwoSided: own.both, pDoubled, pGreater: own.above, pLess: own.below };
}
