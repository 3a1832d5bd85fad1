/** How far the estimates of a grid spread, and by which choice. */
import { medianSorted, quantileSorted, sorted } from '../numerics/order.ts';
import type { AxisName } from './grid-options.ts';

export interface Spread {
  readonly n: number;
  readonly least: number;
  readonly most: number;
  readonly median: number;
  /** Ends judged for a change of sign: least and most, or from 100 analyses on the percentiles 1 and 99. */
  readonly ends: readonly [number, number];
  readonly endsAre: 'range' | 'percentiles';
  /** Whether the two ends have opposite signs. */
  readonly reverses: boolean;
}

/** Analyses from which percentiles are taken instead of the least and most. */
const FOR_PERCENTILES = 100;

/**
 * Range, median and change of sign of the estimates.
 *
 * @param estimates one an analysis, in one unit
 * @returns null without estimates
 * @source Patel, Burford & Ioannidis 2015: percentiles 1 and 99 of opposite sign; with fewer than 100, least and most
 */
export function spreadOf(estimates: readonly number[]): Spread | null {
  if (estimates.length === 0) return null;
  const s = sorted(Float64Array.from(estimates));
  const least = s[0] as number;
  const most = s[s.length - 1] as number;
  const many = s.length >= FOR_PERCENTILES;
  const ends: [number, number] = many ? [quantileSorted(s, 0.01, 7), quantileSorted(s, 0.99, 7)] : [least, most];
  return {
    n: s.length,
    least,
    most,
    median: medianSorted(s),
    ends,
    endsAre: many ? 'percentiles' : 'range',
    reverses: ends[0] < 0 && ends[1] > 0,
  };
}

export interface AxisShare {
  readonly axis: AxisName;
  /** Share of the sum of squares of the estimates between the options of this axis, 0 to 1; null where all are equal. */
  readonly share: number | null;
  /** Mean estimate under each option. */
  readonly means: readonly { readonly value: string; readonly mean: number; readonly n: number }[];
}

/**
 * How much of the spread of the estimates goes with each axis: main effects over the combinations asked for, each
 * combination counting once even where several lead to one analysis.
 *
 * @param combinations estimates in one unit, with the option on each axis
 * @returns one share for each axis with two or more options, largest first
 * @source eta squared = SS between options / SS total (Fisher 1925); main effects of a crossed grid add up where it is whole
 */
export function axisShares(
  combinations: readonly { readonly combination: { readonly [axis in AxisName]: string }; readonly estimate: number }[],
): AxisShare[] {
  const all = combinations.map((each) => each.estimate);
  const mean = all.reduce((sum, each) => sum + each, 0) / Math.max(1, all.length);
  const total = all.reduce((sum, each) => sum + (each - mean) ** 2, 0);
  const [first] = combinations;
  const shares: AxisShare[] = [];
  for (const axis of Object.keys(first?.combination ?? {}) as AxisName[]) {
    const groups = new Map<string, number[]>();
    for (const { combination, estimate } of combinations) {
      groups.set(combination[axis], [...(groups.get(combination[axis]) ?? []), estimate]);
    }
    if (groups.size < 2) continue;
    const means = [...groups].map(([value, own]) => {
      return { value, mean: own.reduce((sum, each) => sum + each, 0) / own.length, n: own.length };
    });
    const between = means.reduce((sum, group) => sum + group.n * (group.mean - mean) ** 2, 0);
    const flat = !(total > 1e-20 * mean * mean * all.length);
    shares.push({ axis, share: flat ? null : Math.min(1, between / total), means });
  }
  return shares.sort((a, b) => (b.share ?? 0) - (a.share ?? 0));
}
