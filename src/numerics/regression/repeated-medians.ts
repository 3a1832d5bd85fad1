import { median } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { select } from './select.ts';

/** Line through the median over points of each point's median slope. */
export interface RepeatedMedians {
  /** Outcome units per unit of x; null with a reason. */
  readonly slope: number | null;
  /** Outcome units. */
  readonly intercept: number | null;
  readonly reason?: string;
}

/**
 * Siegel's line, which up to half of the points cannot carry away.
 * @param x predictor (n, any unit)
 * @param y outcome paired with *x*
 * @returns slope = median over i of the median slope from point i to points that differ in x, intercept = median(y - slope x);
 *   null with a reason when x does not vary
 * @throws RangeError when lengths differ or a number is not finite
 * @source Siegel 1982, Biometrika 69, 242-244: med_i med_j (y_j - y_i) / (x_j - x_i)
 * @checked outside check cases repeated_medians, relative 1e-9
 */
export function repeatedMedians(x: Float64Array, y: Float64Array): RepeatedMedians {
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  if (x.every((value) => value === x[0])) return { slope: null, intercept: null, reason: 'x does not vary' };
  const slopes = new Float64Array(x.length);
  const slope = medianInPlace(Float64Array.from(x, (_, i) => medianInPlace(slopesFrom(x, y, i, slopes))));
  return { slope, intercept: median(y.map((value, i) => value - slope * x[i]!)) };
}

/** Slopes from point i to the points that differ in x, in the front of `slopes`. */
function slopesFrom(x: Float64Array, y: Float64Array, i: number, slopes: Float64Array): Float64Array {
  let count = 0;
  for (let j = 0; j < x.length; j++) {
    const run = x[j]! - x[i]!;
    if (run !== 0) slopes[count++] = (y[j]! - y[i]!) / run;
  }
  return slopes.subarray(0, count);
}

function medianInPlace(values: Float64Array): number {
  const middle = (values.length - 1) >> 1;
  const low = select(values, middle);
  return values.length % 2 === 1 ? low : low + (select(values, middle + 1, middle + 1) - low) / 2;
}
