import { type FTest, noFTest } from '../groups.ts';
import { largestSize, noSpread } from '../inference.ts';
import { trace } from '../matrix.ts';
import { mean, sum } from '../moments.ts';
import { sorted } from '../order.ts';
import {
  contrastScores,
  helmertContrasts,
  type RepeatedScores,
  requireRepeated,
  squaresAndProducts,
} from '../repeated.ts';
import { trimCount } from '../scores.ts';
import { fUpper } from '../tails/f.ts';
import { winsorized } from '../winsorized.ts';
import { sphericityFactors } from './sphericity.ts';

export interface TrimmedRepeatedMeasuresAnova extends FTest {
  readonly trimmedMeans: Float64Array | null;
  readonly epsilonHat: number | null;
  /** As computed; it may exceed 1. The df use min(1, epsilonTilde). */
  readonly epsilonTilde: number | null;
  readonly n: number;
  readonly h: number;
}

/**
 * Test of the trimmed means of repeated scores, with df adjusted for lack of sphericity.
 * @param scores one vector a level (two or more), one score a participant, finite
 * @param options `trim` integer percentage at each end, 0 to 49 (default 20); each level is winsorized on its own
 * @returns F, df1 = (k-1) e, df2 = (k-1)(h-1) e with e = min(1, epsilonTilde), p, trimmed means (units); null with a reason
 *   when fewer than two scores a level are kept, or the winsorized differences between levels do not vary
 * @throws RangeError when there are fewer than two levels, lengths differ, a score is not finite, or `trim` is out of range
 * @source Wilcox (2012) 8.2.1: Qc = h sum (m_j - m.)^2, Qe = sum (Y_ij - Y_i. - Y_.j + Y..)^2 of the winsorized scores,
 *   F = (Qc / (k-1)) / (Qe / ((h-1)(k-1))); epsilonTilde = (n (k-1) e - 2) / ((k-1)(n - 1 - (k-1) e))
 * @checked cases `trimmed_repeated_measures_anova`, rtol 1e-9
 */
export function trimmedRepeatedMeasuresAnova(
  scores: RepeatedScores,
  options: { readonly trim?: number } = {},
): TrimmedRepeatedMeasuresAnova {
  requireRepeated(scores);
  const { trim = 20 } = options;
  const k = scores.length;
  const n = scores[0]!.length;
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  const nothing = { epsilonHat: null, epsilonTilde: null, n, h };
  if (h < 2) return { ...noFTest('fewer than 2 scores a level are kept'), trimmedMeans: null, ...nothing };
  const trimmedMeans = Float64Array.from(scores, (level) => mean(sorted(level).subarray(g, n - g)));
  const center = trimmedMeans[0]! + sum(trimmedMeans.map((own) => own - trimmedMeans[0]!)) / k;
  const between = h * sum(trimmedMeans.map((own) => (own - center) ** 2));
  const clipped = scores.map((level) => winsorized(level, trim));
  const { products } = squaresAndProducts(contrastScores(clipped, helmertContrasts(k)));
  const error = trace(products) / ((h - 1) * (k - 1));
  if (noSpread(Math.sqrt(error), largestSize(...clipped))) {
    return { ...noFTest('winsorized differences between levels do not vary'), trimmedMeans, ...nothing };
  }
  const { gg: epsilonHat, hf: epsilonTilde } = sphericityFactors(products, n - 1);
  const F = between / (k - 1) / error;
  const found = { trimmedMeans, epsilonHat, epsilonTilde, n, h };
  if (epsilonTilde === null || epsilonTilde <= 0) {
    return { ...noFTest('too few participants to estimate the sphericity factor'), F, ...found };
  }
  const e = Math.min(1, epsilonTilde);
  const df1 = (k - 1) * e;
  const df2 = (k - 1) * (h - 1) * e;
  return { F, df1, df2, p: fUpper(F, df1, df2), ...found };
}
