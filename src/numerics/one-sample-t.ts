import { largestSize, noSpread, noTTest, type TestOptions, type TTest, tTest } from './inference.ts';
import { mean, standardDeviation } from './moments.ts';
import { differences, requireScores } from './scores.ts';

/**
 * t test of a mean.
 * @param x scores, finite
 * @param options `mu` null value (default 0), direction, level
 * @returns estimate (mean), sd, se, df = n - 1, t, p, interval; null with a reason for fewer than two scores or no spread
 * @throws RangeError when empty, not finite, or an option is out of range
 * @source Student (1908): t = (mean - mu) sqrt(n) / s on n - 1 df
 * @checked cases `one_sample_t`, rtol 1e-9
 */
export function oneSampleT(
  x: Float64Array,
  options: TestOptions & { readonly mu?: number } = {},
): TTest & { readonly sd: number | null } {
  requireScores(x);
  return testMean(x, largestSize(x), 'all scores are equal', options);
}

/**
 * Paired t test: the t test of the mean difference, first minus second.
 * @param x scores, finite
 * @param y scores, same length
 * @param options direction and level
 * @returns as the one-sample t test, of the differences
 * @throws RangeError when empty, of unequal length, not finite, or an option is out of range
 * @source Student (1908)
 * @checked cases `paired_t`, rtol 1e-9
 */
export function pairedT(
  x: Float64Array,
  y: Float64Array,
  options: TestOptions = {},
): TTest & { readonly sd: number | null } {
  requireScores(x);
  requireScores(y, 1, 'y');
  return testMean(differences(x, y), largestSize(x, y), 'all differences are equal', options);
}

function testMean(
  x: Float64Array,
  size: number,
  equal: string,
  options: TestOptions & { readonly mu?: number },
): TTest & { readonly sd: number | null } {
  const n = x.length;
  const estimate = mean(x);
  if (n < 2) return { ...noTTest('only one score', estimate), sd: null };
  const sd = standardDeviation(x);
  if (noSpread(sd, size)) return { ...noTTest(equal, estimate), sd };
  return { ...tTest(estimate, options.mu ?? 0, sd / Math.sqrt(n), n - 1, options), sd };
}
