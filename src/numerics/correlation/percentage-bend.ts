import { type Alternative, largestSize, noSpread } from '../inference.ts';
import { median } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { type Correlation, correlationTest, noCorrelation } from './correlation-test.ts';

/**
 * Percentage bend correlation: scores bent at a share of the distances from the median.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options beta: share of distances that are bent, above 0 up to .5 (.2); direction
 * @returns r, t, df = n - 2, p; null with a reason for fewer than 3 pairs or a bend distance of 0
 * @throws RangeError when lengths differ, a score is not finite or *beta* is not above 0 and at most .5
 * @source Wilcox 1994, Psychometrika 59, 601-616: omega = floor((1-beta) n + .5)-th smallest |x - M|, A = clip((x - phi) /
 *   omega, -1, 1), r = sum A B / sqrt(sum A^2 sum B^2)
 * @checked outside check cases percentage_bend_correlation, relative 1e-9
 */
export function percentageBendCorrelation(
  x: Float64Array,
  y: Float64Array,
  options: { readonly beta?: number; readonly alternative?: Alternative } = {},
): Correlation {
  const { beta = 0.2, alternative = 'two-sided' } = options;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  if (!(beta > 0 && beta <= 0.5)) throw new RangeError(`*beta* must be above 0 and at most .5; got ${beta}`);
  const n = x.length;
  if (n < 3) return noCorrelation(n, 'fewer than 3 pairs');
  const a = bent(x, beta);
  const b = bent(y, beta);
  if (a === null || b === null) {
    return noCorrelation(n, `too many scores of ${a === null ? 'x' : 'y'} equal their median (bend distance = 0)`);
  }
  let ab = 0;
  let aa = 0;
  let bb = 0;
  for (let i = 0; i < n; i++) {
    ab += a[i]! * b[i]!;
    aa += a[i]! * a[i]!;
    bb += b[i]! * b[i]!;
  }
  return correlationTest(Math.max(-1, Math.min(1, ab / Math.sqrt(aa) / Math.sqrt(bb))), n, n - 2, alternative);
}

/** Scores measured from the percentage bend location and bent at -1 and 1; null when the bend distance is 0. */
function bent(x: Float64Array, beta: number): Float64Array | null {
  const n = x.length;
  const center = median(x);
  const m = Math.floor((1 - beta) * n + 0.5);
  const omega = x.map((score) => Math.abs(score - center)).sort()[m - 1]!;
  if (noSpread(omega, largestSize(x))) return null;
  let low = 0;
  let high = 0;
  let total = 0;
  for (const score of x) {
    const psi = (score - center) / omega;
    if (psi < -1) low++;
    else if (psi > 1) high++;
    else total += score;
  }
  const phi = (omega * (high - low) + total) / (n - low - high);
  return x.map((score) => Math.max(-1, Math.min(1, (score - phi) / omega)));
}
