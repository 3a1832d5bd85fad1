import { cholesky, choleskyLogDeterminant, forwardSolve } from '../cholesky.ts';
import { type Matrix, matrix } from '../matrix.ts';

/** Rows of a subset with their middle, covariance (divisor: rows - 1) and its log determinant. */
export interface SubsetFit {
  /** Row indices, ascending. */
  readonly indices: Int32Array;
  readonly center: Float64Array;
  readonly covariance: Matrix;
  /** Cholesky factor of the covariance. */
  readonly lower: Matrix;
  readonly logDeterminant: number;
}

/** Up to this many candidate subsets all are tried; above, this many are drawn. */
const EXHAUSTIVE = 3000;
const KEPT = 10;

/**
 * Middle and covariance of some rows.
 * @param data n by p, one row a case
 * @param indices rows to use, at least two
 * @returns the fit, or null when the covariance has no inverse
 * @source common practice; divisor: rows - 1
 * @checked by hand, 1e-14
 */
export function fitRows(data: Matrix, indices: Int32Array): SubsetFit | null {
  const p = data.cols;
  const center = new Float64Array(p);
  for (const i of indices) for (let j = 0; j < p; j++) center[j] = center[j]! + data.data[i * p + j]! / indices.length;
  const spread = matrix(p, p);
  for (const i of indices) {
    for (let j = 0; j < p; j++) {
      const from = data.data[i * p + j]! - center[j]!;
      for (let k = 0; k <= j; k++) {
        spread.data[j * p + k] = spread.data[j * p + k]! + from * (data.data[i * p + k]! - center[k]!);
      }
    }
  }
  for (let j = 0; j < p; j++) {
    for (let k = 0; k <= j; k++) {
      spread.data[j * p + k] = spread.data[j * p + k]! / (indices.length - 1);
      spread.data[k * p + j] = spread.data[j * p + k]!;
    }
  }
  const lower = cholesky(spread);
  if (lower === null) return null;
  return { indices, center, covariance: spread, lower, logDeterminant: choleskyLogDeterminant(lower) };
}

/**
 * Squared distances of all rows from a fit.
 * @param data n by p
 * @param fit middle and covariance
 * @returns n squared distances
 * @source Mahalanobis 1936, |L^-1 (x - m)|^2
 * @checked by hand, 1e-14
 */
export function distancesFrom(data: Matrix, fit: SubsetFit): Float64Array {
  const p = data.cols;
  const l = fit.lower.data;
  const out = new Float64Array(data.rows);
  const part = new Float64Array(p);
  for (let i = 0; i < data.rows; i++) {
    let total = 0;
    for (let j = 0; j < p; j++) {
      let value = data.data[i * p + j]! - fit.center[j]!;
      for (let k = 0; k < j; k++) value -= l[j * p + k]! * part[k]!;
      part[j] = value / l[j * p + j]!;
      total += part[j]! * part[j]!;
    }
    out[i] = total;
  }
  return out;
}

/**
 * The h rows whose covariance has the smallest determinant: exact where all candidates can be tried, else the best of
 * many starts, each improved by concentration and by exchange of single rows until it no longer shrinks.
 * @param data n by p
 * @param h rows in the subset, more than p, at most n
 * @param below draws a whole number from 0 to its argument - 1
 * @returns the fit of the best subset found, or null when h rows (or all) have a covariance without inverse
 * @source Rousseeuw & Van Driessen 1999, Technometrics 41, 212-223: concentration steps from (p+1)-subsets; Hawkins 1994,
 *   Comput. Stat. Data Anal. 17, 197-210: exchanges
 * @checked outside check cases mcd_mahalanobis, relative 1e-7; exact enumeration of small samples
 */
