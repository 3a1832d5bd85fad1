/** Trimmed means and their squares after some scores are taken out, without sorting again. */
import { sorted } from './order.ts';
import { requireScores, trimCount } from './scores.ts';

/** Ascending scores with running sums, about a centre near their middle. */
export interface SortedSums {
  /** Ascending scores minus `center`. */
  readonly scores: Float64Array;
  readonly center: number;
  /** Sum of the scores before each place, one longer than `scores`. */
  readonly sums: Float64Array;
  /** Sum of their squares before each place. */
  readonly squares: Float64Array;
}

/** What is left of a sample: trimmed mean, squared deviations of the winsorized scores, and the counts. */
export interface Remainder {
  center: number;
  /** (n - 1) times the winsorized variance. */
  squares: number;
  n: number;
  h: number;
}

/**
 * Running sums of the ascending scores.
 * @param x scores, at least one, finite
 * @returns scores about their middle one, with the sums before each place
 * @throws RangeError when empty or not finite
 * @source common practice: prefix sums; centring keeps the squares from cancelling
 * @checked by hand
 */
export function sortedSums(x: Float64Array): SortedSums {
  requireScores(x);
  const s = sorted(x);
  const center = s[s.length >> 1] as number;
  const scores = s.map((score) => score - center);
  const sums = new Float64Array(scores.length + 1);
  const squares = new Float64Array(scores.length + 1);
  scores.forEach((score, i) => {
    sums[i + 1] = (sums[i] as number) + score;
    squares[i + 1] = (squares[i] as number) + score * score;
  });
  return { scores, center, sums, squares };
}

/** Place among all scores of the one that is at `rank` (from 0) among those left. */
function placeOf(rank: number, removed: Int32Array, from: number, to: number, offset: number): number {
  let place = rank;
  for (let i = from; i < to && (removed[i] as number) - offset <= place; i++) place++;
  return place;
}

/**
 * The trimmed mean and winsorized squares of the scores left.
 * @param sums ascending scores with their running sums
 * @param removed places taken out, ascending, read from `from` up to but not including `to`
 * @param from first entry of `removed` that belongs to these scores
 * @param to entry after the last
 * @param offset what the places in `removed` are counted from
 * @param trim integer percentage at each end of what is left, 0 to 49
 * @param out receives the trimmed mean, (n - 1) times the winsorized variance, n and h left; NaN where fewer than two are
 * @throws RangeError when `trim` is not 0 to 49
 * @source g = floor(trim n / 100) of the n left; sum of the middle = difference of running sums minus what was taken out
 * @checked agrees with trimmedMean and winsorizedVariance of the scores left, rtol 1e-12
 */
export function remainder(
  sums: SortedSums,
  removed: Int32Array,
  from: number,
  to: number,
  offset: number,
  trim: number,
  out: Remainder,
): void {
  const n = sums.scores.length - (to - from);
  out.n = n;
  out.center = NaN;
  out.squares = NaN;
  out.h = 0;
  if (n < 1) return;
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  out.h = h;
  const low = placeOf(g, removed, from, to, offset);
  const high = placeOf(n - 1 - g, removed, from, to, offset);
  let total = (sums.sums[high + 1] as number) - (sums.sums[low] as number);
  let squares = (sums.squares[high + 1] as number) - (sums.squares[low] as number);
  for (let i = from; i < to; i++) {
    const place = (removed[i] as number) - offset;
    if (place < low || place > high) continue;
    const score = sums.scores[place] as number;
    total -= score;
    squares -= score * score;
  }
  const [least, most] = [sums.scores[low] as number, sums.scores[high] as number];
  const winsorized = total + g * (least + most);
  out.center = sums.center + total / h;
  if (h > 1) out.squares = Math.max(0, squares + g * (least * least + most * most) - (winsorized * winsorized) / n);
}

/**
 * Number of ways to choose k of n.
 * @param n how many there are, 0 or more
 * @param k how many are chosen, 0 to n
 * @returns C(n, k); exact below 2^53, else near it
 * @source common practice
 * @checked by hand
 */
export function choices(n: number, k: number): number {
  let count = 1;
  for (let i = 1; i <= Math.min(k, n - k); i++) count = (count * (n - Math.min(k, n - k) + i)) / i;
  return count < 2 ** 53 ? Math.round(count) : count;
}

/**
 * The next choice of k of n in order.
 * @param chosen ascending places, 0 to n - 1; overwritten (the one argument that is)
 * @param n how many there are
 * @returns false after the last one
 * @source common practice: the last place that can move on does, those behind it follow
 * @checked by hand
 */
export function nextChoice(chosen: Int32Array, n: number): boolean {
  const k = chosen.length;
  let at = k - 1;
  while (at >= 0 && chosen[at] === n - k + at) at--;
  if (at < 0) return false;
  chosen[at] = (chosen[at] as number) + 1;
  for (let i = at + 1; i < k; i++) chosen[i] = (chosen[i - 1] as number) + 1;
  return true;
}
