/** The decisions of the closed-form tests of two groups in one simulated experiment. */
import { trimmedMeanSorted } from '../trimmed-mean.ts';
import { winsorizedSorted } from '../winsorized.ts';
import { criticalT } from './critical-t.ts';
import { OUTCOME, tOutcome } from './outcome.ts';
import { rankCriticals } from './rank-critical.ts';

/** True differences, first minus second. */
export interface Truth {
  readonly means: number;
  readonly trimmedMeans: number;
}

export interface TwoGroupOptions {
  readonly alpha: number;
  /** Integer percentage trimmed at EACH end by Yuen's test. */
  readonly trim: number;
  /** Largest number of scores of both groups together. */
  readonly most: number;
}

/** Marks of each test (outcome.ts). */
export interface TwoGroupOutcomes {
  student: number;
  welch: number;
  yuen: number;
  mannWhitney: number;
}

/**
 * Pairs in which the first group's score is larger, ties as half.
 * @param x ascending scores of the first group
 * @param y ascending scores of the second group
 * @returns U, 0 to n1 n2
 * @source Mann & Whitney (1947)
 * @checked agrees with mannWhitney
 */
export function uOfSorted(x: Float64Array, y: Float64Array): number {
  let below = 0;
  let upTo = 0;
  let u = 0;
  for (let i = 0; i < x.length; i++) {
    const score = x[i] as number;
    while (below < y.length && (y[below] as number) < score) below++;
    while (upTo < y.length && (y[upTo] as number) <= score) upTo++;
    u += (below + upTo) / 2;
  }
  return u;
}

/**
 * Makes the function that decides by Student's, Welch's, Yuen's and the Mann-Whitney test at once.
 * @param options level, trim, most scores
 * @returns a function of two ascending samples and the true differences that overwrites its last argument
 * @throws RangeError from the quantiles
 * @source Student (1908), Welch (1938), Yuen (1974), Mann & Whitney (1947, exact without ties)
 * @checked agrees with studentT, welchT, yuenWelch and mannWhitney in every decision
 */
export function twoGroupDecider({ alpha, trim, most }: TwoGroupOptions) {
  const critical = criticalT(alpha / 2, most);
  const ranks = rankCriticals(alpha);
  return (x: Float64Array, y: Float64Array, truth: Truth, out: TwoGroupOutcomes): void => {
    out.student = 0;
    out.welch = 0;
    out.yuen = 0;
    out.mannWhitney = 0;
    const [n1, n2] = [x.length, y.length];
    if (n1 < 2 || n2 < 2) return;
    const a = winsorizedSorted(x, 0);
    const b = winsorizedSorted(y, 0);
    const estimate = a.mean - b.mean;
    const df = n1 + n2 - 2;
    const pooled = Math.sqrt(((a.squares + b.squares) / df) * (1 / n1 + 1 / n2));
    out.student = tOutcome(estimate, pooled, truth.means, (t) => critical(df, t));
    out.welch = separate(estimate, a.squares, b.squares, n1, n2, truth.means);
    const [g1, g2] = [Math.floor((trim * n1) / 100), Math.floor((trim * n2) / 100)];
    const [h1, h2] = [n1 - 2 * g1, n2 - 2 * g2];
    if (h1 > 1 && h2 > 1) {
      const middle = trimmedMeanSorted(x, g1) - trimmedMeanSorted(y, g2);
      const squares = [winsorizedSorted(x, g1).squares, winsorizedSorted(y, g2).squares] as const;
      out.yuen = separate(middle, squares[0], squares[1], h1, h2, truth.trimmedMeans);
    }
    const u = uOfSorted(x, y);
    out.mannWhitney = OUTCOME.judged | (Math.min(u, n1 * n2 - u) <= ranks.rankSum(n1, n2) ? OUTCOME.rejected : 0);
  };

  function separate(estimate: number, q1: number, q2: number, h1: number, h2: number, truth: number): number {
    const d1 = q1 / (h1 * (h1 - 1));
    const d2 = q2 / (h2 * (h2 - 1));
    const share = d1 / (d1 + d2);
    const df = 1 / ((share * share) / (h1 - 1) + ((1 - share) * (1 - share)) / (h2 - 1));
    return tOutcome(estimate, Math.sqrt(d1 + d2), truth, (t) => critical(df, t));
  }
}
