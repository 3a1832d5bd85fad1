/** Bootstrap of one sample (or of differences) and of two independent groups; pairs by margin: bootstrap-paired.ts. */
import {
  type BootstrapOptions,
  type BootstrapProblem,
  type BootstrapResult,
  influencesOf,
  rounding,
  settle,
  shifted,
  solve,
} from './bootstrap-solve.ts';
import {
  type BootstrapStatistic,
  leaveOneOut,
  prepare,
  type Resampled,
  reader,
  type Studentized,
  studentizedReader,
  valueSorted,
} from './bootstrap-statistic.ts';
import { requireScores } from './scores.ts';

export { bootstrapPaired } from './bootstrap-paired.ts';
export type { BootstrapMethod, BootstrapOptions, BootstrapResult } from './bootstrap-solve.ts';
export type { BootstrapStatistic } from './bootstrap-statistic.ts';

/**
 * Bootstrap of one sample, or of the differences of pairs.
 * @param x scores or differences, at least one, finite
 * @param statistic what is estimated
 * @param options `trim`, `B`, `seed`, `mu` null value (default 0), direction, level, `method`
 * @returns estimate, se (SD of the bootstrap values), p, interval; null with a reason for a single score, no spread, BCa of
 *   a median, or a bootstrap-t of an M-estimate
 * @throws RangeError when empty, not finite, or an option is out of range
 * @source Efron (1979, 1987), Hall (1988); Wilcox (2012), section 4.4; standard error of the bootstrap-t: Tukey &
 *   McLaughlin (1963), Dixon & Tukey (1968), McKean & Schrader (1984)
 * @checked agrees with exact enumeration (cases `exact_bootstrap`) within 3.5 SE
 */
export function bootstrapOneSample(
  x: Float64Array,
  statistic: BootstrapStatistic,
  options: BootstrapOptions & { readonly mu?: number },
): BootstrapResult {
  requireScores(x);
  const settled = settle(options);
  const group = prepare(x, options.trim ?? 20);
  const one = reader(statistic, group);
  const studentized = enoughLeft(statistic, group) ? studentizedReader(statistic, group, 'one-sample') : null;
  const problem: BootstrapProblem = {
    sizes: [group.n],
    estimate: valueSorted(statistic, group.s, group.trim),
    nullValue: (options.mu ?? 0) - group.center,
    grain: rounding(group.center, options.mu ?? 0),
    read: (counts) => one(counts[0] as Int32Array),
    studentized: studentized && ((counts, out) => studentized(counts[0] as Int32Array, out)),
    influences: () => influencesOf(leaveOneOut(statistic, group), 1),
  };
  return shifted(solve(problem, statistic, options.seed, settled), group.center);
}

function enoughLeft(statistic: BootstrapStatistic, group: Resampled): boolean {
  return statistic === 'mean' || statistic === 'median' ? group.n > 1 : group.n - 2 * group.g > 1;
}

/**
 * Bootstrap of the difference between two independent groups, first minus second.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param statistic what is compared
 * @param options `trim`, `B`, `seed`, direction, level, `method`; each group is resampled on its own
 * @returns estimate (difference), se, p, interval; null with a reason as for one sample
 * @throws RangeError when a group is empty or not finite, or an option is out of range
 * @source Efron (1979, 1987), Hall (1988); Wilcox (2012), chapter 5; standard error of the bootstrap-t: Yuen (1974)
 * @checked theory: standard error and coverage; invariance under exchange of the groups
 */
export function bootstrapTwoGroups(
  x: Float64Array,
  y: Float64Array,
  statistic: BootstrapStatistic,
  options: BootstrapOptions,
): BootstrapResult {
  requireScores(x);
  requireScores(y, 1, 'y');
  const settled = settle(options);
  const groups = [prepare(x, options.trim ?? 20), prepare(y, options.trim ?? 20)] as const;
  const [a, b] = groups;
  const gap = a.center - b.center;
  const first = reader(statistic, a);
  const second = reader(statistic, b);
  const enough = groups.every((group) => enoughLeft(statistic, group));
  const problem: BootstrapProblem = {
    sizes: [a.n, b.n],
    estimate: valueSorted(statistic, a.s, a.trim) - valueSorted(statistic, b.s, b.trim),
    nullValue: -gap,
    grain: rounding(a.center, b.center),
    read: (counts) => first(counts[0] as Int32Array) - second(counts[1] as Int32Array),
    studentized: enough ? studentizedDifference(statistic, a, b) : null,
    influences: () =>
      Float64Array.from([
        ...influencesOf(leaveOneOut(statistic, a), (a.n - 1) / a.n),
        ...influencesOf(leaveOneOut(statistic, b), -(b.n - 1) / b.n),
      ]),
  };
  return shifted(solve(problem, statistic, options.seed, settled), gap);
}

function studentizedDifference(
  statistic: BootstrapStatistic,
  a: Resampled,
  b: Resampled,
): BootstrapProblem['studentized'] {
  const first = studentizedReader(statistic, a, 'yuen');
  const second = studentizedReader(statistic, b, 'yuen');
  if (first === null || second === null) return null;
  const own: Studentized = { value: 0, squaredError: 0 };
  return (counts, out) => {
    first(counts[0] as Int32Array, out);
    second(counts[1] as Int32Array, own);
    out.value -= own.value;
    out.squaredError += own.squaredError;
  };
}
