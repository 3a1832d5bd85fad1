/** Permutation tests of a mean difference with the interval they belong to: the values they do not reject. */
import { bootstrapTInference } from '../numerics/bootstrap-limits.ts';
import type { Alternative } from '../numerics/inference.ts';
import { mean, variance } from '../numerics/moments.ts';
import { type Rng, rng } from '../numerics/rng.ts';
import type { Limits } from './finding.ts';

/** Most relabellings that are tried one by one; above, they are drawn. */
export const MOST_ENUMERATED = 200_000;

const STREAM = { flips: 121, splits: 122 } as const;

export interface PermutationOptions {
  readonly alternative: Alternative;
  readonly level: number;
  /** Relabellings drawn where there are too many to try. */
  readonly resamples: number;
  readonly seed: number;
}

export interface PermutationTest {
  readonly p: number | null;
  readonly interval: Limits | null;
  /** How p was found: "all 1,024 sign flips", "1,999 relabellings drawn". */
  readonly how: string;
  readonly reason?: string;
}

/**
 * Sign-flip test of the mean of differences, and the interval of the means it does not reject.
 *
 * @param d differences, at least one, finite
 * @param options direction, level, B, seed; all 2^n flips are tried up to n = 17, else B subsets are drawn
 * @returns p, two-sided as twice the smaller tail; limits are order statistics of the subset means, so that p <= alpha
 *   exactly when 0 lies outside
 * @source Fisher 1935, 21; interval: the means of subsets are typical values of the centre (Hartigan 1969)
 * @checked agrees with the reference cases permutation_paired_mean, rtol 1e-9
 */
export function signFlipTest(d: Float64Array, options: PermutationOptions): PermutationTest {
  const exact = 2 ** d.length <= MOST_ENUMERATED;
  const values = exact ? everySubset(d) : drawnSubsets(d, options);
  const how = exact ? `all ${words(2 ** d.length)} sign flips` : `sign flips, ${words(options.resamples)} drawn`;
  return { ...readOff(values, options, size(d)), how };
}

/**
 * Permutation test of a difference of means of two groups, and the interval of the shifts it does not reject.
 *
 * @param x scores of the first group, at least two, finite
 * @param y scores of the second group, at least two, finite
 * @param options direction, level, B, seed; every split is tried up to 200,000, else B are drawn
 * @returns p; with every split by the difference of means, two-sided as twice the smaller tail, limits from the
 *   differences of subset means; with drawn splits by Welch's t, limits estimate -+ critical t* times SE
 * @source Pitman 1937; drawn splits studentized: Janssen 1997, with (b + 1) / (B + 1)
 * @checked agrees with the reference cases permutation_mean_difference, rtol 1e-9
 */
export function splitTest(x: Float64Array, y: Float64Array, options: PermutationOptions): PermutationTest {
  const splits = splitsOf(x.length, y.length);
  if (splits <= MOST_ENUMERATED) {
    const values = everyExchange(x, y, splits);
    return { ...readOff(values, options, size(x) + size(y)), how: `all ${words(splits)} splits, smaller tail doubled` };
  }
  return studentizedSplits(x, y, options);
}

/** Number of ways to split n1 + n2 scores into groups of these sizes. */
export function splitsOf(n1: number, n2: number): number {
  let ways = 1;
  for (let i = 1; i <= Math.min(n1, n2) && ways < 1e15; i++) ways = (ways * (Math.max(n1, n2) + i)) / i;
  return Math.round(ways);
}

/** Values not rejected: p counts those at or beyond 0, the relabelling observed itself among them. */
function readOff(values: Float64Array, options: PermutationOptions, scale: number): Omit<PermutationTest, 'how'> {
  const M = values.length;
  const grain = 1e-12 * scale;
  let below = 0;
  let above = 0;
  for (const value of values) {
    if (value <= grain) below++;
    if (value >= -grain) above++;
  }
  const greater = (below + 1) / (M + 1);
  const less = (above + 1) / (M + 1);
  const { alternative, level } = options;
  const p =
    alternative === 'greater' ? greater : alternative === 'less' ? less : Math.min(1, 2 * Math.min(greater, less));
  const tail = alternative === 'two-sided' ? (1 - level) / 2 : 1 - level;
  const k = Math.floor(tail * (M + 1) + 1e-9);
  if (k < 1) return { p, interval: null, reason: 'too few relabellings for an interval of this level' };
  const s = values.slice().sort();
  const low = alternative === 'less' ? null : (s[k - 1] as number);
  return { p, interval: [low, alternative === 'greater' ? null : (s[M - k] as number)] };
}