export function smallestDeterminant(data: Matrix, h: number, below: (bound: number) => number): SubsetFit | null {
  const { rows: n, cols: p } = data;
  const all = fitRows(
    data,
    Int32Array.from({ length: n }, (_, i) => i),
  );
  if (all === null || h === n) return all;
  const exact = p === 1 ? windows(data, h) : choose(n, h) <= EXHAUSTIVE ? subsetsOf(n, h) : null;
  if (exact !== null) {
    const fits = exact.map((indices) => fitRows(data, indices));
    return fits.includes(null) ? null : fits.reduce((best, fit) => better(best, fit));
  }
  const kept: SubsetFit[] = [];
  for (const start of starts(data, h, below, all)) {
    const fit = concentrate(data, h, start, 2);
    if (fit === null) return null;
    keepBest(kept, fit);
  }
  const final = kept.map((fit) => settle(data, h, fit));
  return final.includes(null) ? null : final.reduce((best, fit) => better(best, fit));
}

function better(best: SubsetFit | null, fit: SubsetFit | null): SubsetFit | null {
  return best !== null && fit !== null && fit.logDeterminant < best.logDeterminant - 1e-12 ? fit : best;
}

/** One variable: the smallest variance belongs to h neighbours in sorted order. */
function windows(data: Matrix, h: number): Int32Array[] {
  const order = Int32Array.from({ length: data.rows }, (_, i) => i).sort((a, b) => data.data[a]! - data.data[b]!);
  return Array.from({ length: data.rows - h + 1 }, (_, from) => order.slice(from, from + h).sort());
}

function choose(n: number, k: number): number {
  let count = 1;
  for (let i = 1; i <= Math.min(k, n - k); i++) count = (count * (n - i + 1)) / i;
  return Math.round(count);
}

/** All subsets of k of n, in lexicographic order. */
function subsetsOf(n: number, k: number): Int32Array[] {
  const out: Int32Array[] = [];
  const current = Int32Array.from({ length: k }, (_, i) => i);
  for (;;) {
    out.push(current.slice());
    let i = k - 1;
    while (i >= 0 && current[i] === n - k + i) i--;
    if (i < 0) return out;
    current[i] = current[i]! + 1;
    for (let j = i + 1; j < k; j++) current[j] = current[j - 1]! + 1;
  }
}

function starts(data: Matrix, h: number, below: (bound: number) => number, all: SubsetFit): SubsetFit[] {
  const { rows: n, cols: p } = data;
  if (choose(n, p + 1) <= EXHAUSTIVE) {
    const fits = subsetsOf(n, p + 1).map((indices) => fitRows(data, indices));
    return [all, ...fits.filter((fit) => fit !== null)];
  }
  const count = n <= 600 ? EXHAUSTIVE : EXHAUSTIVE / 6;
  const drawn = Array.from({ length: count }, () => drawnStart(data, h, below));
  return [all, ...drawn.filter((fit) => fit !== null)];
}

/** p + 1 rows at random, with more added while their covariance has no inverse. */
function drawnStart(data: Matrix, h: number, below: (bound: number) => number): SubsetFit | null {
  const order = Int32Array.from({ length: data.rows }, (_, i) => i);
  for (let size = 1; size <= h; size++) {
    const at = size - 1 + below(data.rows - size + 1);
    const taken = order[at]!;
    order[at] = order[size - 1]!;
    order[size - 1] = taken;
    const fit = size > data.cols ? fitRows(data, order.slice(0, size)) : null;
    if (fit !== null) return fit;
  }
  return null;
}

/**
 * Takes the h rows nearest to a fit and fits again, until the determinant no longer shrinks.
 * @param data n by p
 * @param h rows in the subset, more than p, at most n
 * @param start middle and covariance to begin from; of h rows it must be a fit of *data* itself
 * @param most largest number of steps
 * @returns the fit of the last subset; null for a subset without spread in some direction
 * @source Rousseeuw & Van Driessen 1999, Technometrics 41, 212-223: concentration steps
 * @checked by hand
 */
