/** What the methods for several independent conditions share: checks of the scores, and one condition's summary. */
import { noSpread } from './inference.ts';
import { mean } from './moments.ts';
import { sorted } from './order.ts';
import { requireScores, trimCount } from './scores.ts';
import { winsorizedVariance } from './winsorized.ts';

/** Scores of each condition, in the order of the conditions. */
export type GroupScores = readonly Float64Array[];

/** An F test; what cannot be computed is null, with a reason. */
export interface FTest {
  readonly F: number | null;
  readonly df1: number | null;
  readonly df2: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/** A test referred to the chi-square distribution, null with a reason where it cannot be computed. */
export interface ChiSquareTest {
  readonly chi2: number | null;
  readonly df: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * An F test that cannot be made.
 * @param reason a short clause
 * @returns the fields of an F test, null, with the reason
 * @source common practice
 * @checked by hand
 */
export function noFTest(reason: string): FTest {
  return { F: null, df1: null, df2: null, p: null, reason };
}

/**
 * A chi-square test that cannot be made.
 * @param reason a short clause
 * @returns the fields of a chi-square test, null, with the reason
 * @source common practice
 * @checked by hand
 */
export function noChiSquareTest(reason: string): ChiSquareTest {
  return { chi2: null, df: null, p: null, reason };
}

/**
 * Refuses fewer than two conditions and scores that are not finite.
 * @param groups scores of each condition
 * @throws RangeError when there are fewer than two conditions, or a score is not finite
 * @source common practice
 * @checked by hand
 */
export function requireGroups(groups: GroupScores): void {
  if (groups.length < 2) throw new RangeError(`*groups* must hold at least 2 conditions; got ${groups.length}`);
  groups.forEach((scores, j) => {
    requireScores(scores, 0, `groups[${j}]`);
  });
}

/**
 * Says which condition holds too few scores.
 * @param groups scores of each condition
 * @param least number of scores every condition needs
 * @returns a short clause naming the first such condition by its place, or null when there is none
 * @source common practice
 * @checked by hand
 */
export function tooFew(groups: GroupScores, least: number): string | null {
  const j = groups.findIndex((scores) => scores.length < least);
  if (j < 0) return null;
  const n = groups[j]!.length;
  return `condition ${j + 1} holds ${n} score${n === 1 ? '' : 's'}, at least ${least} needed`;
}

/** One condition after trimming; units of the scores. */
export interface TrimmedSummary {
  readonly n: number;
  /** Scores left after trimming g at each end. */
  readonly h: number;
  /** Trimmed mean. */
  readonly mean: number;
  /** Variance of the winsorized scores, divisor n - 1; exactly 0 when it is nothing but rounding. */
  readonly winsorizedVariance: number;
  /** Squared standard error of the trimmed mean, (n - 1) s_w^2 / (h (h - 1)). */
  readonly squaredError: number;
}

/**
 * Trimmed mean, winsorized variance and squared standard error of one condition.
 * @param x scores, finite, with h = n - 2 floor(trim n / 100) >= 2
 * @param trim integer percentage at each end, 0 to 49
 * @returns the summary
 * @throws RangeError when fewer than two scores are left, or `trim` is not a whole percentage from 0 to 49
 * @source Yuen (1974), d = (n - 1) s_w^2 / (h (h - 1))
 * @checked cases `welch_anova`, rtol 1e-9
 */
export function trimmedSummary(x: Float64Array, trim: number): TrimmedSummary {
  const n = x.length;
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  if (h < 2) throw new RangeError(`*x* must keep at least 2 scores after trimming; got ${h}`);
  const ordered = sorted(x);
  const kept = ordered.subarray(g, n - g);
  const spread = winsorizedVariance(x, trim);
  const size = Math.max(Math.abs(kept[0]!), Math.abs(kept[h - 1]!));
  const variance = noSpread(Math.sqrt(spread), size) ? 0 : spread;
  return { n, h, mean: mean(kept), winsorizedVariance: variance, squaredError: ((n - 1) * variance) / (h * (h - 1)) };
}

/**
 * Summaries of every condition, or why they cannot be had.
 * @param groups scores of each condition
 * @param trim integer percentage at each end, 0 to 49
 * @returns the summaries, or a short clause when a condition keeps fewer than two scores
 * @throws RangeError when there are fewer than two conditions, a score is not finite, or `trim` is out of range
 * @source common practice
 * @checked by hand
 */
export function trimmedSummaries(groups: GroupScores, trim: number): TrimmedSummary[] | string {
  requireGroups(groups);
  const short = groups.findIndex((scores) => scores.length - 2 * trimCount(scores.length, trim) < 2);
  if (short >= 0) return `condition ${short + 1} keeps fewer than 2 scores`;
  return groups.map((scores) => trimmedSummary(scores, trim));
}