function everySubset(d: Float64Array): Float64Array {
  const values = new Float64Array(2 ** d.length - 1);
  const inside = new Uint8Array(d.length);
  let sum = 0;
  let count = 0;
  // Gray code: one score enters or leaves at a time.
  for (let step = 1; step <= values.length; step++) {
    const which = 31 - Math.clz32(step & -step);
    const sign = inside[which] === 1 ? -1 : 1;
    inside[which] = sign === 1 ? 1 : 0;
    sum += sign * (d[which] as number);
    count += sign;
    values[step - 1] = sum / count;
  }
  return values;
}

function drawnSubsets(d: Float64Array, options: PermutationOptions): Float64Array {
  const random = rng(options.seed, STREAM.flips);
  const values = new Float64Array(options.resamples);
  for (let b = 0; b < values.length; b++) {
    let count = 0;
    let sum = 0;
    while (count === 0) {
      sum = 0;
      for (let i = 0, word = 0; i < d.length; i++, word >>>= 1) {
        if (i % 32 === 0) word = random.word();
        if ((word & 1) === 0) continue;
        sum += d[i] as number;
        count++;
      }
    }
    values[b] = sum / count;
  }
  return values;
}

/** Mean of the scores that leave the first group minus mean of those that enter it, for every split but the observed. */
function everyExchange(x: Float64Array, y: Float64Array, splits: number): Float64Array {
  const n = x.length + y.length;
  const all = Float64Array.from([...x, ...y]);
  const chosen = Int32Array.from({ length: x.length }, (_, i) => i);
  const values = new Float64Array(splits - 1);
  const total = x.reduce((sum, value) => sum + value, 0);
  for (let at = 0; next(chosen, n) && at < values.length; at++) {
    let stayed = 0;
    let entered = 0;
    let count = 0;
    for (const i of chosen) {
      if (i < x.length) stayed += all[i] as number;
      else {
        entered += all[i] as number;
        count++;
      }
    }
    values[at] = (total - stayed - entered) / count;
  }
  return values;
}

function next(chosen: Int32Array, n: number): boolean {
  let at = chosen.length - 1;
  while (at >= 0 && chosen[at] === n - chosen.length + at) at--;
  if (at < 0) return false;
  chosen[at] = (chosen[at] as number) + 1;
  for (let i = at + 1; i < chosen.length; i++) chosen[i] = (chosen[i - 1] as number) + 1;
  return true;
}

function studentizedSplits(x: Float64Array, y: Float64Array, options: PermutationOptions): PermutationTest {
  const how = `studentized relabelling, ${words(options.resamples)} drawn`;
  const se = Math.sqrt(variance(x) / x.length + variance(y) / y.length);
  const estimate = mean(x) - mean(y);
  if (!(se > 1e-14 * size(x))) return { p: null, interval: null, how, reason: 'the scores of both groups do not vary' };
  const all = Float64Array.from([...x, ...y]);
  const center = mean(all);
  const moved = all.map((value) => value - center);
  const random = rng(options.seed, STREAM.splits);
  const ts = new Float64Array(options.resamples);
  for (let b = 0; b < ts.length; b++) ts[b] = shuffledT(moved, x.length, random);
  const found = bootstrapTInference(ts, estimate, se, 0, options.level, options.alternative, 'symmetric');
  return { ...found, how };
}

/** Moves a random choice of n1 scores to the front, and gives Welch's t of the two parts; `all` has mean 0. */
function shuffledT(all: Float64Array, n1: number, random: Rng): number {
  const n = all.length;
  for (let i = 0; i < n1; i++) {
    const j = i + random.below(n - i);
    const kept = all[i] as number;
    all[i] = all[j] as number;
    all[j] = kept;
  }
  const [a, b] = [moments(all, 0, n1), moments(all, n1, n)];
  const squared = a.squared + b.squared;
  const gap = a.mean - b.mean;
  return squared > 0 ? gap / Math.sqrt(squared) : gap === 0 ? 0 : Math.sign(gap) * Number.MAX_VALUE;
}

function moments(all: Float64Array, from: number, to: number): { mean: number; squared: number } {
  const n = to - from;
  let sum = 0;
  for (let i = from; i < to; i++) sum += all[i] as number;
  const own = sum / n;
  let squares = 0;
  for (let i = from; i < to; i++) squares += ((all[i] as number) - own) ** 2;
  return { mean: own, squared: squares / (n - 1) / n };
}

function size(values: Float64Array): number {
  return values.reduce((total, value) => total + Math.abs(value), 0);
}

function words(n: number): string {
  return String(n).replace(/\B(?=(\d{3})+(?!\d))/g, ',');
}
