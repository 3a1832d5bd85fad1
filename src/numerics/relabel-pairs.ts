/** A grid of rows of pairs under relabelling: the two scores of a participant change places, the order is kept. */
import { noSpread } from './inference.ts';
import { ranks } from './order.ts';
import { decimalTies } from './rank-test.ts';
import { middleOf } from './relabel-groups.ts';
import { signedRankZ } from './relabel-ranks.ts';
import { type CentreOut, centreOutFor, fillCentreOut } from './relabel-sums.ts';
import { replaceByNormal } from './relabel-z.ts';
import { walshAverage } from './selection.ts';

/** A row whose estimate and test the kernel gives. */
export type PairRow =
  | { readonly row: 'paired-t' }
  | { readonly row: 'trimmed'; readonly trim: number }
  | { readonly row: 'winsorized'; readonly trim: number }
  /** Difference of the marginal trimmed means. */
  | { readonly row: 'marginal'; readonly trim: number }
  /** Hodges-Lehmann estimate with the signed-rank test. */
  | { readonly row: 'signed-rank' };

/** Scores that must be left after trimming for a test to be given. */
const LEAST = 4;
/** Pairs up to which all Walsh averages are formed and the middle one selected. */
const FEW = 90;

/** Positions and values of something sorted once. */
interface Order {
  readonly place: Int32Array;
  readonly value: Float64Array;
}

function sortedOnce(values: Float64Array): Order {
  const place = Int32Array.from({ length: values.length }, (_, i) => i);
  place.sort((a, b) => (values[a] as number) - (values[b] as number) || a - b);
  return { place, value: Float64Array.from(place, (i) => values[i] as number) };
}

/** What a signed-rank test keeps under relabelling: ranks of the sizes, signs as they are, and Z of every sum. */
interface SignedRanks {
  readonly ranks: Float64Array;
  readonly signs: Float64Array;
  readonly z: (positive: number) => number;
}

/** Null where every difference is zero. */
function signedRanksOf(d: Float64Array): SignedRanks | null {
  const signs = decimalTies(d);
  const used = signs.filter((value) => value !== 0);
  if (used.length === 0) return null;
  const own = ranks(used.map(Math.abs)).ranks;
  const all = new Float64Array(d.length);
  let at = 0;
  signs.forEach((value, i) => {
    if (value !== 0) all[i] = own[at++] as number;
  });
  return { ranks: all, signs, z: signedRankZ(own) };
}

/**
 * Rows of pairs under any exchange of the two scores within pairs.
 *
 * `run(labels, estimates, z, at)` writes one estimate (first minus second, the scores' unit; NaN without pairs) and one
 * signed normal deviate of its two-sided p (0 where no test is given) for each row, from place `at` on.
 * @source Student (1908), Tukey & McLaughlin (1963), Dixon & Tukey (1968), Yuen (1974), Wilcoxon (1945); one walk of the
 *   order of the sizes of the differences
 * @checked agrees with pairedT, trimmedMeanTest, winsorizedMeanTest, yuenPaired and signedRankTest, 1e-9
 */
export class RelabelledPairs {
  readonly #rows: readonly PairRow[];
  /** 1 / df of each row under the labels at hand; 0 where its place holds no t. */
  readonly #inverseDf: Float64Array;
  readonly #units: Int32Array;
  readonly #a: Float64Array;
  readonly #b: Float64Array;
  /** Differences a - b and the order of their sizes. */
  readonly #d: Float64Array;
  readonly #bySize: Order;
  /** Scores of a, then of b, in one order; place < n is a's. Made only where a marginal row asks. */
  readonly #pooled: Order | null;
  readonly #largestScore: number;
  readonly #largestDifference: number;
  readonly #sums: CentreOut;
  readonly #trimAt: readonly number[];
  readonly #margins: readonly [CentreOut, CentreOut];
  readonly #sorted: Float64Array;
  readonly #x: Float64Array;
  readonly #y: Float64Array;
  readonly #flips: Uint8Array;
  readonly #signs: SignedRanks | null;
  readonly #walsh: Float64Array;
  readonly #middle: number;

