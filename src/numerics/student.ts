import { largestSize, noSpread, noTTest, type TestOptions, type TTest, tTest } from './inference.ts';
import { mean, sumOfSquares } from './moments.ts';
import { requireScores } from './scores.ts';

/**
 * Student's t test of two independent groups with a pooled variance, first minus second.
 * @param x scores of the first group, finite
 * @param y scores of the second group, finite
 * @param options direction and level
 * @returns estimate (difference of means), se, df = n1 + n2 - 2, t, p, interval, `means`; null with a reason for a group
 *   of fewer than two or no spread in either group
 * @throws RangeError when a group is empty or not finite, or an option is out of range
 * @source Student (1908): se^2 = ((n1-1) s1^2 + (n2-1) s2^2) / (n1+n2-2) (1/n1 + 1/n2)
 * @checked cases `student_t`, rtol 1e-9
 */
export function studentT(
  x: Float64Array,
  y: Float64Array,
  options: TestOptions = {},
): TTest & { readonly means: readonly [number, number] } {
  requireScores(x);
  requireScores(y, 1, 'y');
  const means = [mean(x), mean(y)] as const;
  const estimate = means[0] - means[1];
  if (x.length < 2 || y.length < 2) return { ...noTTest('a condition has only one score', estimate), means };
  const df = x.length + y.length - 2;
  const pooled = Math.sqrt((sumOfSquares(x) + sumOfSquares(y)) / df);
  if (noSpread(pooled, largestSize(x, y))) {
    return { ...noTTest('all scores within each condition are equal', estimate), means };
  }
  return { ...tTest(estimate, 0, pooled * Math.sqrt(1 / x.length + 1 / y.length), df, options), means };
}
