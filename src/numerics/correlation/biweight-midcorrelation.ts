import { largestSize, noSpread } from '../inference.ts';
import { madSorted, medianSorted, sorted } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';

/** Biweight midcorrelation; null with a reason. */
export interface BiweightCorrelation {
  /** Between -1 and 1. */
  readonly r: number | null;
  /** Pairs. */
  readonly n: number;
  readonly reason?: string;
}

/**
 * Biweight midcorrelation: deviations from the median weighted down to 0 at *c* raw MADs.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options c: distance in raw MADs at which a score stops counting, above 0 (9)
 * @returns r; null with a reason for fewer than 2 pairs or a MAD of 0
 * @throws RangeError when lengths differ, a score is not finite or *c* is not above 0
 * @source Wilcox 2012, Introduction to Robust Estimation and Hypothesis Testing, 9.3.8 and 3.12.1: u = (x - M) / (c MAD),
 *   a = (x - M)(1 - u^2)^2 for |u| < 1, r = sum a b / sqrt(sum a^2 sum b^2)
 * @checked outside check cases biweight_midcorrelation, relative 1e-9
 */
export function biweightMidcorrelation(
  x: Float64Array,
  y: Float64Array,
  options: { readonly c?: number } = {},
): BiweightCorrelation {
  const c = options.c ?? 9;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  if (!(c > 0 && c < Number.POSITIVE_INFINITY)) throw new RangeError(`*c* must be a number above 0; got ${c}`);
  const n = x.length;
  if (n < 2) return { r: null, n, reason: 'fewer than 2 pairs' };
  const a = weighted(x, c);
  const b = weighted(y, c);
  if (a === null || b === null) {
    return { r: null, n, reason: `at least half the scores of ${a === null ? 'x' : 'y'} are identical (MAD = 0)` };
  }
  let ab = 0;
  let aa = 0;
  let bb = 0;
  for (let i = 0; i < n; i++) {
    ab += a[i]! * b[i]!;
    aa += a[i]! * a[i]!;
    bb += b[i]! * b[i]!;
  }
  if (aa === 0 || bb === 0) return { r: null, n, reason: 'no score near the median differs from it' };
  return { r: Math.max(-1, Math.min(1, ab / Math.sqrt(aa) / Math.sqrt(bb))), n };
}

function weighted(x: Float64Array, c: number): Float64Array | null {
  const s = sorted(x);
  const center = medianSorted(s);
  const reach = c * madSorted(s, center);
  if (noSpread(reach, largestSize(x))) return null;
  return x.map((score) => {
    const u = (score - center) / reach;
    return Math.abs(u) < 1 ? ((score - center) / reach) * (1 - u * u) ** 2 : 0;
  });
}
