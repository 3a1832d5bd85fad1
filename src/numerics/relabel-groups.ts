/** A grid of rows of two groups under relabelling: sorted once, every relabelling is one walk that fills two groups. */
import { largestSize } from './inference.ts';
import { ranks } from './order.ts';
import { rankSumZ } from './relabel-ranks.ts';
import { type CentreOut, centreOutFor, fillCentreOut } from './relabel-sums.ts';
import { replaceByNormal } from './relabel-z.ts';
import { pairDifference, selectKth } from './selection.ts';

/** A row whose estimate and test the kernel gives. */
export type GroupRow =
  | { readonly row: 'student' }
  /** Welch's test where nothing is trimmed. */
  | { readonly row: 'yuen'; readonly trim: number }
  /** Hodges-Lehmann shift with the Mann-Whitney test. */
  | { readonly row: 'rank-sum' };

/** Scores a group must have after trimming for a test to be given. */
const LEAST = 4;
/** Differences up to which all are formed and the middle one selected. */
const FEW_PAIRS = 4096;

/**
 * Rows of two groups under any labels of the same scores.
 *
 * `run(labels, estimates, z, at)` writes one estimate (first minus second, the scores' unit; NaN with an empty group) and
 * one signed normal deviate of its two-sided p (0 where no test is given) for each row, from place `at` on.
 * @source Student (1908), Welch (1938), Yuen (1974), Mann & Whitney (1947); one walk of the pooled order
 * @checked agrees with studentT, yuenWelch, hodgesLehmannShift and mannWhitney, 1e-9
 */
export class RelabelledGroups {
  readonly #rows: readonly GroupRow[];
  readonly #order: Int32Array;
  /** Scores about their pooled median, in that order. */
  readonly #scores: Float64Array;
  readonly #ranks: Float64Array;
  /** Square of the spread that is nothing but rounding error of the largest score. */
  readonly #grain: number;
  readonly #first: Float64Array;
  readonly #second: Float64Array;
  readonly #sums: readonly [CentreOut, CentreOut];
  readonly #trimAt: readonly number[];
  /** 1 / k for every count of scores. */
  readonly #inverse: Float64Array;
  /** 1 / df of each row under the labels at hand; 0 where its place holds no t. */
  readonly #inverseDf: Float64Array;
  readonly #rankZ: ((u: number, n1: number) => number) | null;
  #n1 = 0;
  #n2 = 0;
  #rankSum = 0;

