import { largestSize, noSpread } from '../inference.ts';
import { tukeyHinges } from '../order.ts';
import { requireScores } from '../scores.ts';
import { ZERO_QUARTILES } from './iqr-fences.ts';
import { noLimits, type RuleLimits, requirePositive, zeroSpreadReason } from './limits.ts';
import { medcouple } from './medcouple.ts';

/** Limits with the skewness measure they follow. */
export interface AdjustedFences extends RuleLimits {
  /** Medcouple of the scores, between -1 and 1; null without scores. */
  readonly medcouple: number | null;
}

/**
 * Fences that reach further on the side of the longer tail.
 * @param x scores (n, any unit)
 * @param options coef in hinge distances (1.5); exponents of the medcouple for the short and the long tail (-4 and 3)
 * @returns lower and upper fence, center = middle between the hinges, spread = hinge distance, in the scores' unit;
 *   limits null with a reason when the hinges coincide
 * @throws RangeError when *x* holds NaN or an infinity, or *coef* is not above 0
 * @source Hubert & Vandervieren 2008, Comput. Stat. Data Anal. 52, 5186-5201, section 3: Q1 - 1.5 exp(-4 MC) IQR,
 *   Q3 + 1.5 exp(3 MC) IQR for MC >= 0, exponents -3 and 4 for MC < 0
 * @checked outside check cases adjusted_boxplot, relative 1e-9
 */
export function adjustedFences(
  x: Float64Array,
  options: { readonly coef?: number; readonly shortExponent?: number; readonly longExponent?: number } = {},
): AdjustedFences {
  const { coef = 1.5, shortExponent = -4, longExponent = 3 } = options;
  requireScores(x, 0);
  requirePositive(coef, 'coef');
  const mc = medcouple(x);
  if (mc === null) return { ...noLimits('there are no scores'), medcouple: null };
  const [q1, q3] = tukeyHinges(x);
  const spread = q3 - q1;
  const center = q1 + spread / 2;
  if (noSpread(spread, largestSize(x))) {
    return { ...noLimits(zeroSpreadReason(x, ZERO_QUARTILES), center, 0), medcouple: mc };
  }
  const below = mc >= 0 ? shortExponent * mc : -longExponent * mc;
  const above = mc >= 0 ? longExponent * mc : -shortExponent * mc;
  return {
    lower: q1 - coef * Math.exp(below) * spread,
    upper: q3 + coef * Math.exp(above) * spread,
    center,
    spread,
    medcouple: mc,
  };
}
