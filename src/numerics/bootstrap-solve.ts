/** How a prepared bootstrap problem is drawn and turned into p and limits. */
import {
  acceleration,
  type BootstrapInference,
  bcaInference,
  bootstrapTInference,
  percentileInference,
} from './bootstrap-limits.ts';
import type { BootstrapStatistic, Studentized } from './bootstrap-statistic.ts';
import { type Limits, requireLevel, type TestOptions } from './inference.ts';
import { standardDeviation, sum } from './moments.ts';
import { resample } from './resample.ts';

export type BootstrapMethod = 'percentile' | 'bca' | 't-symmetric' | 't-equal-tailed';

export interface BootstrapOptions extends TestOptions {
  /** Integer percentage at each end, for the trimmed and winsorized mean (default 20). */
  readonly trim?: number;
  /** Number of resamples (default 2,000). */
  readonly B?: number;
  /** 0 to 2^32 - 1. */
  readonly seed: number;
  /** Default 'percentile'. */
  readonly method?: BootstrapMethod;
}

export interface BootstrapResult {
  readonly estimate: number;
  /** Standard deviation of the bootstrap values. */
  readonly se: number | null;
  readonly p: number | null;
  readonly interval: Limits | null;
  readonly B: number;
  readonly method: BootstrapMethod;
  readonly reason?: string;
}

/** A bootstrap problem: how its value, its studentized value and its jackknife are read. */
export interface BootstrapProblem {
  readonly sizes: readonly number[];
  readonly estimate: number;
  readonly nullValue: number;
  /** Values this close to the null value are equal to it but for rounding. */
  readonly grain: number;
  readonly read: (counts: readonly Int32Array[]) => number;
  /** Fills `out`, and the observed value's own squared error; null where the statistic has no standard error. */
  readonly studentized: ((counts: readonly Int32Array[], out: Studentized) => void) | null;
  readonly influences: () => Float64Array;
}

export interface SettledBootstrap {
  readonly B: number;
  readonly method: BootstrapMethod;
  readonly level: number;
  readonly alternative: 'two-sided' | 'greater' | 'less';
}

const jackknifeFails = (statistic: BootstrapStatistic): boolean => statistic === 'median';

/**
 * Fills in the options that were left out.
 * @param options options of a bootstrap
 * @returns B (default 2,000), method ('percentile'), level (.95), direction ('two-sided')
 * @throws RangeError when the level is out of range
 * @source defaults of methods 3.2
 * @checked by hand
 */
export function settle(options: BootstrapOptions): SettledBootstrap {
  const { B = 2000, method = 'percentile', level = 0.95, alternative = 'two-sided' } = options;
  requireLevel(level);
  return { B, method, level, alternative };
}

/**
 * Draws the resamples of a problem and reads p and limits off them.
 * @param problem groups, how each value is read, the jackknife
 * @param statistic what is estimated (BCa does not exist for a median)
 * @param seed 0 to 2^32 - 1
 * @param settled B, method, level, direction
 * @returns estimate, se, p, interval; null with a reason
 * @throws RangeError when B or the seed is out of range
 * @source Efron (1979, 1987), Hall (1988)
 * @checked through bootstrapOneSample
 */
export function solve(
  problem: BootstrapProblem,
  statistic: BootstrapStatistic,
  seed: number,
  settled: SettledBootstrap,
): BootstrapResult {
  const { B, method, level, alternative } = settled;
  const { estimate, nullValue } = problem;
  const none = { estimate, se: null, p: null, interval: null, B, method };
  if (method === 'bca' && jackknifeFails(statistic)) {
    return { ...none, reason: 'the BCa interval does not exist for a median' };
  }
  if (problem.sizes.some((n) => n < 2)) return { ...none, reason: 'a condition has only one score' };
  if (method === 't-symmetric' || method === 't-equal-tailed') return solveT(problem, seed, settled);
  const values = new Float64Array(B);
  resample(problem.sizes, B, seed, (counts, index) => {
    values[index] = problem.read(counts);
  });
  const se = B < 2 ? null : standardDeviation(values);
  if (se === 0) return { ...none, se, reason: 'all resamples give the same value' };
  const inference: BootstrapInference =
    method === 'percentile'
      ? percentileInference(values, nullValue, level, alternative, problem.grain)
      : bcaInference(
          values,
          estimate,
          acceleration(problem.influences()),
          nullValue,
          level,
          alternative,
          problem.grain,
        );
  return { ...none, se, ...inference };
}

function solveT(problem: BootstrapProblem, seed: number, settled: SettledBootstrap): BootstrapResult {
  const { B, method, level, alternative } = settled;
  const { estimate, nullValue, studentized, sizes } = problem;
  const none = { estimate, se: null, p: null, interval: null, B, method };
  if (studentized === null) return { ...none, reason: 'the bootstrap-t needs a standard error of the estimate' };
  const out: Studentized = { value: 0, squaredError: 0 };
  // The sample itself is the resample in which every score is drawn once.
  const once = sizes.map((n) => new Int32Array(n).fill(1));
  studentized(once, out);
  const own = Math.sqrt(out.squaredError);
  if (!(own > 0)) return { ...none, reason: 'the scores have no spread left' };
  const values = new Float64Array(B);
  const ts = new Float64Array(B);
  resample(sizes, B, seed, (counts, index) => {
    studentized(counts, out);
    values[index] = out.value;
    const gap = out.value - estimate;
    ts[index] = gap === 0 ? 0 : gap / Math.sqrt(out.squaredError);
  });
  const form = method === 't-symmetric' ? 'symmetric' : 'equal-tailed';
  const inference = bootstrapTInference(ts, estimate, own, nullValue, level, alternative, form);
  return { ...none, se: B < 2 ? null : standardDeviation(values), ...inference };
}

/**
 * Rounding of values near the null value.
 * @param one what was subtracted from the scores
 * @param other what was subtracted from the other scores, or the null value
 * @returns a few units in the last place of the two
 * @source common practice
 * @checked by hand
 */
export function rounding(one: number, other: number): number {
  return 8 * Number.EPSILON * (Math.abs(one) + Math.abs(other));
}

/**
 * Influence of each score from the leave-one-out values.
 * @param values leave-one-out values
 * @param factor scale of the group, negative for a group that is subtracted
 * @returns factor (mean of the values - value)
 * @source Efron (1987)
 * @checked by hand
 */
export function influencesOf(values: Float64Array, factor: number): Float64Array {
  const center = sum(values) / values.length;
  return values.map((value) => factor * (center - value));
}

/**
 * Moves a result from centred scores to the scores themselves.
 * @param result result for centred scores
 * @param by what was subtracted
 * @returns the result with estimate and limits moved
 * @source design of the kernels
 * @checked invariance under a shift of the scores
 */
export function shifted(result: BootstrapResult, by: number): BootstrapResult {
  const { interval } = result;
  const moved =
    interval === null ? null : (interval.map((end) => (end === null ? null : end + by)) as unknown as Limits);
  return { ...result, estimate: result.estimate + by, interval: moved };
}
