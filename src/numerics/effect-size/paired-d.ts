import { type Limits, largestSize, noSpread, type TestOptions } from '../inference.ts';
import { covariance, mean, standardDeviation, variance } from '../moments.ts';
import { differences, requireScores } from '../scores.ts';
import { noncentralInterval } from './effect.ts';
import { smallSampleFactor } from './hedges-g.ts';

/** The standardized mean differences of pairs in use, first minus second. */
export interface PairedD {
  /** Mean difference / SD of the differences. */
  readonly dZ: number | null;
  /** Mean difference / root of the mean of the two variances. */
  readonly dAverage: number | null;
  /** Mean difference / mean of the two SDs. */
  readonly dMeanSd: number | null;
  /** dZ sqrt(2 (1 - r)). */
  readonly dRepeated: number | null;
  /** Pearson correlation of the pairs; null when a condition has no spread. */
  readonly r: number | null;
  /** Exact small-sample correction at n - 1 degrees of freedom; null for two pairs. */
  readonly factor: number | null;
  readonly gZ: number | null;
  readonly gAverage: number | null;
  /** Limits of dZ by inverting the noncentral t. */
  readonly interval: Limits | null;
  readonly reason?: string;
}

const none: PairedD = {
  dZ: null,
  dAverage: null,
  dMeanSd: null,
  dRepeated: null,
  r: null,
  factor: null,
  gZ: null,
  gAverage: null,
  interval: null,
};

const times = (value: number | null, factor: number | null): number | null =>
  value === null || factor === null ? null : value * factor;

/**
 * Standardized mean differences of pairs, first minus second.
 * @param x scores, at least one, finite
 * @param y scores, same length
 * @param options direction, level of the limits of dZ
 * @returns dZ, dAverage, dMeanSd, dRepeated, r, the correction and the corrected gZ and gAverage, limits of dZ; a quantity
 *   whose SD is 0 is null; with fewer than two pairs or equal differences there is a reason
 * @throws RangeError when empty, of unequal length, not finite, or the level is out of range
 * @source Cohen (1988), Lakens (2013); correction: Hedges (1981)
 * @checked cases `cohens_d_paired`, rtol 1e-9, limits 1e-8
 */
export function pairedD(x: Float64Array, y: Float64Array, options: TestOptions = {}): PairedD {
  requireScores(x);
  requireScores(y, 1, 'y');
  const { level = 0.95, alternative = 'two-sided' } = options;
  const d = differences(x, y);
  const n = d.length;
  if (n < 2) return { ...none, reason: 'only one pair' };
  const size = largestSize(x, y);
  const center = mean(d);
  const over = (sd: number) => (noSpread(sd, size) ? null : center / sd);
  const s1 = standardDeviation(x);
  const s2 = standardDeviation(y);
  const dZ = over(standardDeviation(d));
  const dAverage = over(Math.sqrt((variance(x) + variance(y)) / 2));
  const flat = noSpread(s1, size) || noSpread(s2, size);
  const r = flat ? null : Math.max(-1, Math.min(1, covariance(x, y) / (s1 * s2)));
  const factor = n > 2 ? smallSampleFactor(n - 1) : null;
  const rest = { dAverage, dMeanSd: over((s1 + s2) / 2), r, factor, gAverage: times(dAverage, factor) };
  if (dZ === null) return { ...none, ...rest, reason: 'all differences are equal' };
  const root = Math.sqrt(n);
  const dRepeated = r === null ? null : dZ * Math.sqrt(2 * (1 - r));
  return {
    ...rest,
    dZ,
    dRepeated,
    gZ: times(dZ, factor),
    interval: noncentralInterval(dZ * root, n - 1, root, level, alternative),
  };
}
