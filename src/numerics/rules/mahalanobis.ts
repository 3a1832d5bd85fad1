import { cholesky, forwardSolve } from '../cholesky.ts';
import { type Matrix, matrix } from '../matrix.ts';
import { covariance, mean } from '../moments.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { chiSquareQuantile } from '../tails/chi-square.ts';

/** Distances of rows from the middle of all rows, in the metric of their covariance. */
export interface MahalanobisDistances {
  /** n squared distances without unit; null with a reason where the covariance has no inverse. */
  readonly distance2: Float64Array | null;
  /** Chi-square quantile beyond which a row is flagged; null with a reason. */
  readonly cutoff: number | null;
  /** p means, in the columns' units. */
  readonly center: Float64Array | null;
  /** p by p covariance (divisor n-1). */
  readonly covariance: Matrix | null;
  /** n marks: 1 where the squared distance exceeds the cutoff. */
  readonly flags: Uint8Array;
  /** Why the distances are null. */
  readonly reason?: string;
}

/**
 * Squared Mahalanobis distances with mean and covariance of all rows.
 * @param columns p vectors of n scores each (p of 1 or more), one vector a variable
 * @param options quantile: share of chi-square on p df below the cutoff, between 0 and 1 (.975)
 * @returns squared distances, cutoff, marks; null with a reason for fewer than p + 1 rows or dependent columns
 * @throws RangeError when there is no column, lengths differ, a score is not finite or *quantile* is not between 0 and 1
 * @source Mahalanobis 1936: d^2 = (x - m)' S^-1 (x - m), S with divisor n-1
 * @checked outside check cases mahalanobis_classical, relative 1e-9
 */
export function mahalanobisDistances(
  columns: readonly Float64Array[],
  options: { readonly quantile?: number } = {},
): MahalanobisDistances {
  const quantile = options.quantile ?? 0.975;
  const n = requireColumns(columns);
  requireQuantile(quantile);
  const p = columns.length;
  const flags = new Uint8Array(n);
  const none = { distance2: null, cutoff: null, center: null, covariance: null, flags };
  if (n < p + 1) return { ...none, reason: `fewer than ${p + 1} rows` };
  const center = Float64Array.from(columns, mean);
  const spread = covarianceMatrix(columns);
  const distance2 = squaredDistances(columns, center, spread);
  if (distance2 === null) return { ...none, reason: DEPENDENT };
  const cutoff = chiSquareQuantile(quantile, p);
  distance2.forEach((value, i) => {
    if (value > cutoff) flags[i] = 1;
  });
  return { distance2, cutoff, center, covariance: spread, flags };
}

/** Why a covariance matrix has no inverse. */
export const DEPENDENT = 'a column does not vary or is a combination of the others';

/**
 * Refuse anything that is not one or more finite columns of equal length.
 * @param columns p vectors of n scores
 * @returns n
 * @throws RangeError when there is no column, lengths differ or a score is not finite
 * @source common practice
 * @checked by hand
 */
export function requireColumns(columns: readonly Float64Array[]): number {
  const first = columns[0];
  if (first === undefined) throw new RangeError('*columns* must hold at least 1 column; got 0');
  for (const column of columns) {
    requireScores(column, 0, 'columns');
    requirePairs(first, column);
  }
  return first.length;
}

/**
 * Refuse a quantile outside (0, 1).
 * @param quantile share
 * @throws RangeError when not strictly between 0 and 1
 * @source common practice
 * @checked by hand
 */
export function requireQuantile(quantile: number): void {
  if (!(quantile > 0 && quantile < 1)) throw new RangeError(`*quantile* must be between 0 and 1; got ${quantile}`);
}

/**
 * Covariance matrix of columns.
 * @param columns p vectors of n scores (n of 2 or more)
 * @returns p by p, divisor n-1
 * @throws RangeError when fewer than two rows
 * @source common practice
 * @checked by hand, 1e-14
 */
export function covarianceMatrix(columns: readonly Float64Array[]): Matrix {
  const p = columns.length;
  const out = matrix(p, p);
  for (let i = 0; i < p; i++) {
    for (let j = 0; j <= i; j++) {
      const value = covariance(columns[i]!, columns[j]!);
      out.data[i * p + j] = value;
      out.data[j * p + i] = value;
    }
  }
  return out;
}

/**
 * Squared distances of rows from a centre.
 * @param columns p vectors of n scores
 * @param center p numbers
 * @param spread p by p covariance
 * @returns n squared distances, or null when *spread* has no inverse
 * @source d^2 = |L^-1 (x - m)|^2 with L L' = S
 * @checked by hand, 1e-14
 */
export function squaredDistances(
  columns: readonly Float64Array[],
  center: Float64Array,
  spread: Matrix,
): Float64Array | null {
  const lower = cholesky(spread);
  if (lower === null) return null;
  const out = new Float64Array(columns[0]!.length);
  const row = new Float64Array(columns.length);
  for (let i = 0; i < out.length; i++) {
    for (let j = 0; j < row.length; j++) row[j] = columns[j]![i]! - center[j]!;
    out[i] = forwardSolve(lower, row).reduce((total, part) => total + part * part, 0);
  }
  return out;
}
