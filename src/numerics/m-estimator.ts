/** M-estimates of location with the MAD as fixed scale, and the mean after the MAD-median rule. */
import { sum } from './moments.ts';
import { MAD_CONSTANT, madSorted, medianSorted, sorted } from './order.ts';
import { requireScores } from './scores.ts';

export interface LocationOptions {
  /** Factor on the MAD (default 1.4826). */
  readonly madConstant?: number;
}

/** An estimate of location with the scale it used; null with a reason when that scale is 0. */
export interface MEstimate {
  readonly estimate: number | null;
  /** madConstant times the MAD, in the scores' unit. */
  readonly scale: number;
  readonly reason?: string;
}

const zeroMad = 'the MAD is 0: more than half the scores are identical';

/** Iterations allowed; a scale held fixed converges in a few dozen. */
const MOST_STEPS = 1000;

function positive(value: number, name: string): void {
  if (!(value > 0 && value < Infinity)) throw new RangeError(`*${name}* must be a positive number; got ${value}`);
}

function iterate(s: Float64Array, scale: number, weight: (z: number) => number): number {
  let at = medianSorted(s);
  for (let step = 0; step < MOST_STEPS; step++) {
    const weights = s.map((score) => weight((score - at) / scale));
    const shift = sum(s.map((score, i) => (weights[i] as number) * (score - at))) / sum(weights);
    at += shift;
    if (Math.abs(shift) <= 1e-14 * scale) break;
  }
  return at;
}

function mEstimate(x: Float64Array, madConstant: number, weight: (z: number) => number): MEstimate {
  requireScores(x);
  positive(madConstant, 'madConstant');
  const s = sorted(x);
  const scale = madConstant * madSorted(s);
  if (scale === 0) return { estimate: null, scale, reason: zeroMad };
  return { estimate: iterate(s, scale, weight), scale };
}

/**
 * Huber's M-estimate of location.
 * @param x scores, at least one, finite
 * @param options `k` bend (default 1.345: 95 % efficient for normal scores), `madConstant`
 * @returns estimate and scale, in the scores' unit; null with a reason when the MAD is 0
 * @throws RangeError when empty, not finite, or an option is not positive
 * @source Huber (1964): sum clip((x - mu)/s, -k, k) = 0, s held fixed, started at the median
 * @checked cases `huber_location`, rtol 1e-9
 */
export function huberLocation(x: Float64Array, options: LocationOptions & { readonly k?: number } = {}): MEstimate {
  const { k = 1.345, madConstant = MAD_CONSTANT } = options;
  positive(k, 'k');
  return mEstimate(x, madConstant, (z) => (Math.abs(z) <= k ? 1 : k / Math.abs(z)));
}

/**
 * Tukey's biweight M-estimate of location.
 * @param x scores, at least one, finite
 * @param options `c` cut (default 4.685), `madConstant`
 * @returns estimate and scale, in the scores' unit; null with a reason when the MAD is 0
 * @throws RangeError when empty, not finite, or an option is not positive
 * @source Beaton & Tukey (1974): weights (1 - (z/c)^2)^2 for |z| < c, scale held fixed, started at the median
 * @checked cases `bisquare_location`, rtol 1e-9
 */
export function bisquareLocation(x: Float64Array, options: LocationOptions & { readonly c?: number } = {}): MEstimate {
  const { c = 4.685, madConstant = MAD_CONSTANT } = options;
  positive(c, 'c');
  return mEstimate(x, madConstant, (z) => {
    const rest = 1 - (z / c) * (z / c);
    return rest > 0 ? rest * rest : 0;
  });
}

/** What a one-step estimate leaves, for scores already sorted. */
export interface OneStep {
  readonly estimate: number;
  /** Scores below and above the bend. */
  readonly low: number;
  readonly high: number;
}