  /**
   * @param a one score a unit; NaN = the unit does not enter
   * @param b the other score of the unit
   * @param rows what is computed
   */
  constructor(a: Float64Array, b: Float64Array, rows: readonly PairRow[]) {
    const units: number[] = [];
    for (let i = 0; i < a.length; i++) if (!Number.isNaN(a[i]) && !Number.isNaN(b[i])) units.push(i);
    const n = units.length;
    this.#rows = rows;
    this.#inverseDf = new Float64Array(rows.length);
    this.#units = Int32Array.from(units);
    this.#a = Float64Array.from(units, (i) => a[i] as number);
    this.#b = Float64Array.from(units, (i) => b[i] as number);
    this.#d = this.#a.map((score, i) => score - (this.#b[i] as number));
    this.#bySize = sortedOnce(this.#d.map(Math.abs));
    this.#largestScore = Math.max(0, ...this.#a.map(Math.abs), ...this.#b.map(Math.abs));
    this.#largestDifference = n === 0 ? 0 : (this.#bySize.value[n - 1] as number);
    const trims = rows.map((row) => ('trim' in row && row.row !== 'marginal' ? row.trim : 0));
    this.#sums = centreOutFor(trims);
    const marginal = rows.flatMap((row) => (row.row === 'marginal' ? [row.trim] : []));
    this.#margins = [centreOutFor(marginal), centreOutFor(marginal)];
    this.#trimAt = rows.map((row, i) =>
      row.row === 'marginal' ? this.#margins[0].trims.indexOf(row.trim) : this.#sums.trims.indexOf(trims[i] as number),
    );
    const both = new Float64Array(2 * n);
    both.set(this.#a);
    both.set(this.#b, n);
    this.#pooled = marginal.length > 0 ? sortedOnce(both) : null;
    this.#middle = this.#pooled === null || n === 0 ? 0 : (this.#pooled.value[n] as number);
    this.#sorted = new Float64Array(n);
    this.#x = new Float64Array(n + 1);
    this.#y = new Float64Array(n + 1);
    this.#flips = new Uint8Array(n);
    const ranked = rows.some((row) => row.row === 'signed-rank');
    this.#walsh = new Float64Array(ranked && n <= FEW ? (n * (n + 1)) / 2 : 0);
    this.#signs = ranked ? signedRanksOf(this.#d) : null;
  }

  /** @param labels 0 = a is the first score, anything else b, one a unit */
  run(labels: Uint8Array, estimates: Float64Array, z: Float64Array, at: number): void {
    const n = this.#units.length;
    if (n === 0) {
      estimates.fill(Number.NaN, at, at + this.#rows.length);
      z.fill(0, at, at + this.#rows.length);
      return;
    }
    for (let i = 0; i < n; i++) this.#flips[i] = labels[this.#units[i] as number] === 0 ? 0 : 1;
    this.#sortDifferences();
    fillCentreOut(this.#sums, this.#sorted, n);
    if (this.#pooled !== null) this.#sortMargins(this.#pooled);
    for (let i = 0; i < this.#rows.length; i++) this.#row(i, estimates, z, at + i);
    replaceByNormal(z, at, this.#inverseDf, this.#rows.length);
  }

  /** Differences in ascending order: the negative ones by falling size, then the others by rising size. */
  #sortDifferences(): void {
    const { place, value } = this.#bySize;
    const d = this.#d;
    const flips = this.#flips;
    const out = this.#sorted;
    const n = place.length;
    let negative = 0;
    for (let i = 0; i < n; i++) negative += (d[i] as number) < 0 === (flips[i] === 0) && d[i] !== 0 ? 1 : 0;
    let down = negative;
    let up = negative;
    for (let k = 0; k < n; k++) {
      const i = place[k] as number;
      const size = value[k] as number;
      if (size !== 0 && (d[i] as number) < 0 === (flips[i] === 0)) out[--down] = -size;
      else out[up++] = size;
    }
  }

  #sortMargins({ place, value }: Order): void {
    const n = this.#units.length;
    let nx = 0;
    for (let k = 0; k < 2 * n; k++) {
      const i = place[k] as number;
      const score = (value[k] as number) - this.#middle;
      const isX = i < n === (this.#flips[i < n ? i : i - n] === 0) ? 1 : 0;
      this.#x[nx] = score;
      this.#y[k - nx] = score;
      nx += isX;
    }
    fillCentreOut(this.#margins[0], this.#x, n);
    fillCentreOut(this.#margins[1], this.#y, n);
  }

  #row(i: number, estimates: Float64Array, z: Float64Array, at: number): void {
    const row = this.#rows[i] as PairRow;
    const j = this.#trimAt[i] as number;
    z[at] = 0;
    this.#inverseDf[i] = 0;
    if (row.row === 'marginal') this.#marginalRow(i, j, estimates, z, at);
    else if (row.row === 'signed-rank') this.#signedRankRow(estimates, z, at);
    else this.#differencesRow(row, i, j, estimates, z, at);
  }

  #differencesRow(
    row: Exclude<PairRow, { row: 'marginal' | 'signed-rank' }>,
    i: number,
    j: number,
    estimates: Float64Array,
    z: Float64Array,
    at: number,
  ): void {
    const n = this.#units.length;
    const g = this.#sums.g[j] as number;
    const h = n - 2 * g;
    const squares = this.#sums.squares[j] as number;
    const estimate = (row.row === 'winsorized' ? this.#sums.winsorized : this.#sums.trimmed)[j] as number;
    estimates[at] = estimate;
    if (h < LEAST) return;
    const sd = Math.sqrt(squares / (n - 1));
    const size = row.row === 'paired-t' ? this.#largestScore : this.#sizeOf(row.row, g);
    if (noSpread(sd, size)) return;
    const se =
      row.row === 'winsorized'
        ? (sd * (n - 1)) / ((h - 1) * Math.sqrt(n))
        : (100 * sd) / ((row.row === 'trimmed' ? 100 - 2 * row.trim : 100) * Math.sqrt(n));
    z[at] = estimate / se;
    this.#inverseDf[i] = 1 / (h - 1);
  }

  #sizeOf(row: 'trimmed' | 'winsorized', g: number): number {
    if (row === 'trimmed') return this.#largestDifference;
    const n = this.#units.length;
    return Math.max(Math.abs(this.#sorted[g] as number), Math.abs(this.#sorted[n - 1 - g] as number));
  }

  #marginalRow(i: number, j: number, estimates: Float64Array, z: Float64Array, at: number): void {
    const [x, y] = this.#margins;
    const n = this.#units.length;
    const g = x.g[j] as number;
    const h = n - 2 * g;
    const estimate = (x.trimmed[j] as number) - (y.trimmed[j] as number);
    estimates[at] = estimate;
    if (h < LEAST) return;
    const products = this.#winsorizedProducts(g, x.winsorized[j] as number, y.winsorized[j] as number);
    const spread = ((x.squares[j] as number) + (y.squares[j] as number) - 2 * products) / (n - 1);
    if (noSpread(Math.sqrt(Math.max(0, spread)), this.#largestScore)) return;
    z[at] = estimate / Math.sqrt(((n - 1) * spread) / (h * (h - 1)));
    this.#inverseDf[i] = 1 / (h - 1);
  }

  /** Sum of products of the deviations of the winsorized pairs. */
  #winsorizedProducts(g: number, meanX: number, meanY: number): number {
    const n = this.#units.length;
    const lowX = this.#x[g] as number;
    const highX = this.#x[n - 1 - g] as number;
    const lowY = this.#y[g] as number;
    const highY = this.#y[n - 1 - g] as number;
    let sum = 0;
    for (let i = 0; i < n; i++) {
      const flipped = this.#flips[i] !== 0;
      const a = (this.#a[i] as number) - this.#middle;
      const b = (this.#b[i] as number) - this.#middle;
      const x = flipped ? b : a;
      const y = flipped ? a : b;
      sum += (Math.min(Math.max(x, lowX), highX) - meanX) * (Math.min(Math.max(y, lowY), highY) - meanY);
    }
    return sum;
  }

  #signedRankRow(estimates: Float64Array, z: Float64Array, at: number): void {
    estimates[at] = this.#middleWalsh();
    if (this.#signs === null || this.#units.length < LEAST) return;
    const { ranks: own, signs, z: zOf } = this.#signs;
    let positive = 0;
    for (let i = 0; i < own.length; i++) {
      const sign = signs[i] as number;
      if (sign !== 0 && sign > 0 === (this.#flips[i] === 0)) positive += own[i] as number;
    }
    z[at] = zOf(positive);
  }

  #middleWalsh(): number {
    const s = this.#sorted;
    const n = s.length;
    const count = (n * (n + 1)) / 2;
    if (n > FEW) {
      const low = walshAverage(s, (count + 1) >> 1);
      return count % 2 === 1 ? low : low + (walshAverage(s, count / 2 + 1) - low) / 2;
    }
    let at = 0;
    for (let i = 0; i < n; i++) {
      const own = s[i] as number;
      for (let j = i; j < n; j++) this.#walsh[at++] = (own + (s[j] as number)) / 2;
    }
    return middleOf(this.#walsh);
  }
}
