import { medianSorted, quantileSorted } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';

/** Square root of the .975 quantile of chi-square on 2 df: -2 log(.025). */
const CUTOFF = Math.sqrt(-2 * Math.log(0.025));

/**
 * Marks pairs that lie far out in some direction: all pairs are projected on the line from the middle through each pair.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @returns n marks: 1 = further from the middle, along the line through some pair, than M + sqrt(chi2_.975,2) (q2 - q1) of the
 *   projected distances; lines along which a quarter to three quarters of the pairs are equally far mark nobody
 * @throws RangeError when lengths differ or a score is not finite
 * @source Wilcox 2012, Introduction to Robust Estimation and Hypothesis Testing, 6.4.9 (constants from memory): middle =
 *   medians of x and y, M = median and q1, q2 = ideal fourths of the distances along the line
 * @checked by hand; agrees with a transcription in Python, exact marks
 */
export function projectionOutliers(x: Float64Array, y: Float64Array): Uint8Array {
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  const n = x.length;
  const flags = new Uint8Array(n);
  if (n === 0) return flags;
  const a = fromMedian(x);
  const b = fromMedian(y);
  const distances = new Float64Array(n);
  const ordered = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    const length = Math.hypot(a[i]!, b[i]!);
    // A pair that stands twice in a row, as in a resample, gives the same line again.
    if (length === 0 || (i > 0 && a[i] === a[i - 1] && b[i] === b[i - 1])) continue;
    const u = a[i]! / length;
    const v = b[i]! / length;
    for (let j = 0; j < n; j++) distances[j] = Math.abs(a[j]! * u + b[j]! * v);
    ordered.set(distances);
    ordered.sort();
    const spread = quantileSorted(ordered, 0.75, 8) - quantileSorted(ordered, 0.25, 8);
    if (!(spread > 1e-12 * ordered[n - 1]!)) continue;
    const limit = medianSorted(ordered) + CUTOFF * spread;
    for (let j = 0; j < n; j++) if (distances[j]! > limit) flags[j] = 1;
  }
  return flags;
}

function fromMedian(x: Float64Array): Float64Array {
  const center = medianSorted(x.slice().sort());
  return x.map((score) => score - center);
}
