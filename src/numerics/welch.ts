import type { TestOptions, TTest } from './inference.ts';
import { yuenWelch } from './yuen.ts';

/**
 * Welch's t test of two independent groups, separate variances, first minus second.
 * @param x scores of the first group, finite
 * @param y scores of the second group, finite
 * @param options direction and level
 * @returns estimate (difference of means), se, df, t, p, interval, `means`; null with a reason for a group of fewer than
 *   two or no spread in either group
 * @throws RangeError when a group is empty or not finite, or an option is out of range
 * @source Welch (1938), Satterthwaite (1946): se^2 = s1^2/n1 + s2^2/n2, df = se^4 / sum (s_j^2/n_j)^2/(n_j-1)
 * @checked cases `welch_t`, rtol 1e-9
 */
export function welchT(
  x: Float64Array,
  y: Float64Array,
  options: TestOptions = {},
): TTest & { readonly means: readonly [number, number] } {
  const { trimmedMeans, g: _g, h: _h, ...test } = yuenWelch(x, y, { ...options, trim: 0 });
  if (test.reason === undefined) return { ...test, means: trimmedMeans };
  const alone = x.length < 2 || y.length < 2;
  const reason = alone ? 'a condition has only one score' : 'all scores within each condition are equal';
  return { ...test, reason, means: trimmedMeans };
}
