import { largestSize, noSpread } from '../inference.ts';
import { quantileSorted, sorted, tukeyHingesSorted } from '../order.ts';
import { requireScores } from '../scores.ts';
import { noLimits, type RuleLimits, requirePositive, zeroSpreadReason } from './limits.ts';

/** How the quartiles are defined: Hyndman & Fan 1996 type 6 or 7, or the medians of the two halves. */
export type Quartiles = 'type6' | 'type7' | 'tukey_hinges';

/** Limits with the quartiles they stand on. */
export interface FenceLimits extends RuleLimits {
  /** Lower and upper quartile in the scores' unit; null without scores. */
  readonly quartiles: readonly [number, number] | null;
}

/**
 * Fences: quartiles -+ k times their distance.
 * @param x scores (n, any unit)
 * @param options k in quartile distances, above 0; quartiles: their definition
 * @returns lower and upper fence, center = middle between the quartiles, spread = quartile distance, all in the scores'
 *   unit; limits null with a reason when the quartiles coincide
 * @throws RangeError when *x* holds NaN or an infinity, *k* is not above 0 or *quartiles* is none of the three
 * @source Tukey 1977, Exploratory Data Analysis, 2D: Q1 - k (Q3 - Q1), Q3 + k (Q3 - Q1); Hyndman & Fan 1996, Am. Stat.
 *   50, 361-365 for types 6 and 7
 * @checked outside check cases iqr_fences, relative 1e-9
 */
export function fenceLimits(
  x: Float64Array,
  options: { readonly k: number; readonly quartiles: Quartiles },
): FenceLimits {
  requireScores(x, 0);
  requirePositive(options.k, 'k');
  if (x.length === 0) return { ...noLimits('there are no scores'), quartiles: null };
  const quartiles = quartilesOf(x, options.quartiles);
  const [q1, q3] = quartiles;
  const spread = q3 - q1;
  const center = q1 + spread / 2;
  if (noSpread(spread, largestSize(x))) {
    return { ...noLimits(zeroSpreadReason(x, ZERO_QUARTILES), center, 0), quartiles };
  }
  return { lower: q1 - options.k * spread, upper: q3 + options.k * spread, center, spread, quartiles };
}

/** Why the quartile distance is 0 when the scores are not all equal. */
export const ZERO_QUARTILES = 'the quartiles coincide (quartile distance = 0)';

function quartilesOf(x: Float64Array, quartiles: Quartiles): readonly [number, number] {
  const s = sorted(x);
  if (quartiles === 'tukey_hinges') return tukeyHingesSorted(s);
  if (quartiles === 'type6') return [quantileSorted(s, 0.25, 6), quantileSorted(s, 0.75, 6)];
  if (quartiles === 'type7') return [quantileSorted(s, 0.25, 7), quantileSorted(s, 0.75, 7)];
  throw new RangeError(`*quartiles* must be type6, type7 or tukey_hinges; got ${String(quartiles)}`);
}
