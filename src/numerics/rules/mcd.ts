import { type Matrix, matrixFromColumns } from '../matrix.ts';
import { rng } from '../rng.ts';
import { chiSquareLower, chiSquareQuantile } from '../tails/chi-square.ts';
import { DEPENDENT, requireColumns, requireQuantile } from './mahalanobis.ts';
import { concentrate, distancesFrom, fitRows, type SubsetFit, smallestDeterminant } from './mcd-search.ts';

/** Robust distances: middle and covariance from the rows that lie closest together. */
export interface McdDistances {
  /** Rows in the raw subset. */
  readonly h: number;
  /** Row indices of the raw subset, ascending; null with a reason. */
  readonly subset: Int32Array | null;
  /** Log determinant of the covariance (divisor h-1) of the raw subset. */
  readonly rawLogDeterminant: number | null;
  /** p means of the raw subset, in the columns' units. */
  readonly rawCenter: Float64Array | null;
  /** p means after reweighting, in the columns' units. */
  readonly center: Float64Array | null;
  /** p by p covariance after reweighting, with its consistency factor. */
  readonly covariance: Matrix | null;
  /** n squared distances from the reweighted middle. */
  readonly distance2: Float64Array | null;
  /** Chi-square quantile beyond which a row is flagged. */
  readonly cutoff: number | null;
  /** n marks: 1 where the squared distance exceeds the cutoff. */
  readonly flags: Uint8Array;
  /** Why the distances are null. */
  readonly reason?: string;
}

/**
 * Number of rows in the raw subset.
 * @param n rows
 * @param p columns
 * @param alpha share of rows, .5 (highest breakdown) to 1
 * @returns h = floor(2 n2 - n + 2 (n - n2) alpha), n2 = floor((n + p + 1) / 2)
 * @throws RangeError when *alpha* is not between .5 and 1
 * @source Rousseeuw & Van Driessen 1999, Technometrics 41, 212-223
 * @checked outside check cases mcd_mahalanobis, exact
 */
export function mcdSubsetSize(n: number, p: number, alpha: number): number {
  if (!(alpha >= 0.5 && alpha <= 1)) throw new RangeError(`*alpha* must be between .5 and 1; got ${alpha}`);
  const half = Math.floor((n + p + 1) / 2);
  return Math.floor(2 * half - n + 2 * (n - half) * alpha);
}

/**
 * Squared distances from the reweighted minimum covariance determinant estimate.
 * @param columns p vectors of n scores each, one vector a variable
 * @param options alpha: share of rows in the raw subset (.5 to 1, .75); quantile: share of chi-square on p df below the
 *   cutoff (.975); seed of the drawn starts (1)
 * @returns subset, estimates, squared distances, cutoff, marks; null with a reason for fewer than 2p rows, dependent
 *   columns, or h rows on one plane
 * @throws RangeError when there is no column, lengths differ, a score is not finite or an option is out of range
 * @source Rousseeuw & Van Driessen 1999; reweighting at chi-square .975; consistency factors (h/n) / P(chi2_{p+2} <=
 *   chi2_{p, h/n}) (Croux & Haesbroeck 1999, J. Multivar. Anal. 71, 161-190), no small-sample factors
 * @checked outside check cases mcd_mahalanobis, relative 1e-7
 */
export function mcdDistances(
  columns: readonly Float64Array[],
  options: { readonly alpha?: number; readonly quantile?: number; readonly seed?: number } = {},
): McdDistances {
  const { alpha = 0.75, quantile = 0.975, seed = 1 } = options;
  const n = requireColumns(columns);
  requireQuantile(quantile);
  const p = columns.length;
  const h = mcdSubsetSize(n, p, alpha);
  if (n < 2 * p || h <= p) return noMcd(n, h, `fewer than ${2 * p} rows`);
  const data = matrixFromColumns(columns);
  const stream = rng(seed);
  const raw = smallestDeterminant(data, h, (bound) => stream.below(bound));
  if (raw === null) {
    const whole =
      fitRows(
        data,
        Int32Array.from({ length: n }, (_, i) => i),
      ) === null;
    return noMcd(n, h, whole ? DEPENDENT : `${h} rows have no spread in some direction`);
  }
  return reweighted(data, raw, h, quantile);
}

/**
 * The same for a resample, where a search from many starts for each of thousands of resamples would take minutes: the
 * subset is concentrated from the fit of the whole data and from all rows of the resample only.
 * @param columns p vectors of n scores each
 * @param whole fit of the whole data's subset
 * @param options alpha and quantile as for the whole data (.75 and .975)
 * @returns as mcdDistances; null with a reason where neither start leads to a subset with spread in every direction
 * @throws RangeError when there is no column, lengths differ, a score is not finite or an option is out of range
 * @source Rousseeuw & Van Driessen 1999: concentration steps; common practice: starts of a resample at the whole data's fit
 * @checked agrees with mcdDistances on resamples of a clean cloud with a far cluster
 */
export function mcdOfResample(
  columns: readonly Float64Array[],
  whole: SubsetFit,
  options: { readonly alpha?: number; readonly quantile?: number } = {},
): McdDistances {
  const { alpha = 0.75, quantile = 0.975 } = options;
  const n = requireColumns(columns);
  requireQuantile(quantile);
  const h = mcdSubsetSize(n, columns.length, alpha);
  const data = matrixFromColumns(columns);
  const all = fitRows(
    data,
    Int32Array.from({ length: n }, (_, i) => i),
  );
  if (all === null) return noMcd(n, h, DEPENDENT);
  if (h === n) return reweighted(data, all, h, quantile);
  const starts = [{ ...whole, indices: new Int32Array(0) }, all];
  const fits = starts.map((start) => concentrate(data, h, start, 100)).filter((fit) => fit !== null);
  const [first, second] = fits;
  if (first === undefined) return noMcd(n, h, `${h} rows have no spread in some direction`);
  const raw = second !== undefined && second.logDeterminant < first.logDeterminant ? second : first;
  return reweighted(data, raw, h, quantile);
}

function noMcd(n: number, h: number, reason: string): McdDistances {
  const none = { subset: null, rawLogDeterminant: null, rawCenter: null, center: null, covariance: null };
  return { h, ...none, distance2: null, cutoff: null, flags: new Uint8Array(n), reason };
}

/** What a covariance of the inner share of a normal sample is multiplied by to estimate the whole one. */
function consistency(share: number, p: number): number {
  return share >= 1 ? 1 : share / chiSquareLower(chiSquareQuantile(share, p), p + 2);
}

function reweighted(data: Matrix, raw: SubsetFit, h: number, quantile: number): McdDistances {
  const { rows: n, cols: p } = data;
  const factor = consistency(h / n, p);
  const edge = factor * chiSquareQuantile(0.975, p);
  const near: number[] = [];
  distancesFrom(data, raw).forEach((d, i) => {
    if (d <= edge) near.push(i);
  });
  const fit = fitRows(data, Int32Array.from(near));
  if (fit === null) return noMcd(n, h, `${near.length} rows have no spread in some direction`);
  const scale = consistency(near.length / n, p);
  const distance2 = distancesFrom(data, fit).map((d) => d / scale);
  const cutoff = chiSquareQuantile(quantile, p);
  return {
    h,
    subset: raw.indices,
    rawLogDeterminant: raw.logDeterminant,
    rawCenter: raw.center,
    center: fit.center,
    covariance: { rows: p, cols: p, data: fit.covariance.data.map((value) => scale * value) },
    distance2,
    cutoff,
    flags: Uint8Array.from(distance2, (d) => (d > cutoff ? 1 : 0)),
  };
}
