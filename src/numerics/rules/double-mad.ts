import { largestSize, noSpread } from '../inference.ts';
import { MAD_CONSTANT, medianSorted, sorted } from '../order.ts';
import { requireScores } from '../scores.ts';
import { requirePositive, zeroSpreadReason } from './limits.ts';
import { ZERO_MAD } from './mad.ts';

/** Limits of the double-MAD rule: each side has its own spread. */
export interface DoubleMadLimits {
  /** Lower limit in the scores' unit; null with a reason where the spread on that side is 0. */
  readonly lower: number | null;
  /** Upper limit in the scores' unit; null with a reason where the spread on that side is 0. */
  readonly upper: number | null;
  /** Median of the scores, in their unit; null without scores. */
  readonly center: number | null;
  /** constant MAD of the scores at or below the median, in their unit. */
  readonly spreadBelow: number | null;
  /** constant MAD of the scores at or above the median, in their unit. */
  readonly spreadAbove: number | null;
  /** Why a limit is null. */
  readonly reason?: string;
}

/**
 * Limits of the median-distance rule with a spread of its own on each side, for skewed scores.
 * @param x scores (n, any unit)
 * @param options cutoff in scaled MADs, above 0; constant: what each MAD is multiplied by
 * @returns median - cutoff constant MAD_below, median + cutoff constant MAD_above; a limit is null with a reason when
 *   the spread on its side is 0
 * @throws RangeError when *x* holds NaN or an infinity, or *cutoff* or *constant* is not above 0
 * @source common practice; MAD_below = median of M - x over x <= M, MAD_above = median of x - M over x >= M
 * @checked outside check cases double_mad_rule, relative 1e-9
 */
export function doubleMadLimits(
  x: Float64Array,
  options: { readonly cutoff: number; readonly constant?: number },
): DoubleMadLimits {
  const constant = options.constant ?? MAD_CONSTANT;
  requireScores(x, 0);
  requirePositive(options.cutoff, 'cutoff');
  requirePositive(constant, 'constant');
  if (x.length === 0) {
    return {
      lower: null,
      upper: null,
      center: null,
      spreadBelow: null,
      spreadAbove: null,
      reason: 'there are no scores',
    };
  }
  const s = sorted(x);
  const center = medianSorted(s);
  const spreadBelow = constant * sideMad(s, center, -1);
  const spreadAbove = constant * sideMad(s, center, 1);
  const size = largestSize(x);
  const flat = { below: noSpread(spreadBelow, size), above: noSpread(spreadAbove, size) };
  const limits = {
    lower: flat.below ? null : center - options.cutoff * spreadBelow,
    upper: flat.above ? null : center + options.cutoff * spreadAbove,
    center,
    spreadBelow,
    spreadAbove,
  };
  if (!flat.below && !flat.above) return limits;
  if (flat.below && flat.above) return { ...limits, reason: zeroSpreadReason(x, ZERO_MAD) };
  return { ...limits, reason: `no spread ${flat.below ? 'below' : 'above'} the median (MAD of that side = 0)` };
}

function sideMad(s: Float64Array, center: number, side: 1 | -1): number {
  const distances = s.map((score) => side * (score - center)).filter((distance) => distance >= 0);
  return medianSorted(distances.sort());
}
