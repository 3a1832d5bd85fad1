import { requireScores } from '../scores.ts';
import { chiSquareUpper } from '../tails/chi-square.ts';
import { centralMoments } from './central-moments.ts';

/**
 * Skewness and kurtosis tested together, for large samples.
 * @param x scores (n, any unit)
 * @returns JB = n/6 (g1^2 + g2^2/4) and p from chi-square on 2 df; null with a reason for fewer than 3 or equal scores
 * @throws RangeError when a score is not finite
 * @source Jarque & Bera 1987, Int. Stat. Rev. 55, 163-172
 * @checked outside check cases jarque_bera, relative 1e-9
 */
export function jarqueBera(x: Float64Array): { jb: number | null; p: number | null; reason?: string } {
  requireScores(x, 0);
  if (x.length < 3) return { jb: null, p: null, reason: 'fewer than 3 scores' };
  const moments = centralMoments(x);
  if (moments === null) return { jb: null, p: null, reason: 'all scores are equal' };
  const { m2, m3, m4 } = moments;
  const g2 = m4 / (m2 * m2) - 3;
  const jb = (x.length / 6) * ((m3 * m3) / (m2 * m2 * m2) + (g2 * g2) / 4);
  return { jb, p: chiSquareUpper(jb, 2) };
}
