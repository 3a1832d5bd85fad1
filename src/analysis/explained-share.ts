/** The share of variance an effect on (trimmed) means explains, and its bootstrap interval over participants. */
import { winsorizedNormalSd } from '../numerics/effect-size/akp-robust-d.ts';
import { sorted } from '../numerics/order.ts';
import { helmertContrasts } from '../numerics/repeated.ts';
import { resample } from '../numerics/resample.ts';
import { trimCount } from '../numerics/scores.ts';
import type { EffectSize, Limits } from './finding.ts';
import type { Layout } from './layout.ts';
import type { OmnibusContext } from './omnibus-row.ts';

/** Streams of the seed: an effect size never shares its draws with a row's own bootstrap. */
const SHARE_STREAM = 111;
const STATISTIC_STREAM = 112;

/** One group ready to be resampled. */
interface Ready {
  readonly n: number;
  readonly g: number;
  readonly columns: readonly Float64Array[];
  /** Participants in the order of each column's scores. */
  readonly orders: readonly Int32Array[];
}

/** (Trimmed) means and winsorized scores of one group or of a resample of it. */
interface Read {
  readonly means: Float64Array;
  readonly low: Float64Array;
  readonly high: Float64Array;
}

/**
 * Share of variance that an effect explains, with a percentile bootstrap interval over the participants of each group.
 *
 * @param layout groups and columns; where no within factor is asked about there is one column
 * @param context trim (integer percentage), alpha, B, seed
 * @returns A / (A + E): A the mean squared effect of the (trimmed) cell means, every cell alike; E the mean over groups
 *   of the winsorized variance of the comparisons within participants (of the scores, where none are asked about),
 *   rescaled so that it estimates the variance of normal scores; null with a reason where nothing varies
 * @source a robust share of variance after Wilcox & Tian 2011; winsorized variance rescaled as in Algina, Keselman &
 *   Penfield 2005; at trim 0 and equal n the two parts of Hays 1963
 * @checked by hand; at trim 0 from the sums of squares of the analysis of variance, rtol 1e-9
 */
export function explainedShare(layout: Layout, context: OmnibusContext): EffectSize {
  const name = context.trim === 0 ? 'share of variance' : 'robust share of variance';
  const how = `percentile bootstrap over participants, B = ${context.resamples}`;
  const groups = layout.groups.map((group) => ready(group.scores, context.trim));
  if (groups.some((group) => group.n - 2 * group.g < 2)) {
    return { name, how, value: null, interval: null, reason: 'a group keeps fewer than 2 scores' };
  }
  const read = shareReader(layout, groups, context.trim);
  const value = read(groups.map((group) => new Int32Array(group.n).fill(1)));
  if (value === null) return { name, how, value, interval: null, reason: 'the scores do not vary' };
  return {
    name,
    how,
    value,
    ...bootstrapped(
      groups.map((group) => group.n),
      context,
      read,
      SHARE_STREAM,
    ),
  };
}

/**
 * Percentile bootstrap interval of any statistic of groups of participants.
 *
 * @param layout groups and columns
 * @param context alpha, B, seed
 * @param statistic value of a resample from the counts of each group's participants, null where it is not defined
 * @source Efron & Tibshirani 1993; participants are resampled within their group
 */
export function bootstrapLayout(
  layout: Layout,
  context: OmnibusContext,
  statistic: (counts: readonly Int32Array[]) => number | null,
): { readonly interval: Limits | null; readonly reason?: string } {
  const sizes = layout.groups.map((group) => group.scores[0]?.length ?? 0);
  if (sizes.some((n) => n < 1)) return { interval: null, reason: 'a group holds no participants' };
  return bootstrapped(sizes, context, statistic, STATISTIC_STREAM);
}

/** The scores of a resample written out. */
export function expanded(column: Float64Array, counts: Int32Array): Float64Array {
  const out = new Float64Array(column.length);
  let at = 0;
  for (let i = 0; i < column.length; i++) for (let k = counts[i] as number; k > 0; k--) out[at++] = column[i] as number;
  return out;
}

function bootstrapped(
  sizes: readonly number[],
  context: OmnibusContext,
  read: (counts: readonly Int32Array[]) => number | null,
  stream: number,
): { readonly interval: Limits | null; readonly reason?: string } {
  if (context.resamples === 0) return { interval: null, reason: 'not resampled' };
  const draws = new Float64Array(context.resamples);
  const take = (counts: readonly Int32Array[], index: number) => {
    draws[index] = read(counts) ?? NaN;
    for (const own of counts) own.fill(0);
  };
  resample(sizes, context.resamples, context.seed, take, stream);
  const defined = sorted(draws.filter((draw) => !Number.isNaN(draw)));
  if (defined.length < 0.95 * draws.length || defined.length < 40) {
    return { interval: null, reason: 'too many resamples have no spread' };
  }
  const k = Math.max(1, Math.floor((context.alpha / 2) * (defined.length + 1) + 1e-9));
  return { interval: [defined[k - 1] as number, defined[defined.length - k] as number] };
}