export function concentrate(data: Matrix, h: number, start: SubsetFit, most: number): SubsetFit | null {
  let fit = start;
  for (let step = 0; step < most; step++) {
    const next = fitRows(data, nearest(distancesFrom(data, fit), h));
    if (next === null) return null;
    const settled = fit.indices.length === h && next.logDeterminant >= fit.logDeterminant - 1e-13;
    fit = settled ? fit : next;
    if (settled) break;
  }
  return fit;
}

/** Concentrate and exchange single rows in turn until neither helps; null = a subset without spread. */
function settle(data: Matrix, h: number, start: SubsetFit): SubsetFit | null {
  let fit = concentrate(data, h, start, 200);
  // In large samples all exchanges cost more than they change.
  const rounds = h * (data.rows - h) <= 1e6 ? 200 : 0;
  for (let round = 0; fit !== null && round < rounds; round++) {
    const swapped = bestExchange(data, fit);
    if (swapped === null) return fit;
    fit = concentrate(data, h, swapped, 200);
  }
  return fit;
}

/** The subset after the exchange of one row that lowers the determinant most; null when none lowers it. */
function bestExchange(data: Matrix, fit: SubsetFit): SubsetFit | null {
  const h = fit.indices.length;
  const inside = new Set(fit.indices);
  const rows = Array.from({ length: data.rows }, (_, i) => whitened(data, fit, i));
  let best = { ratio: 1 - 1e-10, out: -1, into: -1 };
  for (const i of fit.indices) {
    for (let j = 0; j < data.rows; j++) {
      if (inside.has(j)) continue;
      const ratio = exchangeRatio(rows[i]!, rows[j]!, h);
      if (ratio < best.ratio) best = { ratio, out: i, into: j };
    }
  }
  if (best.out < 0) return null;
  return fitRows(data, fit.indices.map((i) => (i === best.out ? best.into : i)).sort());
}

/** L^-1 (x - m) of one row. */
function whitened(data: Matrix, fit: SubsetFit, i: number): Float64Array {
  const p = data.cols;
  return forwardSolve(
    fit.lower,
    Float64Array.from({ length: p }, (_, j) => data.data[i * p + j]! - fit.center[j]!),
  );
}

/** Determinant after row a is left out and row b taken in, over the determinant before (two rank-one updates). */
function exchangeRatio(a: Float64Array, b: Float64Array, h: number): number {
  let aa = 0;
  let ab = 0;
  let bb = 0;
  for (let k = 0; k < a.length; k++) {
    aa += a[k]! * a[k]!;
    ab += a[k]! * b[k]!;
    bb += b[k]! * b[k]!;
  }
  // In the metric of the scatter, which is (h - 1) times the covariance.
  aa /= h - 1;
  ab /= h - 1;
  bb /= h - 1;
  const kept = 1 - (h / (h - 1)) * aa;
  const cc = bb + (2 * ab) / (h - 1) + aa / (h - 1) ** 2;
  const ca = ab + aa / (h - 1);
  return kept * (1 + ((h - 1) / h) * cc) + ca * ca;
}

/** Indices of the h smallest distances; of equals at the edge the first. */
function nearest(distances: Float64Array, h: number): Int32Array {
  const edge = distances.slice().sort()[h - 1]!;
  let atEdge = h - distances.reduce((count, d) => count + (d < edge ? 1 : 0), 0);
  const out = new Int32Array(h);
  let size = 0;
  for (let i = 0; i < distances.length; i++) {
    const d = distances[i]!;
    if (d < edge || (d === edge && atEdge-- > 0)) out[size++] = i;
  }
  return out;
}

function keepBest(kept: SubsetFit[], fit: SubsetFit): void {
  if (kept.some((other) => Math.abs(other.logDeterminant - fit.logDeterminant) < 1e-12)) return;
  kept.push(fit);
  kept.sort((a, b) => a.logDeterminant - b.logDeterminant);
  if (kept.length > KEPT) kept.pop();
}
