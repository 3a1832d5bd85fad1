import { median } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';

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
  const slope = median(Float64Array.from(x, (_, i) => median(slopesFrom(x, y, i))));
  return { slope, intercept: median(y.map((value, i) => value - slope * x[i]!)) };
}

function slopesFrom(x: Float64Array, y: Float64Array, i: number): Float64Array {
  const slopes = new Float64Array(x.length);
  let count = 0;
  for (let j = 0; j < x.length; j++) {
    const run = x[j]! - x[i]!;
    if (run !== 0) slopes[count++] = (y[j]! - y[i]!) / run;
  }
  return slopes.subarray(0, count);
}
