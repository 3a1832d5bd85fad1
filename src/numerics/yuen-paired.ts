import { largestSize, noSpread, noTTest, type TestOptions, type TTest, tTest } from './inference.ts';
import { requirePairs, requireScores, trimCount } from './scores.ts';
import { trimmedMean } from './trimmed-mean.ts';
import { winsorizedCovariance, winsorizedVariance } from './winsorized.ts';

/**
 * Yuen's test for pairs: difference of the two MARGINAL trimmed means (the typical score under each condition).
 * @param x scores, finite
 * @param y scores, same length
 * @param options `trim` integer percentage at each end (default 20), direction, level
 * @returns estimate (first minus second trimmed mean), se, df = h - 1, t, p, interval, `trimmedMeans`, g and h; null with
 *   a reason when fewer than two pairs are left or the difference has no spread
 * @throws RangeError when empty, of unequal length, not finite, or an option is out of range
 * @source Wilcox (2012), section 5.9.5: se^2 = (q1 + q2 - 2 q12) / (h (h-1)), q = (n-1) winsorized variances, covariance
 * @checked cases `yuen_paired`, rtol 1e-9
 */
export function yuenPaired(
  x: Float64Array,
  y: Float64Array,
  options: TestOptions & { readonly trim?: number } = {},
): TTest & { readonly trimmedMeans: readonly [number, number]; readonly g: number; readonly h: number } {
  const { trim = 20 } = options;
  requireScores(x);
  requireScores(y, 1, 'y');
  requirePairs(x, y);
  const n = x.length;
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  const trimmedMeans = [trimmedMean(x, trim), trimmedMean(y, trim)] as const;
  const estimate = trimmedMeans[0] - trimmedMeans[1];
  const rest = { trimmedMeans, g, h };
  if (h < 2) return { ...noTTest(`${h} of ${n} pairs left after trimming`, estimate), ...rest };
  const spread = winsorizedVariance(x, trim) + winsorizedVariance(y, trim) - 2 * winsorizedCovariance(x, y, trim);
  // Rounding in the three terms is relative to the scores' size, so the root of it is compared with that size.
  if (noSpread(Math.sqrt(Math.max(0, spread)), largestSize(x, y)))
    return { ...noTTest('the winsorized differences are all equal', estimate), ...rest };
  const se = Math.sqrt(((n - 1) * spread) / (h * (h - 1)));
  return { ...tTest(estimate, 0, se, h - 1, options), ...rest };
}
