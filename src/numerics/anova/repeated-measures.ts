import { largestSize } from '../inference.ts';
import { type MauchlyTest, mauchlyTest } from '../mauchly.ts';
import { sum, sumOfSquares } from '../moments.ts';
import {
  contrastScores,
  helmertContrasts,
  type RepeatedScores,
  requireRepeated,
  squaresAndProducts,
} from '../repeated.ts';
import { noWithinEffect, type WithinEffect, withinEffect } from './within-effect.ts';

export interface RepeatedMeasuresAnova extends WithinEffect {
  /** Participants. */
  readonly n: number;
  /** Levels. */
  readonly k: number;
  readonly ssSubjects: number | null;
  /** ssEffect / (ssEffect + ssError + ssSubjects). */
  readonly generalizedEta2: number | null;
  readonly mauchly: MauchlyTest | null;
}

/**
 * Mean of each participant's scores over the levels.
 * @param scores one vector a level, one score a participant
 * @returns one mean a participant, units of the scores
 * @source common practice; summed as differences from the first score, so that large common parts are not rounded
 * @checked by hand
 */
export function participantMeans(scores: RepeatedScores): Float64Array {
  return scores[0]!.map((start, i) => start + sum(scores.map((level) => level[i]! - start)) / scores.length);
}

/**
 * Repeated-measures analysis of variance with one within-participant factor.
 * @param scores one vector a level (two or more), one score a participant, finite
 * @returns F on k - 1 and (n-1)(k-1) df, p, sums of squares (squared units), sphericity factors with corrected p values,
 *   partial and generalized eta2, Mauchly's test; null with a reason when there are fewer than two participants or the
 *   differences between levels do not vary between participants
 * @throws RangeError when there are fewer than two levels, lengths differ, or a score is not finite
 * @source Fisher (1925); Greenhouse & Geisser (1959); generalized eta2: Olejnik & Algina (2003)
 * @checked cases `repeated_measures_anova`, rtol 1e-9
 */
export function repeatedMeasuresAnova(scores: RepeatedScores): RepeatedMeasuresAnova {
  requireRepeated(scores);
  const k = scores.length;
  const n = scores[0]!.length;
  if (n < 2) {
    const reason = `${n} participant${n === 1 ? '' : 's'} with a score under every level, at least 2 needed`;
    return { ...noWithinEffect(reason), n, k, ssSubjects: null, generalizedEta2: null, mauchly: null };
  }
  const { means, products } = squaresAndProducts(contrastScores(scores, helmertContrasts(k)));
  const ssEffect = n * sum(means.map((mean) => mean * mean));
  const effect = withinEffect(ssEffect, 1, { products, dfError: n - 1, size: largestSize(...scores) });
  const ssSubjects = k * sumOfSquares(participantMeans(scores));
  if (effect.F === null) return { ...effect, n, k, ssSubjects, generalizedEta2: null, mauchly: null };
  const generalizedEta2 = ssEffect / (ssEffect + effect.ssError! + ssSubjects);
  return { ...effect, n, k, ssSubjects, generalizedEta2, mauchly: mauchlyTest(products, n - 1) };
}
