import { largestSize } from '../inference.ts';
import { type MauchlyTest, mauchlyTest } from '../mauchly.ts';
import { sum } from '../moments.ts';
import {
  contrastScores,
  effectContrasts,
  type RepeatedScores,
  requireRepeated,
  squaresAndProducts,
} from '../repeated.ts';
import { effectsOf } from './effects.ts';
import { type WithinEffect, withinEffect } from './within-effect.ts';

export interface WithinFactorsEffect extends WithinEffect {
  /** Places of the factors that take part: [0] the first, [0, 1] the interaction of the first two. */
  readonly factors: readonly number[];
  readonly mauchly: MauchlyTest | null;
}

/**
 * Analysis of variance with crossed within-participant factors, each effect against its own interaction with participants.
 * @param scores one vector a combination of levels, first factor slowest; one score a participant, finite
 * @param levels number of levels of each factor, each at least 2
 * @returns one entry an effect (main effects, then interactions) with F, p, sums of squares, its own sphericity factors
 *   and Mauchly's test; null with a reason where an effect cannot be tested
 * @throws RangeError when the levels do not multiply to the number of vectors, lengths differ, or a score is not finite
 * @source common practice; orthonormal comparisons per effect (Kirk 1995)
 * @checked cases `within_within_anova`, rtol 1e-9
 */
export function withinFactorsAnova(scores: RepeatedScores, levels: readonly number[]): WithinFactorsEffect[] {
  requireRepeated(scores);
  const cells = levels.reduce((product, k) => product * k, 1);
  if (cells !== scores.length || !levels.every((k) => Number.isInteger(k) && k >= 2)) {
    throw new RangeError(`*levels* must multiply to ${scores.length}, each at least 2; got ${levels.join(' x ')}`);
  }
  const n = scores[0]!.length;
  const size = largestSize(...scores);
  return effectsOf(levels.length).map((factors) => {
    const contrasts = effectContrasts(
      levels,
      levels.map((_, i) => factors.includes(i)),
    );
    const { means, products } = squaresAndProducts(contrastScores(scores, contrasts));
    const ssEffect = n === 0 ? 0 : n * sum(means.map((mean) => mean * mean));
    const effect = withinEffect(ssEffect, 1, { products, dfError: n - 1, size });
    return { factors, ...effect, mauchly: effect.F === null ? null : mauchlyTest(products, n - 1) };
  });
}
