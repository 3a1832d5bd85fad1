import { largestSize } from '../inference.ts';
import { type Matrix, matrix } from '../matrix.ts';
import { type MauchlyTest, mauchlyTest } from '../mauchly.ts';
import { sum } from '../moments.ts';
import {
  contrastScores,
  helmertContrasts,
  type RepeatedScores,
  requireRepeated,
  type SquaresAndProducts,
  squaresAndProducts,
} from '../repeated.ts';
import { type OneWayAnova, oneWayAnova } from './one-way.ts';
import { participantMeans } from './repeated-measures.ts';
import { noWithinEffect, type WithinEffect, withinEffect } from './within-effect.ts';

export interface MixedAnova {
  /** On participant means; sums of squares times the number of levels, so that they add up with the others. */
  readonly between: OneWayAnova;
  readonly within: WithinEffect;
  readonly interaction: WithinEffect;
  readonly mauchly: MauchlyTest | null;
  readonly n: number;
  readonly groupN: readonly number[];
}

/**
 * Analysis of variance with one between- and one within-participant factor; the within effect on unweighted group means.
 * @param groups for each group one vector a level, one score a participant, finite; two groups and two levels or more
 * @returns tests of groups, levels and their interaction (sums of squares in squared units), Mauchly's test from the pooled
 *   covariances on N - g df; null with a reason where an effect cannot be tested
 * @throws RangeError when there are fewer than two groups or levels, lengths differ, or a score is not finite
 * @source Winer (1971); within effect: (mean of group means)^2 / (sum 1/n / g^2) on each orthonormal comparison (type III)
 * @checked cases `mixed_anova`, rtol 1e-9
 */
export function mixedAnova(groups: readonly RepeatedScores[]): MixedAnova {
  requireMixed(groups);
  const k = groups[0]!.length;
  const groupN = groups.map((group) => group[0]!.length);
  const n = groupN.reduce((total, own) => total + own, 0);
  const between = timesLevels(oneWayAnova(groups.map(participantMeans)), k);
  const empty = groupN.indexOf(0);
  if (empty >= 0) {
    const none = noWithinEffect(`group ${empty + 1} holds no participants`);
    return { between, within: none, interaction: none, mauchly: null, n, groupN };
  }
  const contrasts = helmertContrasts(k);
  const parts = groups.map((group) => squaresAndProducts(contrastScores(group, contrasts)));
  const dfError = n - groups.length;
  const error = { products: pooled(parts), dfError, size: largestSize(...groups.flat()) };
  const within = withinEffect(levelsSumOfSquares(parts), 1, error);
  const interaction = withinEffect(interactionSumOfSquares(parts, n), groups.length - 1, error);
  const mauchly = within.F === null ? null : mauchlyTest(error.products, dfError);
  return { between, within, interaction, mauchly, n, groupN };
}

function requireMixed(groups: readonly RepeatedScores[]): void {
  if (groups.length < 2) throw new RangeError(`*groups* must hold at least 2 groups; got ${groups.length}`);
  for (const group of groups) {
    requireRepeated(group);
    if (group.length !== groups[0]!.length) {
      throw new RangeError(`*groups* must hold ${groups[0]!.length} levels each; got ${group.length}`);
    }
  }
}

function timesLevels(anova: OneWayAnova, k: number): OneWayAnova {
  const times = (value: number | null, factor: number) => (value === null ? null : value * factor);
  return {
    ...anova,
    ssBetween: times(anova.ssBetween, k),
    ssWithin: times(anova.ssWithin, k),
    residualSd: times(anova.residualSd, Math.sqrt(k)),
  };
}

function pooled(parts: readonly SquaresAndProducts[]): Matrix {
  const p = parts[0]!.products.rows;
  const total = parts[0]!.products.data.map((_, i) => sum(parts.map((part) => part.products.data[i]!)));
  return matrix(p, p, total);
}

function levelsSumOfSquares(parts: readonly SquaresAndProducts[]): number {
  const g = parts.length;
  const inverse = sum(parts.map((part) => 1 / part.n)) / (g * g);
  const each = parts[0]!.means.map((_, c) => (sum(parts.map((part) => part.means[c]!)) / g) ** 2);
  return sum(each) / inverse;
}

function interactionSumOfSquares(parts: readonly SquaresAndProducts[], n: number): number {
  const each = parts[0]!.means.map((start, c) => {
    const center = sum(parts.map((part) => part.n * (part.means[c]! - start))) / n;
    return sum(parts.map((part) => part.n * (part.means[c]! - start - center) ** 2));
  });
  return sum(each);
}
