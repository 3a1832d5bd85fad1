import { matrixFromColumns } from '../matrix.ts';
import { mcdDistances, mcdOfResample } from '../rules/mcd.ts';
import { fitRows } from '../rules/mcd-search.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { productMoment } from './correlation-test.ts';
import { projectionOutliers } from './projection-outliers.ts';

/** How pairs far from the others are found. */
export type SkippedBy = 'projection' | 'mcd';

/** Product-moment correlation of the pairs that are not far out; there is no p here, because none of a textbook holds. */
export interface SkippedCorrelation {
  /** Between -1 and 1; null with a reason. */
  readonly r: number | null;
  /** Pairs. */
  readonly n: number;
  /** Pairs that r is made from. */
  readonly kept: number;
  /** n marks: 1 = far out, left out of r. */
  readonly flags: Uint8Array;
  readonly reason?: string;
}

/**
 * Skipped correlation: pairs that are far out as pairs are left out, then Pearson's r.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options by: 'projection', or 'mcd' (distances from the reweighted MCD with three quarters of the pairs, chi-square .975)
 * @returns r, pairs kept, marks; null with a reason for fewer than 5 pairs, fewer than 3 kept, a vector that does not vary, or
 *   pairs that lie on a line. Inference has to find the odd pairs anew in every resample (skippedOfResample): the p of r on
 *   the kept pairs does not know that they were chosen.
 * @throws RangeError when lengths differ or a score is not finite
 * @source Wilcox 2012, Introduction to Robust Estimation and Hypothesis Testing, 9.4.3; Rousseeuw & Van Driessen 1999 (MCD)
 * @checked by hand; agrees with Pearson's r of the pairs left, 1e-14
 */
export function skippedCorrelation(
  x: Float64Array,
  y: Float64Array,
  options: { readonly by: SkippedBy },
): SkippedCorrelation {
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  const n = x.length;
  const none = (reason: string) => ({ r: null, n, kept: n, flags: new Uint8Array(n), reason });
  if (n < 5) return none('fewer than 5 pairs');
  const whole = productMoment(x, y);
  if (whole.r === null) return none(`${whole.flat} does not vary`);
  if (options.by === 'projection') return keptCorrelation(x, y, projectionOutliers(x, y));
  const robust = mcdDistances([x, y]);
  return robust.distance2 === null ? none(lineReason(robust.reason)) : keptCorrelation(x, y, robust.flags);
}

/**
 * The statistic of resamples of one set of pairs, the odd pairs found anew in each.
 * @param x scores (n of 5 or more, any unit)
 * @param y scores paired with *x*
 * @param options by: 'projection' or 'mcd'
 * @returns function of a resample (its x and its y): r, or null where it has none
 * @throws RangeError when lengths differ or a score is not finite
 * @source Wilcox 2012, 9.4.3; a resample's MCD starts from the fit of all pairs (mcdOfResample)
 * @checked agrees with skippedCorrelation on the same pairs, 1e-14
 */
export function skippedOfResample(
  x: Float64Array,
  y: Float64Array,
  options: { readonly by: SkippedBy },
): (x: Float64Array, y: Float64Array) => number | null {
  if (options.by === 'projection') return (xs, ys) => keptCorrelation(xs, ys, projectionOutliers(xs, ys)).r;
  const { subset } = mcdDistances([x, y]);
  const whole = subset === null ? null : fitRows(matrixFromColumns([x, y]), subset);
  return (xs, ys) => {
    const found = whole === null ? null : mcdOfResample([xs, ys], whole);
    return found === null || found.distance2 === null ? null : keptCorrelation(xs, ys, found.flags).r;
  };
}

function keptCorrelation(x: Float64Array, y: Float64Array, flags: Uint8Array): SkippedCorrelation {
  const kept = flags.reduce((count, mark) => count + (mark === 0 ? 1 : 0), 0);
  const base = { n: x.length, kept, flags };
  if (kept < 3) return { ...base, r: null, reason: `${kept} of ${x.length} pairs left` };
  const found = productMoment(
    x.filter((_, i) => flags[i] === 0),
    y.filter((_, i) => flags[i] === 0),
  );
  return found.r === null
    ? { ...base, r: null, reason: `${found.flat} does not vary among the pairs left` }
    : { ...base, r: found.r };
}

function lineReason(reason: string | undefined): string {
  return reason?.startsWith('a column') ? 'the pairs lie on a line' : (reason ?? 'no robust distances');
}
