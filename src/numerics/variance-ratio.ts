import { type Limits, limits, outside, type TestOptions } from './inference.ts';
import { variance } from './moments.ts';
import { tailP } from './rank-test.ts';
import { requireScores } from './scores.ts';
import { fLower, fQuantileUpper, fUpper } from './tails/f.ts';

export interface VarianceRatio {
  /** First variance over second. */
  readonly ratio: number | null;
  readonly df1: number;
  readonly df2: number;
  readonly p: number | null;
  /** Limits of the ratio. */
  readonly interval: Limits | null;
  readonly reason?: string;
}

/**
 * F test of two variances; relies on normal scores.
 * @param x scores of the first group, at least two, finite
 * @param y scores of the second group, at least two, finite
 * @param options direction, level
 * @returns ratio, df1, df2, p (two-sided: doubled smaller tail), interval of the ratio; null with a reason without spread
 * @throws RangeError when a group has fewer than two or is not finite, or the level is out of range
 * @source Fisher (1924): F = s1^2 / s2^2 on n1-1, n2-1 df
 * @checked cases `variance_ratio_f`, rtol 1e-9
 */
export function varianceRatio(x: Float64Array, y: Float64Array, options: TestOptions = {}): VarianceRatio {
  requireScores(x, 2);
  requireScores(y, 2, 'y');
  const { alternative = 'two-sided', level = 0.95 } = options;
  const df1 = x.length - 1;
  const df2 = y.length - 1;
  const v1 = variance(x);
  const v2 = variance(y);
  if (v1 === 0 || v2 === 0) {
    return { ratio: null, df1, df2, p: null, interval: null, reason: 'all scores of a condition are equal' };
  }
  const ratio = v1 / v2;
  const p = tailP(fLower(ratio, df1, df2), fUpper(ratio, df1, df2), alternative);
  const tail = outside(level, alternative);
  const low = ratio / fQuantileUpper(tail, df1, df2);
  return { ratio, df1, df2, p, interval: limits(low, ratio * fQuantileUpper(tail, df2, df1), alternative) };
}