function ready(columns: readonly Float64Array[], trim: number): Ready {
  const n = columns[0]?.length ?? 0;
  const orders = columns.map((column) =>
    Int32Array.from(column.keys()).sort((a, b) => (column[a] as number) - (column[b] as number)),
  );
  return { n, g: trimCount(n, trim), columns, orders };
}

function shareReader(layout: Layout, groups: readonly Ready[], trim: number) {
  const columns = groups[0]?.columns.length ?? 1;
  const comparisons = withinComparisons(layout);
  const center = betweenCentering(layout);
  const c = winsorizedNormalSd(trim);
  const cells = groups.length * columns;
  return (counts: readonly Int32Array[]): number | null => {
    const reads = groups.map((group, j) => readGroup(group, counts[j] as Int32Array));
    let effect = 0;
    let error = 0;
    for (const comparison of comparisons) {
      const values = reads.map((read) => weighted(comparison, read.means));
      for (const value of center(values)) effect += value * value;
      groups.forEach((group, j) => {
        error += comparisonVariance(group, counts[j] as Int32Array, reads[j] as Read, comparison);
      });
    }
    const E = error / (groups.length * comparisons.length * c * c);
    const A = effect / cells;
    return A + E > 0 ? A / (A + E) : null;
  };
}

/** Orthonormal comparisons among the columns; the column itself where nothing within participants is asked about. */
function withinComparisons(layout: Layout): Float64Array[] {
  return layout.within.reduce<Float64Array[]>(
    (all, factor) => {
      const k = factor.levels.length;
      const own = helmertContrasts(k);
      const columns = Array.from({ length: k - 1 }, (_, c) =>
        Float64Array.from({ length: k }, (_, i) => own.data[i * (k - 1) + c] as number),
      );
      return all.flatMap((before) => columns.map((column) => outer(before, column)));
    },
    [Float64Array.of(1)],
  );
}

function outer(a: Float64Array, b: Float64Array): Float64Array {
  return Float64Array.from(
    { length: a.length * b.length },
    (_, i) => (a[Math.floor(i / b.length)] as number) * (b[i % b.length] as number),
  );
}

/** The part of a value per group that the asked-about between factors' joint effect carries, every group alike. */
function betweenCentering(layout: Layout): (values: readonly number[]) => number[] {
  const factors = layout.between;
  return (values) => {
    let out = [...values];
    factors.forEach((factor, place) => {
      const means = new Map<string, { sum: number; n: number }>();
      const keyOf = (group: number) => (layout.groups[group]?.levels ?? []).filter((_, i) => i !== place).join(',');
      out.forEach((value, group) => {
        const own = means.get(keyOf(group)) ?? { sum: 0, n: 0 };
        means.set(keyOf(group), { sum: own.sum + value, n: own.n + 1 });
      });
      const mean = (group: number) => {
        const own = means.get(keyOf(group));
        return own ? own.sum / own.n : 0;
      };
      // A factor of the effect keeps the distance from its mean, any other only the mean.
      out = out.map((value, group) => (factor.inEffect ? value - mean(group) : mean(group)));
    });
    return out;
  };
}

/** Trimmed mean and winsorizing limits of every column of a resample, read in the order of its scores. */
function readGroup(group: Ready, counts: Int32Array): Read {
  const q = group.columns.length;
  const read = { means: new Float64Array(q), low: new Float64Array(q), high: new Float64Array(q) };
  const last = group.n - group.g;
  for (let c = 0; c < q; c++) {
    const column = group.columns[c] as Float64Array;
    const order = group.orders[c] as Int32Array;
    let passed = 0;
    let sum = 0;
    let low = NaN;
    let high = NaN;
    for (let r = 0; r < order.length && passed < last; r++) {
      const times = counts[order[r] as number] as number;
      if (times === 0) continue;
      const value = column[order[r] as number] as number;
      const inside = Math.min(passed + times, last) - Math.max(passed, group.g);
      if (inside > 0) {
        sum += inside * value;
        if (Number.isNaN(low)) low = value;
        high = value;
      }
      passed += times;
    }
    read.means[c] = sum / (group.n - 2 * group.g);
    read.low[c] = low;
    read.high[c] = high;
  }
  return read;
}

function comparisonVariance(group: Ready, counts: Int32Array, read: Read, comparison: Float64Array): number {
  const { n, columns } = group;
  let sum = 0;
  let squares = 0;
  const center = weighted(comparison, read.means);
  for (let i = 0; i < n; i++) {
    const times = counts[i] as number;
    if (times === 0) continue;
    let value = -center;
    for (let c = 0; c < columns.length; c++) {
      const own = Math.min(
        Math.max((columns[c] as Float64Array)[i] as number, read.low[c] as number),
        read.high[c] as number,
      );
      value += (comparison[c] as number) * own;
    }
    sum += times * value;
    squares += times * value * value;
  }
  return Math.max(0, squares - (sum * sum) / n) / (n - 1);
}

function weighted(weights: Float64Array, values: Float64Array): number {
  let total = 0;
  for (let i = 0; i < weights.length; i++) total += (weights[i] as number) * (values[i] as number);
  return total;
}
