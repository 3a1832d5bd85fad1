import { type FTest, type GroupScores, noFTest, requireGroups, tooFew } from '../groups.ts';
import { largestSize, noSpread } from '../inference.ts';
import { sum } from '../moments.ts';
import { fUpper } from '../tails/f.ts';

export interface OneWayAnova extends FTest {
  /** Squared units of the scores. */
  readonly ssBetween: number | null;
  readonly ssWithin: number | null;
  readonly residualSd: number | null;
  readonly eta2: number | null;
  /** Not cut off at 0. */
  readonly omega2: number | null;
  /** Not cut off at 0. */
  readonly epsilon2: number | null;
}

/** Sums of squares of one layout; every score is first lessened by the same score. */
export interface SumsOfSquares {
  readonly between: number;
  readonly within: number;
  /** Mean of each condition less `shift`. */
  readonly offsets: Float64Array;
  /** Mean of all scores less `shift`. */
  readonly offset: number;
  readonly shift: number;
}

/**
 * Sums of squares between and within conditions.
 * @param groups scores of each condition, each at least one, finite
 * @returns the two sums of squares and the means they are taken about
 * @source Chan, Golub & LeVeque (1983): two passes with correction, sums compensated (Neumaier 1974), scores less the
 *   first one, so that a large common part is taken away without rounding
 * @checked NIST StRD one-way sets: the exact answer for the doubles to 1e-12
 */
export function sumsOfSquares(groups: GroupScores): SumsOfSquares {
  const shift = groups[0]![0]!;
  const shifted = groups.map((scores) => scores.map((score) => score - shift));
  const totals = shifted.map((scores) => sum(scores));
  const n = groups.reduce((count, scores) => count + scores.length, 0);
  const offsets = Float64Array.from(totals, (total, j) => total / groups[j]!.length);
  const offset = sum(totals) / n;
  const between = sum(Float64Array.from(offsets, (own, j) => groups[j]!.length * (own - offset) * (own - offset)));
  const within = sum(
    shifted.map((scores, j) => {
      const deviations = scores.map((score) => score - offsets[j]!);
      const drift = sum(deviations);
      return Math.max(0, sum(deviations.map((d) => d * d)) - (drift * drift) / scores.length);
    }),
  );
  return { between, within, offsets, offset, shift };
}

/**
 * One-way analysis of variance with its effect sizes.
 * @param groups scores of each condition, two conditions or more, finite
 * @returns F on k - 1 and N - k df, p, sums of squares (squared units), residual SD (units), eta2, omega2, epsilon2;
 *   null with a reason when a condition is empty, no condition holds two scores, or scores do not vary within conditions
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Fisher (1925), F = (SSb / (k-1)) / (SSw / (N-k)); eta2 = SSb / SSt; omega2 = (SSb - (k-1) MSw) / (SSt + MSw)
 *   (Hays 1963); epsilon2 = (SSb - (k-1) MSw) / SSt (Kelley 1935)
 * @checked cases `one_way_anova`, rtol 1e-9; NIST StRD
 */
export function oneWayAnova(groups: GroupScores): OneWayAnova {
  requireGroups(groups);
  const none = { ssBetween: null, ssWithin: null, residualSd: null, eta2: null, omega2: null, epsilon2: null };
  const few = tooFew(groups, 1);
  if (few !== null) return { ...noFTest(few), ...none };
  const k = groups.length;
  const n = groups.reduce((count, scores) => count + scores.length, 0);
  const { between, within } = sumsOfSquares(groups);
  if (n === k) return { ...noFTest('no condition holds two scores'), ...none, ssBetween: between, ssWithin: within };
  const df1 = k - 1;
  const df2 = n - k;
  const error = within / df2;
  if (noSpread(Math.sqrt(error), largestSize(...groups))) {
    return { ...noFTest('scores do not vary within conditions'), ...none, ssBetween: between, ssWithin: within };
  }
  const F = between / df1 / error;
  const total = between + within;
  return {
    F,
    df1,
    df2,
    p: fUpper(F, df1, df2),
    ssBetween: between,
    ssWithin: within,
    residualSd: Math.sqrt(error),
    eta2: between / total,
    omega2: (between - df1 * error) / (total + error),
    epsilon2: (between - df1 * error) / total,
  };
}
