import type { Limits, TestOptions } from '../inference.ts';
import { lgamma } from '../tails/special.ts';
import { cohensD } from './cohens-d.ts';
import { type Effect, scaled } from './effect.ts';

/** Remainder of Stirling's series for log gamma. */
function stirlingRest(x: number): number {
  const r = 1 / (x * x);
  return (1 / 12 - r * (1 / 360 - r * (1 / 1260 - r * (1 / 1680 - r / 1188)))) / x;
}

/**
 * Exact small-sample correction of a standardized difference.
 * @param df degrees of freedom of the SD, > 1
 * @returns J = gamma(df/2) / (sqrt(df/2) gamma((df-1)/2)), between 0 and 1
 * @throws RangeError when df is not above 1
 * @source Hedges (1981)
 * @checked cases `cohens_d`, rtol 1e-9
 */
export function smallSampleFactor(df: number): number {
  if (!(df > 1)) throw new RangeError(`*df* must be above 1; got ${df}`);
  const x = df / 2;
  // Two large log gammas would cancel digits: beyond 40 the difference of their Stirling series is taken instead.
  if (df <= 40) return Math.exp(lgamma(x) - lgamma(x - 0.5)) / Math.sqrt(x);
  return Math.exp(-(x - 1) * Math.log1p(-0.5 / x) - 0.5 + stirlingRest(x) - stirlingRest(x - 0.5));
}

/**
 * Usual approximation of the small-sample correction.
 * @param df degrees of freedom of the SD, > 1
 * @returns 1 - 3 / (4 df - 1)
 * @throws RangeError when df is not above 1
 * @source Hedges (1981)
 * @checked cases `cohens_d`, rtol 1e-9
 */
export function smallSampleApproximation(df: number): number {
  if (!(df > 1)) throw new RangeError(`*df* must be above 1; got ${df}`);
  return 1 - 3 / (4 * df - 1);
}

/**
 * Hedges' g: the pooled standardized difference of two independent means, corrected for small samples.
 * @param x scores of the first group, at least two, finite
 * @param y scores of the second group, at least two, finite
 * @param options direction, level
 * @returns value g = J d, interval J times the noncentral t limits of d, `factor` J, and `approximate` = d (1 - 3/(4df-1));
 *   null with a reason for a group of one or no spread
 * @throws RangeError when a group is empty or not finite, or the level is out of range
 * @source Hedges (1981)
 * @checked cases `cohens_d`, rtol 1e-9, limits 1e-8
 */
export function hedgesG(
  x: Float64Array,
  y: Float64Array,
  options: TestOptions = {},
): Effect & { readonly factor: number | null; readonly approximate: number | null } {
  const d = cohensD(x, y, options);
  if (d.value === null) return { ...d, factor: null, approximate: null };
  const df = x.length + y.length - 2;
  const factor = smallSampleFactor(df);
  const interval: Limits | null = scaled(d.interval, factor);
  return { value: factor * d.value, interval, factor, approximate: smallSampleApproximation(df) * d.value };
}
