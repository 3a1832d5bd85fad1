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
  valueSorted,
} from './bootstrap-statistic.ts';
import { walkWinsorized, winsorWalk } from './resample-walks.ts';
import { requirePairs, requireScores } from './scores.ts';

/** One margin of the pairs: its scores sorted, and which pair each belongs to. */
interface Margin {
  readonly group: Resampled;
  readonly order: Uint32Array;
  readonly read: (counts: Int32Array) => number;
  /** The margin's own counts, in rank order. */
  readonly counts: Int32Array;
}

function margin(x: Float64Array, statistic: BootstrapStatistic, trim: number): Margin {
  const group = prepare(x, trim);
  const order = Uint32Array.from(x, (_, i) => i).sort((i, j) => (x[i] as number) - (x[j] as number));
  return { group, order, read: reader(statistic, group), counts: new Int32Array(group.n) };
}

function take({ order, counts }: Margin, pairs: Int32Array): void {
  for (let i = 0; i < counts.length; i++) counts[i] = pairs[order[i] as number] as number;
}

function centred(x: Float64Array, by: number): Float64Array {
  return x.map((score) => score - by);
}

/** Leave-one-out difference per pair: the margins' values come in rank order and are put back in the pairs' order. */
function pairInfluences(statistic: BootstrapStatistic, a: Margin, b: Margin): Float64Array {
  const out = new Float64Array(a.group.n);
  leaveOneOut(statistic, a.group).forEach((value, i) => {
    out[a.order[i] as number] = value;
  });
  leaveOneOut(statistic, b.group).forEach((value, i) => {
    out[b.order[i] as number]! -= value;
  });
  return influencesOf(out, 1);
}

/** Yuen's standard error for pairs, from the counts of pairs: squares of winsorized x minus winsorized y. */
function studentizedPairs(
  x: Float64Array,
  y: Float64Array,
  a: Margin,
  b: Margin,
  g: number,
): BootstrapProblem['studentized'] {
  const n = x.length;
  const h = n - 2 * g;
  if (h < 2) return null;
  const first = centred(x, a.group.center);
  const second = centred(y, b.group.center);
  const one = winsorWalk();
  const two = winsorWalk();
  return ([pairs], out) => {
    const counts = pairs as Int32Array;
    take(a, counts);
    walkWinsorized(a.group.s, a.counts, g, one);
    take(b, counts);
    walkWinsorized(b.group.s, b.counts, g, two);
    const center = (one.sum - two.sum) / n;
    let squares = 0;
    for (let i = 0; i < n; i++) {
      const times = counts[i] as number;
      counts[i] = 0;
      if (times === 0) continue;
      const own = Math.min(Math.max(first[i] as number, one.low), one.high);
      const other = Math.min(Math.max(second[i] as number, two.low), two.high);
      const gap = own - other - center;
      squares += times * gap * gap;
    }
    out.value = (one.trimmed - two.trimmed) / h;
    out.squaredError = squares > 1e-28 * (one.squares + two.squares) ? squares / (h * (h - 1)) : 0;
  };
}

/**
 * Bootstrap of the difference between the two MARGINS of pairs, first minus second; pairs are resampled whole. For the
 * statistic of the differences use bootstrapOneSample on them.
 * @param x scores, at least one, finite
 * @param y scores, same length
 * @param statistic what is compared
 * @param options `trim`, `B`, `seed`, direction, level, `method`
 * @returns estimate (difference of the margins' statistics), se, p, interval; null with a reason as for one sample, and
 *   for a bootstrap-t of anything but means and trimmed means
 * @throws RangeError when empty, of unequal length, not finite, or an option is out of range
 * @source Efron (1979, 1987); Wilcox (2012), section 5.9; standard error of the bootstrap-t: Yuen for pairs
 * @checked agrees with bootstrapOneSample of the differences for means, rtol 1e-10
 */
export function bootstrapPaired(
  x: Float64Array,
  y: Float64Array,
  statistic: BootstrapStatistic,
  options: BootstrapOptions,
): BootstrapResult {
  requireScores(x);
  requireScores(y, 1, 'y');
  requirePairs(x, y);
  const settled = settle(options);
  const a = margin(x, statistic, options.trim ?? 20);
  const b = margin(y, statistic, options.trim ?? 20);
  const { group: first } = a;
  const { group: second } = b;
  const gap = first.center - second.center;
  const yuen = statistic === 'mean' || statistic === 'trimmed-mean';
  const problem: BootstrapProblem = {
    sizes: [x.length],
    estimate: valueSorted(statistic, first.s, first.trim) - valueSorted(statistic, second.s, second.trim),
    nullValue: -gap,
    grain: rounding(first.center, second.center),
    read: ([pairs]) => {
      const counts = pairs as Int32Array;
      take(a, counts);
      take(b, counts);
      counts.fill(0);
      return a.read(a.counts) - b.read(b.counts);
    },
    studentized: yuen ? studentizedPairs(x, y, a, b, statistic === 'mean' ? 0 : first.g) : null,
    influences: () => pairInfluences(statistic, a, b),
  };
  return shifted(solve(problem, statistic, options.seed, settled), gap);
}
