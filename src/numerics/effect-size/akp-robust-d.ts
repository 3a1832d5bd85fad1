import { largestSize, noSpread } from '../inference.ts';
import { requireScores, trimCount } from '../scores.ts';
import { normalDensity, normalQuantileUpper } from '../tails/normal.ts';
import { trimmedMean } from '../trimmed-mean.ts';
import { winsorizedSd, winsorizedVariance } from '../winsorized.ts';

/**
 * Winsorized standard deviation of the standard normal distribution.
 * @param trim integer percentage at each end, 0 to 49
 * @returns c = sqrt(1 - 2 gamma - 2 q phi(q) + 2 gamma q^2), q the upper gamma quantile; 1 at 0 %
 * @throws RangeError when `trim` is not 0 to 49
 * @source Algina, Keselman & Penfield (2005)
 * @checked cases `akp_robust_d`, rtol 1e-9: .6419398 at 20 %
 */
export function winsorizedNormalSd(trim: number): number {
  trimCount(0, trim);
  if (trim === 0) return 1;
  const gamma = trim / 100;
  const q = normalQuantileUpper(gamma);
  return Math.sqrt(1 - 2 * gamma - 2 * q * normalDensity(q) + 2 * gamma * q * q);
}

export interface RobustD {
  /** c (difference of trimmed means) / (pooled) winsorized SD. */
  readonly value: number | null;
  /** c. */
  readonly constant: number;
  readonly reason?: string;
}

export interface RobustDTwoGroups extends RobustD {
  readonly pooledSd: number | null;
  /** The same with the winsorized SD of the first group alone; null when that SD is 0. */
  readonly byFirst: number | null;
  readonly bySecond: number | null;
}

/**
 * Robust standardized difference of two independent groups, first minus second.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param options `trim` integer percentage at each end (default 20)
 * @returns value with the pooled winsorized SD, `byFirst` and `bySecond` with one group's; equals Cohen's d for normal
 *   scores of equal spread; null with a reason for a group of one or a winsorized SD of 0. An interval is made by
 *   bootstrap: akpInterval
 * @throws RangeError when a group is empty or not finite, or `trim` is not 0 to 49
 * @source Algina, Keselman & Penfield (2005): c (m_t1 - m_t2) / S_w, S_w^2 pooled over n_j - 1
 * @checked cases `akp_robust_d`, rtol 1e-9
 */
export function akpRobustD(
  x: Float64Array,
  y: Float64Array,
  options: { readonly trim?: number } = {},
): RobustDTwoGroups {
  requireScores(x);
  requireScores(y, 1, 'y');
  const { trim = 20 } = options;
  const constant = winsorizedNormalSd(trim);
  const none = { value: null, constant, pooledSd: null, byFirst: null, bySecond: null };
  const n1 = x.length;
  const n2 = y.length;
  if (n1 < 2 || n2 < 2) return { ...none, reason: 'a condition has only one score' };
  const v1 = winsorizedVariance(x, trim);
  const v2 = winsorizedVariance(y, trim);
  const pooledSd = Math.sqrt(((n1 - 1) * v1 + (n2 - 1) * v2) / (n1 + n2 - 2));
  const size = largestSize(x, y);
  if (noSpread(pooledSd, size)) {
    return { ...none, pooledSd, reason: 'all scores within each condition are equal after winsorizing' };
  }
  const difference = constant * (trimmedMean(x, trim) - trimmedMean(y, trim));
  const by = (sd: number) => (noSpread(sd, size) ? null : difference / sd);
  return {
    value: difference / pooledSd,
    constant,
    pooledSd,
    byFirst: by(Math.sqrt(v1)),
    bySecond: by(Math.sqrt(v2)),
  };
}

/**
 * Robust standardized change of pairs.
 * @param d differences, at least one, finite
 * @param options `trim` integer percentage at each end (default 20)
 * @returns c times the trimmed mean over the winsorized SD of the differences; null with a reason for a single difference
 *   or a winsorized SD of 0. An interval is made by bootstrap: akpIntervalPaired
 * @throws RangeError when empty, not finite, or `trim` is not 0 to 49
 * @source Algina, Keselman & Penfield (2005)
 * @checked cases `akp_robust_d_paired`, rtol 1e-9
 */
export function akpRobustDPaired(d: Float64Array, options: { readonly trim?: number } = {}): RobustD {
  requireScores(d);
  const { trim = 20 } = options;
  const constant = winsorizedNormalSd(trim);
  if (d.length < 2) return { value: null, constant, reason: 'only one difference' };
  const sd = winsorizedSd(d, trim);
  if (noSpread(sd, largestSize(d))) return { value: null, constant, reason: 'all winsorized differences are equal' };
  return { value: (constant * trimmedMean(d, trim)) / sd, constant };
}