/**
 * One-step M-estimate of scores that are already sorted.
 * @param s ascending scores, at least one
 * @param k bend, > 0
 * @param scale MAD times its constant, >= 0; at 0 the step leads to the median
 * @returns estimate and the counts beyond the bend
 * @source Wilcox (2012), section 3.6
 * @checked cases `one_step_m`, rtol 1e-9
 */
export function oneStepSorted(s: Float64Array, k: number, scale: number): OneStep {
  const n = s.length;
  const center = medianSorted(s);
  let low = 0;
  while (low < n && (s[low] as number) - center < -k * scale) low++;
  let high = 0;
  while (high < n && (s[n - 1 - high] as number) - center > k * scale) high++;
  let inside = 0;
  for (let i = low; i < n - high; i++) inside += (s[i] as number) - center;
  return { estimate: center + (k * scale * (high - low) + inside) / (n - low - high), low, high };
}

/**
 * One-step M-estimate of location.
 * @param x scores, at least one, finite
 * @param options `k` bend (default 1.28), `madConstant`
 * @returns estimate, scale, and the counts `low` and `high` beyond the bend; null with a reason when the MAD is 0
 * @throws RangeError when empty, not finite, or an option is not positive
 * @source Wilcox (2012), section 3.6: (k s (i2 - i1) + sum of x with |z| <= k) / (n - i1 - i2)
 * @checked cases `one_step_m`, rtol 1e-9
 */
export function oneStepM(
  x: Float64Array,
  options: LocationOptions & { readonly k?: number } = {},
): MEstimate & { readonly low: number; readonly high: number } {
  const { k = 1.28, madConstant = MAD_CONSTANT } = options;
  requireScores(x);
  positive(k, 'k');
  positive(madConstant, 'madConstant');
  const s = sorted(x);
  const scale = madConstant * madSorted(s);
  const step = oneStepSorted(s, k, scale);
  return scale === 0 ? { ...step, estimate: null, scale, reason: zeroMad } : { ...step, scale };
}

/**
 * Mean of the scores within the MAD-median rule, for scores already sorted.
 * @param s ascending scores, at least one
 * @param reach largest |score - median| kept, >= 0; at 0 the estimate is the median
 * @returns estimate and how many were left out
 * @source Wilcox & Keselman (2003)
 * @checked cases `modified_one_step_m`, rtol 1e-9
 */
export function modifiedOneStepSorted(s: Float64Array, reach: number): { estimate: number; removed: number } {
  const center = medianSorted(s);
  let kept = 0;
  let inside = 0;
  for (let i = 0; i < s.length; i++) {
    const gap = (s[i] as number) - center;
    if (Math.abs(gap) <= reach) {
      kept++;
      inside += gap;
    }
  }
  // A reach below the MAD may keep nothing.
  return { estimate: kept === 0 ? center : center + inside / kept, removed: s.length - kept };
}

/**
 * Modified one-step M-estimate (MOM): the mean after the MAD-median rule.
 * @param x scores, at least one, finite
 * @param options `cutoff` (default 2.24), `madConstant`
 * @returns estimate, scale, and how many scores were left out; null with a reason when the MAD is 0
 * @throws RangeError when empty, not finite, or an option is not positive
 * @source Wilcox & Keselman (2003): mean of the x with |x - median| <= cutoff s
 * @checked cases `modified_one_step_m`, rtol 1e-9
 */
export function modifiedOneStepM(
  x: Float64Array,
  options: LocationOptions & { readonly cutoff?: number } = {},
): MEstimate & { readonly removed: number } {
  const { cutoff = 2.24, madConstant = MAD_CONSTANT } = options;
  requireScores(x);
  positive(cutoff, 'cutoff');
  positive(madConstant, 'madConstant');
  const s = sorted(x);
  const scale = madConstant * madSorted(s);
  const step = modifiedOneStepSorted(s, cutoff * scale);
  return scale === 0 ? { ...step, estimate: null, scale, reason: zeroMad } : { ...step, scale };
}
