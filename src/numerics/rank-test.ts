/** What the rank tests share: decimal ties, continuity, doubled tails. */
import { type Alternative, normalP } from './inference.ts';

/**
 * Rounds differences of decimal scores so that decimal ties are ties.
 * @param x differences, finite
 * @returns each rounded to 10 decimals, or to more where all are between 1e-13 and .01 in size (so that the unit does
 *   not matter)
 * @source convention of test/reference/cases/README.md, `wilcoxon_signed_rank`
 * @checked by hand: .3 - .2 ties with .2 - .1
 */
export function decimalTies(x: Float64Array): Float64Array {
  let size = 0;
  for (const value of x) size = Math.max(size, Math.abs(value));
  let unit = 1e10;
  // Below 1e-13 the differences are the rounding of equal scores rather than scores in a small unit.
  for (let s = size; s > 1e-13 && s < 0.01; s *= 10) unit *= 10;
  return x.map((value) => {
    const scaled = value * unit;
    return Math.abs(scaled) < 2 ** 53 ? Math.round(scaled) / unit + 0 : value;
  });
}

/**
 * Normal statistic of a rank sum.
 * @param gap statistic minus its mean
 * @param sd its standard deviation, > 0
 * @param correct whether the gap is moved by .5
 * @param alternative direction
 * @returns z and its p; the correction moves the gap towards 0 (two-sided) or against the alternative (one-sided)
 * @source common practice: continuity correction
 * @checked cases `wilcoxon_signed_rank`, `mann_whitney`, rtol 1e-9
 */
export function rankZ(gap: number, sd: number, correct: boolean, alternative: Alternative): { z: number; p: number } {
  const step = alternative === 'two-sided' ? Math.sign(gap) / 2 : alternative === 'greater' ? 0.5 : -0.5;
  const z = (gap - (correct ? step : 0)) / sd;
  return { z, p: normalP(z, alternative) };
}

/**
 * p from two tails that both contain the observed value.
 * @param lower P(S <= s)
 * @param upper P(S >= s)
 * @param alternative direction
 * @returns the tail of the direction, or min(1, 2 smaller tail)
 * @source common practice: doubled smaller tail
 * @checked cases `wilcoxon_signed_rank`, `mann_whitney`, rtol 1e-9
 */
export function tailP(lower: number, upper: number, alternative: Alternative): number {
  if (alternative === 'greater') return upper;
  return alternative === 'less' ? lower : Math.min(1, 2 * Math.min(lower, upper));
}
