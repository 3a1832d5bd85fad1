/** The decisions of the bootstrap and permutation tests of two groups in one simulated experiment, stopped once settled. */
import { drawCounts } from '../resample.ts';
import { type WinsorWalk, winsorWalk } from '../resample-walks.ts';
import { startState } from '../rng.ts';
import { trimmedMeanSorted } from '../trimmed-mean.ts';
import { winsorizedSorted } from '../winsorized.ts';
import { OUTCOME } from './outcome.ts';

export interface ResampledOptions {
  readonly alpha: number;
  readonly trim: number;
  /** Resamples and relabellings, 1 or more. */
  readonly B: number;
  readonly seed: number;
}

/** Streams of random numbers among those of the seed. */
const STREAM = { bootstrap: 41, permutation: 42 } as const;

export interface BootstrapOutcomes {
  /** Percentile bootstrap of the difference of trimmed means. */
  percentile: number;
  /** Bootstrap-t of the same, symmetric. */
  studentized: number;
}

/**
 * Trimmed and winsorized sums of a resample in three stretches without a test per score, and clears the counts; `sum`,
 * `low` and `high` as walkWinsorized leaves them.
 */
function walkThrough(s: Float64Array, counts: Int32Array, g: number, out: WinsorWalk): void {
  const n = counts.length;
  const stop = n - g;
  let at = 0;
  let i = -1;
  while (at <= g) {
    i++;
    at += counts[i] as number;
    counts[i] = 0;
  }
  const low = s[i] as number;
  let trimmed = (Math.min(at, stop) - g) * low;
  let squares = trimmed * low;
  while (at < stop) {
    i++;
    const c = counts[i] as number;
    counts[i] = 0;
    const next = at + c;
    const score = s[i] as number;
    const part = (next > stop ? stop - at : c) * score;
    trimmed += part;
    squares += part * score;
    at = next;
  }
  // The walk stops at the score that reaches the end of the middle, so that one is the highest kept.
  const high = s[i] as number;
  for (i++; i < n; i++) counts[i] = 0;
  out.trimmed = trimmed;
  out.sum = trimmed + g * (low + high);
  out.squares = squares + g * (low * low + high * high);
}

/** Counts of one side of a decision: settled once it can no longer change. */
function beyond(count: number, left: number, most: number): boolean {
  return count > most || count + left <= most;
}

/**
 * Makes the function that decides by the percentile bootstrap and the bootstrap-t of a difference of trimmed means.
 * @param options level, trim, number of resamples, seed
 * @returns a function of two ascending samples, the true difference and the number of the experiment (its block of random
 *   numbers) that overwrites its last argument
 * @throws RangeError when the seed is no 32-bit word
 * @source Wilcox (2012): p = 2 min(share below, share above) at most alpha rejects; bootstrap-t: Tukey & McLaughlin's t of
 *   Yuen centred at the sample, share of |t*| at least |t|; stopping when nothing can change leaves every decision as it was
 * @checked agrees with running every resample, exactly
 */
export function bootstrapDecider({ alpha, trim, B, seed }: ResampledOptions) {
  const state = new Int32Array(4);
  const [walkX, walkY] = [winsorWalk(), winsorWalk()];
  // Percentile: both tails must reach further than B alpha / 2; bootstrap-t: p = (b + 1) / (B + 1).
  const mostTail = (B * alpha) / 2;
  const mostT = Math.floor(alpha * (B + 1) + 1e-9) - 1;
  let counts: [Int32Array, Int32Array] = [new Int32Array(0), new Int32Array(0)];
  return (x: Float64Array, y: Float64Array, truth: number, experiment: number, out: BootstrapOutcomes): void => {
    out.percentile = 0;
    out.studentized = 0;
    const [n1, n2] = [x.length, y.length];
    const [g1, g2] = [Math.floor((trim * n1) / 100), Math.floor((trim * n2) / 100)];
    const [h1, h2] = [n1 - 2 * g1, n2 - 2 * g2];
    if (h1 < 2 || h2 < 2) return;
    if (counts[0].length !== n1 || counts[1].length !== n2) counts = [new Int32Array(n1), new Int32Array(n2)];
    const [cx, cy] = counts;
    const [middleX, middleY] = [trimmedMeanSorted(x, g1), trimmedMeanSorted(y, g2)];
    const [sx, sy] = [x.map((score) => score - middleX), y.map((score) => score - middleY)];
    const estimate = middleX - middleY;
    const se = Math.sqrt(
      winsorizedSorted(x, g1).squares / (h1 * (h1 - 1)) + winsorizedSorted(y, g2).squares / (h2 * (h2 - 1)),
    );
    const t = Math.abs(estimate) / se;
    const tTruth = Math.abs(estimate - truth) / se;
    let [below, above, belowTruth, aboveTruth, larger, largerTruth] = [0, 0, 0, 0, 0, 0];
    startState(state, experiment, STREAM.bootstrap, seed);
    for (let b = 0; b < B; b++) {
      drawCounts(cx, n1, state);
      walkThrough(sx, cx, g1, walkX);
      drawCounts(cy, n2, state);
      walkThrough(sy, cy, g2, walkY);
      const moved = walkX.trimmed / h1 - walkY.trimmed / h2;
      const d = estimate + moved;
      if (d < 0) below++;
      else if (d > 0) above++;
      if (d < truth) belowTruth++;
      else if (d > truth) aboveTruth++;
      const q1 = walkX.squares - (walkX.sum * walkX.sum) / n1;
      const q2 = walkY.squares - (walkY.sum * walkY.sum) / n2;
      const own = Math.abs(moved) / Math.sqrt(q1 / (h1 * (h1 - 1)) + q2 / (h2 * (h2 - 1)));
      if (own >= t) larger++;
      if (own >= tTruth) largerTruth++;
      if ((b & 15) !== 15) continue;
      const left = B - 1 - b;
      const tails = Math.min(below, above) > mostTail && Math.min(belowTruth, aboveTruth) > mostTail;
      if (tails && beyond(larger, left, mostT) && beyond(largerTruth, left, mostT)) break;
    }
    const base = OUTCOME.judged | OUTCOME.hasInterval;
    const rejected = (yes: boolean) => (yes ? OUTCOME.rejected : 0);
    const covered = (yes: boolean) => (yes ? OUTCOME.covered : 0);
    out.percentile =
      base | rejected(Math.min(below, above) <= mostTail) | covered(Math.min(belowTruth, aboveTruth) > mostTail);
    if (se > 0) out.studentized = base | rejected(larger <= mostT) | covered(largerTruth > mostT);
  };
}

