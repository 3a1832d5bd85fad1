/** The decisions of the tests of pairs in one simulated experiment. */
import { drawCounts } from '../resample.ts';
import { walkTrimmedSum } from '../resample-walks.ts';
import { nextWord, startState } from '../rng.ts';
import { trimmedMeanSorted } from '../trimmed-mean.ts';
import { winsorizedSorted } from '../winsorized.ts';
import { criticalT } from './critical-t.ts';
import { OUTCOME, tOutcome } from './outcome.ts';
import { rankCriticals } from './rank-critical.ts';
import type { Truth } from './two-groups.ts';
import type { ResampledOptions } from './two-groups-resampled.ts';

/** Marks of each test (outcome.ts). */
export interface PairOutcomes {
  pairedT: number;
  trimmed: number;
  signedRank: number;
  /** Percentile bootstrap of the trimmed mean of the differences. */
  percentile: number;
  /** Changing signs of the mean of the differences. */
  signFlip: number;
}

const STREAM = { bootstrap: 43, flips: 44 } as const;

/** Sum of the ranks of the positive differences, by size without ties. */
function positiveRanks(sorted: Float64Array): number {
  let low = 0;
  let high = sorted.length - 1;
  let sum = 0;
  // The largest size is at one of the two ends of what is left.
  for (let rank = sorted.length; rank > 0; rank--) {
    const [a, b] = [sorted[low] as number, sorted[high] as number];
    if (b >= -a) {
      if (b > 0) sum += rank;
      high--;
    } else low++;
  }
  return sum;
}

/**
 * Makes the function that decides by the tests of pairs.
 * @param options level, trim, resamples (0 = the closed-form tests only), seed
 * @param most largest number of pairs
 * @returns a function of the ascending differences, the true difference (of means, of trimmed means) and the number of the
 *   experiment that overwrites its last argument
 * @throws RangeError from the quantiles, or when the seed is no 32-bit word
 * @source Student (1908), Tukey & McLaughlin (1963), Wilcoxon (1945, exact without ties), Fisher (1935)
 * @checked agrees with trimmedMeanTest and signedRankTest in every decision; stopping leaves every decision as it was
 */
export function pairDecider({ alpha, trim, B, seed }: ResampledOptions, most: number) {
  const critical = criticalT(alpha / 2, most);
  const ranks = rankCriticals(alpha);
  const state = new Int32Array(4);
  let counts = new Int32Array(0);
  return (d: Float64Array, truth: Truth, experiment: number, out: PairOutcomes): void => {
    Object.assign(out, { pairedT: 0, trimmed: 0, signedRank: 0, percentile: 0, signFlip: 0 });
    const n = d.length;
    const g = Math.floor((trim * n) / 100);
    const h = n - 2 * g;
    if (n < 2 || h < 2) return;
    const all = winsorizedSorted(d, 0);
    out.pairedT = tOutcome(all.mean, Math.sqrt(all.squares / (n * (n - 1))), truth.means, (t) => critical(n - 1, t));
    const sd = Math.sqrt(winsorizedSorted(d, g).squares / (n - 1));
    const se = (100 * sd) / ((100 - 2 * trim) * Math.sqrt(n));
    const middle = trimmedMeanSorted(d, g);
    out.trimmed = tOutcome(middle, se, truth.trimmedMeans, (t) => critical(h - 1, t));
    const v = positiveRanks(d);
    const least = Math.min(v, (n * (n + 1)) / 2 - v);
    out.signedRank = OUTCOME.judged | (least <= ranks.signedRank(n) ? OUTCOME.rejected : 0);
    if (B === 0) return;
    if (counts.length !== n) counts = new Int32Array(n);
    startState(state, experiment, STREAM.bootstrap, seed);
    out.percentile = percentileOutcome(d, g, truth.trimmedMeans, counts, state, (B * alpha) / 2, B);
    startState(state, experiment, STREAM.flips, seed);
    out.signFlip = flipOutcome(d, state, Math.floor(alpha * (B + 1) + 1e-9) - 1, B);
  };
}

function percentileOutcome(
  d: Float64Array,
  g: number,
  truth: number,
  counts: Int32Array,
  state: Int32Array,
  mostTail: number,
  B: number,
): number {
  const h = d.length - 2 * g;
  let [below, above, belowTruth, aboveTruth] = [0, 0, 0, 0];
  for (let b = 0; b < B; b++) {
    drawCounts(counts, d.length, state);
    const middle = walkTrimmedSum(d, counts, g) / h;
    if (middle < 0) below++;
    else if (middle > 0) above++;
    if (middle < truth) belowTruth++;
    else if (middle > truth) aboveTruth++;
    if (Math.min(below, above) > mostTail && Math.min(belowTruth, aboveTruth) > mostTail) break;
  }
  let marks: number = OUTCOME.judged | OUTCOME.hasInterval;
  if (Math.min(below, above) <= mostTail) marks |= OUTCOME.rejected;
  if (Math.min(belowTruth, aboveTruth) > mostTail) marks |= OUTCOME.covered;
  return marks;
}

function flipOutcome(d: Float64Array, state: Int32Array, most: number, B: number): number {
  let observed = 0;
  for (let i = 0; i < d.length; i++) observed += d[i] as number;
  const size = Math.abs(observed) * (1 - 1e-12);
  let larger = 0;
  for (let b = 0; b < B; b++) {
    let sum = 0;
    let word = 0;
    for (let i = 0; i < d.length; i++) {
      if ((i & 31) === 0) word = nextWord(state);
      sum += (word >>> (i & 31)) & 1 ? (d[i] as number) : -(d[i] as number);
    }
    if (Math.abs(sum) >= size) larger++;
    if (larger > most || larger + B - 1 - b <= most) break;
  }
  return OUTCOME.judged | (larger <= most ? OUTCOME.rejected : 0);
}