  /**
   * @param scores one score a unit; NaN = the unit does not enter
   * @param rows what is computed
   */
  constructor(scores: Float64Array, rows: readonly GroupRow[]) {
    const entered = Int32Array.from({ length: scores.length }, (_, i) => i).filter((i) => !Number.isNaN(scores[i]));
    this.#order = entered.sort((a, b) => (scores[a] as number) - (scores[b] as number) || a - b);
    const n = this.#order.length;
    const middle = n === 0 ? 0 : (scores[this.#order[n >> 1] as number] as number);
    const raw = Float64Array.from(this.#order, (i) => scores[i] as number);
    this.#scores = raw.map((score) => score - middle);
    this.#grain = (4 * Number.EPSILON * largestSize(raw)) ** 2;
    this.#ranks = ranks(raw).ranks;
    this.#first = new Float64Array(n);
    this.#second = new Float64Array(n);
    this.#rows = rows;
    this.#inverse = Float64Array.from({ length: n + 1 }, (_, k) => 1 / k);
    this.#inverseDf = new Float64Array(rows.length);
    const trims = rows.map((row) => (row.row === 'yuen' ? row.trim : 0));
    this.#sums = [centreOutFor(trims), centreOutFor(trims)];
    this.#trimAt = trims.map((trim) => this.#sums[0].trims.indexOf(trim));
    this.#rankZ = rows.some((row) => row.row === 'rank-sum') ? rankSumZ(this.#ranks) : null;
  }

  /** @param labels 0 = first group, 1 = second, one a unit */
  run(labels: Uint8Array, estimates: Float64Array, z: Float64Array, at: number): void {
    this.#split(labels);
    const empty = this.#n1 === 0 || this.#n2 === 0;
    if (!empty) {
      fillCentreOut(this.#sums[0], this.#first, this.#n1);
      fillCentreOut(this.#sums[1], this.#second, this.#n2);
    }
    for (let i = 0; i < this.#rows.length; i++) {
      const row = this.#rows[i] as GroupRow;
      z[at + i] = 0;
      this.#inverseDf[i] = 0;
      if (empty) estimates[at + i] = Number.NaN;
      else if (row.row === 'rank-sum') this.#rankSumRow(estimates, z, at + i);
      else this.#tRow(i, row.row === 'student', estimates, z, at + i);
    }
    replaceByNormal(z, at, this.#inverseDf, this.#rows.length);
  }

  #split(labels: Uint8Array): void {
    const order = this.#order;
    const scores = this.#scores;
    const first = this.#first;
    const second = this.#second;
    const n = order.length;
    let n1 = 0;
    for (let k = 0; k < n; k++) {
      const score = scores[k] as number;
      // Both are written and one is kept: which one is up to chance, and a branch on chance costs more than a store.
      first[n1] = score;
      second[k - n1] = score;
      n1 += 1 - (labels[order[k] as number] as number);
    }
    this.#n1 = n1;
    this.#n2 = n - n1;
    if (this.#rankZ !== null) this.#sumRanks(labels);
  }

  #sumRanks(labels: Uint8Array): void {
    const order = this.#order;
    const ranksInOrder = this.#ranks;
    let sum = 0;
    for (let k = 0; k < order.length; k++) {
      if (labels[order[k] as number] === 0) sum += ranksInOrder[k] as number;
    }
    this.#rankSum = sum;
  }

  /** Leaves t in the row's place of z, and 1 / df beside it. */
  #tRow(i: number, pooled: boolean, estimates: Float64Array, z: Float64Array, at: number): void {
    const j = this.#trimAt[i] as number;
    const a = this.#sums[0];
    const b = this.#sums[1];
    const h1 = this.#n1 - 2 * (a.g[j] as number);
    const h2 = this.#n2 - 2 * (b.g[j] as number);
    const estimate = (a.trimmed[j] as number) - (b.trimmed[j] as number);
    estimates[at] = estimate;
    if (h1 < LEAST || h2 < LEAST) return;
    const q1 = a.squares[j] as number;
    const q2 = b.squares[j] as number;
    if (!(q1 + q2 > this.#grain * (this.#n1 + this.#n2 - 2))) return;
    if (pooled) {
      const df = h1 + h2 - 2;
      z[at] = estimate / Math.sqrt(((q1 + q2) / df) * (1 / h1 + 1 / h2));
      this.#inverseDf[i] = 1 / df;
      return;
    }
    const v1 = this.#inverse[h1 - 1] as number;
    const v2 = this.#inverse[h2 - 1] as number;
    const d1 = q1 * v1 * (this.#inverse[h1] as number);
    const d2 = q2 * v2 * (this.#inverse[h2] as number);
    const share = d1 / (d1 + d2);
    z[at] = estimate / Math.sqrt(d1 + d2);
    this.#inverseDf[i] = share * share * v1 + (1 - share) * (1 - share) * v2;
  }

  #rankSumRow(estimates: Float64Array, z: Float64Array, at: number): void {
    const n1 = this.#n1;
    const n2 = this.#n2;
    estimates[at] = shiftOf(this.#first.subarray(0, n1), this.#second.subarray(0, n2));
    if (Math.min(n1, n2) < LEAST || this.#rankZ === null) return;
    z[at] = this.#rankZ(this.#rankSum - (n1 * (n1 + 1)) / 2, n1);
  }
}

/** Median of all differences of two ascending groups. */
function shiftOf(s: Float64Array, t: Float64Array): number {
  const count = s.length * t.length;
  const k = (count + 1) >> 1;
  if (count > FEW_PAIRS) {
    const low = pairDifference(s, t, k);
    return count % 2 === 1 ? low : low + (pairDifference(s, t, k + 1) - low) / 2;
  }
  const all = new Float64Array(count);
  let at = 0;
  for (let i = 0; i < s.length; i++) {
    const own = s[i] as number;
    for (let j = 0; j < t.length; j++) all[at++] = own - (t[j] as number);
  }
  return middleOf(all);
}

/**
 * Median of a list, which is reordered.
 * @param list numbers, at least one, no NaN; reordered
 * @returns the middle one, or the mean of the two middle ones
 * @source common practice
 * @checked agrees with median, exactly
 */
export function middleOf(list: Float64Array): number {
  const n = list.length;
  const k = (n + 1) >> 1;
  const low = selectKth(list, k);
  if (n % 2 === 1) return low;
  // After the selection nothing beyond place k is smaller: the next one is the least of the rest.
  let high = Infinity;
  for (let i = k; i < n; i++) high = Math.min(high, list[i] as number);
  return low + (high - low) / 2;
}
