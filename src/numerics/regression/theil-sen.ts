import { tieCounts } from '../correlation/tie-counts.ts';
import { type Limits, requireLevel } from '../inference.ts';
import { median } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { normalQuantileUpper } from '../tails/normal.ts';
import { select } from './select.ts';

/** Line through the median of the slopes of all pairs of points. */
export interface TheilSen {
  /** Outcome units per unit of x; null with a reason. */
  readonly slope: number | null;
  /** Outcome units. */
  readonly intercept: number | null;
  /** Interval of the slope. */
  readonly interval: Limits | null;
  readonly reason?: string;
}

/**
 * Theil-Sen line with Sen's interval of the slope.
 * @param x predictor (n, any unit)
 * @param y outcome paired with *x*
 * @param options level of the interval (.95)
 * @returns slope = median of pairwise slopes over pairs that differ in x, intercept = median(y) - slope median(x), interval;
 *   null with a reason when x does not vary
 * @throws RangeError when lengths differ, a number is not finite or the level is not between 0 and 1
 * @source Theil 1950; Sen 1968, J. Am. Stat. Assoc. 63, 1379-1389: slopes number (N - C)/2 and (N + C)/2 + 1 with
 *   C = z sqrt(variance of Kendall's S with ties)
 * @checked outside check cases theil_sen, relative 1e-9
 */
export function theilSen(x: Float64Array, y: Float64Array, options: { readonly level?: number } = {}): TheilSen {
  const level = options.level ?? 0.95;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  requireLevel(level);
  const slopes = pairwiseSlopes(x, y);
  const count = slopes.length;
  if (count === 0) return { slope: null, intercept: null, interval: null, reason: 'x does not vary' };
  const middle = (count - 1) >> 1;
  const low = select(slopes, middle);
  const slope = count % 2 === 1 ? low : low + (select(slopes, middle + 1, middle + 1) - low) / 2;
  const n = x.length;
  const variance = (n * (n - 1) * (2 * n + 5) - tieCounts(x).spread - tieCounts(y).spread) / 18;
  const reach = normalQuantileUpper((1 - level) / 2) * Math.sqrt(Math.max(0, variance));
  const first = Math.max(roundHalfEven((count - reach) / 2) - 1, 0);
  const last = Math.min(roundHalfEven((count + reach) / 2), count - 1);
  // The two halves are already apart: each limit is looked for on its own side.
  const lower = first <= middle ? select(slopes, first, 0, middle) : slopes[first]!;
  const upper = last > middle ? select(slopes, last, middle + 1) : slopes[last]!;
  return { slope, intercept: median(y) - slope * median(x), interval: [lower, upper] };
}

function pairwiseSlopes(x: Float64Array, y: Float64Array): Float64Array {
  const n = x.length;
  const slopes = new Float64Array((n * (n - 1)) / 2);
  let count = 0;
  for (let i = 1; i < n; i++) {
    const xi = x[i]!;
    const yi = y[i]!;
    for (let j = 0; j < i; j++) {
      const run = xi - x[j]!;
      if (run !== 0) slopes[count++] = (yi - y[j]!) / run;
    }
  }
  return slopes.subarray(0, count);
}

function roundHalfEven(value: number): number {
  const floor = Math.floor(value);
  if (value - floor !== 0.5) return Math.round(value);
  return floor % 2 === 0 ? floor : floor + 1;
}
