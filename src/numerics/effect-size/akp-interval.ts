import { percentileInference } from '../bootstrap-limits.ts';
import { prepare, type Resampled } from '../bootstrap-statistic.ts';
import type { Limits, TestOptions } from '../inference.ts';
import { resample } from '../resample.ts';
import { type WinsorWalk, walkWinsorized, winsorWalk } from '../resample-walks.ts';
import { requireScores } from '../scores.ts';
import { akpRobustD, akpRobustDPaired, type RobustD, winsorizedNormalSd } from './akp-robust-d.ts';

export interface AkpIntervalOptions extends TestOptions {
  /** Integer percentage at each end (default 20). */
  readonly trim?: number;
  /** Number of resamples (default 2,000). */
  readonly B?: number;
  /** 0 to 2^32 - 1. */
  readonly seed: number;
}

export interface AkpInterval extends RobustD {
  readonly interval: Limits | null;
}

/** Trimmed mean and sum of squared deviations of the winsorized scores of a resample. */
function moments(group: Resampled, counts: Int32Array, walk: WinsorWalk): { center: number; squares: number } {
  walkWinsorized(group.s, counts, group.g, walk);
  const squares = walk.squares - (walk.sum * walk.sum) / group.n;
  return { center: walk.trimmed / (group.n - 2 * group.g), squares: squares > 1e-14 * walk.squares ? squares : 0 };
}

function finish(point: RobustD, values: Float64Array, options: AkpIntervalOptions): AkpInterval {
  if (!values.every(Number.isFinite)) return { ...point, interval: null, reason: 'some resamples have no spread' };
  const { level = 0.95, alternative = 'two-sided' } = options;
  const { interval, reason } = percentileInference(values, 0, level, alternative);
  return reason === undefined ? { ...point, interval } : { ...point, interval, reason };
}

/**
 * Robust standardized difference of two independent groups with a percentile bootstrap interval.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param options `trim`, `B`, `seed`, direction, level
 * @returns value, constant, interval; null with a reason without spread, in the groups or in some resample
 * @throws RangeError when a group is empty or not finite, or an option is out of range
 * @source Algina, Keselman & Penfield (2005); interval: percentile bootstrap, groups resampled apart
 * @checked theory: covers the value; agrees with akpRobustD of the resample, rtol 1e-10
 */
export function akpInterval(x: Float64Array, y: Float64Array, options: AkpIntervalOptions): AkpInterval {
  const { trim = 20, B = 2000, seed } = options;
  const { value, constant, reason } = akpRobustD(x, y, { trim });
  if (value === null) return { value, constant, interval: null, reason: reason ?? 'no spread' };
  const a = prepare(x, trim);
  const b = prepare(y, trim);
  const gap = a.center - b.center;
  const c = winsorizedNormalSd(trim);
  const walk = winsorWalk();
  const values = new Float64Array(B);
  resample([a.n, b.n], B, seed, ([first, second], index) => {
    const one = moments(a, first as Int32Array, walk);
    const two = moments(b, second as Int32Array, walk);
    const sd = Math.sqrt((one.squares + two.squares) / (a.n + b.n - 2));
    values[index] = (c * (gap + one.center - two.center)) / sd;
  });
  return finish({ value, constant }, values, options);
}

/**
 * Robust standardized change of pairs with a percentile bootstrap interval.
 * @param d differences, at least one, finite
 * @param options `trim`, `B`, `seed`, direction, level
 * @returns value, constant, interval; null with a reason without spread, in the differences or in some resample
 * @throws RangeError when empty, not finite, or an option is out of range
 * @source Algina, Keselman & Penfield (2005); interval: percentile bootstrap
 * @checked theory: covers the value; agrees with akpRobustDPaired of the resample, rtol 1e-10
 */
export function akpIntervalPaired(d: Float64Array, options: AkpIntervalOptions): AkpInterval {
  requireScores(d);
  const { trim = 20, B = 2000, seed } = options;
  const { value, constant, reason } = akpRobustDPaired(d, { trim });
  if (value === null) return { value, constant, interval: null, reason: reason ?? 'no spread' };
  const group = prepare(d, trim);
  const c = winsorizedNormalSd(trim);
  const walk = winsorWalk();
  const values = new Float64Array(B);
  resample([group.n], B, seed, ([counts], index) => {
    const one = moments(group, counts as Int32Array, walk);
    values[index] = (c * (group.center + one.center)) / Math.sqrt(one.squares / (group.n - 1));
  });
  return finish({ value, constant }, values, options);
}