export interface PermutationOutcomes {
  /** Relabelling of the difference of means. */
  means: number;
  /** Relabelling of Welch's t, which also holds its level where the spreads differ. */
  studentized: number;
}

/**
 * Makes the function that decides by relabelling: the difference of means, and Welch's t.
 * @param options level, number of relabellings, seed
 * @returns a function of two samples and the number of the experiment that overwrites its last argument
 * @throws RangeError when the seed is no 32-bit word
 * @source Pitman (1937); studentized: Janssen (1997); p = (b + 1) / (B + 1); stopped once the decision cannot change; the
 *   draws of a relabelling are equally likely to within 1e-7
 * @checked agrees with running every relabelling, exactly
 */
export function permutationDecider({ alpha, B, seed }: Omit<ResampledOptions, 'trim'>) {
  const state = new Int32Array(4);
  const most = Math.floor(alpha * (B + 1) + 1e-9) - 1;
  let all = new Float64Array(0);
  return (x: Float64Array, y: Float64Array, experiment: number, out: PermutationOutcomes): void => {
    out.means = 0;
    out.studentized = 0;
    const [n1, n2] = [x.length, y.length];
    const N = n1 + n2;
    if (n1 < 2 || n2 < 2) return;
    if (all.length !== N) all = new Float64Array(N);
    all.set(x);
    all.set(y, n1);
    let total = 0;
    for (let i = 0; i < N; i++) total += all[i] as number;
    const center = total / N;
    let squares = 0;
    let sum = 0;
    let own = 0;
    for (let i = 0; i < N; i++) {
      const score = (all[i] as number) - center;
      all[i] = score;
      squares += score * score;
      if (i < n1) {
        sum += score;
        own += score * score;
      }
    }
    // Around the common centre the second group's sum is minus the first's.
    const tOf = (s: number, q: number) => {
      const v1 = (q - (s * s) / n1) / (n1 * (n1 - 1));
      const v2 = (squares - q - (s * s) / n2) / (n2 * (n2 - 1));
      return (s * s) / Math.max(v1 + v2, Number.MIN_VALUE);
    };
    const size = Math.abs(sum) * (1 - 1e-12);
    const t = tOf(sum, own) * (1 - 1e-12);
    let [larger, largerT] = [0, 0];
    startState(state, experiment, STREAM.permutation, seed);
    // The generator of rng.ts with its state in local variables: kernels, design 3.
    let [s0, s1, s2, s3] = [state[0] as number, state[1] as number, state[2] as number, state[3] as number];
    for (let b = 0; b < B; b++) {
      let s = 0;
      let q = 0;
      for (let i = 0; i < n1; i++) {
        const word = (((s0 + s1) | 0) + s3) | 0;
        s3 = (s3 + 1) | 0;
        s0 = s1 ^ (s1 >>> 9);
        s1 = (s2 + (s2 << 3)) | 0;
        s2 = (((s2 << 21) | (s2 >>> 11)) + word) | 0;
        const j = i + (((word >>> 0) * (N - i) * 2 ** -32) | 0);
        const score = all[j] as number;
        all[j] = all[i] as number;
        all[i] = score;
        s += score;
        q += score * score;
      }
      if (Math.abs(s) >= size) larger++;
      if (tOf(s, q) >= t) largerT++;
      const left = B - 1 - b;
      if (beyond(larger, left, most) && beyond(largerT, left, most)) break;
    }
    out.means = OUTCOME.judged | (larger <= most ? OUTCOME.rejected : 0);
    out.studentized = OUTCOME.judged | (largerT <= most ? OUTCOME.rejected : 0);
  };
}
