import { normalP } from '../inference.ts';
import { mean } from '../moments.ts';
import { median } from '../order.ts';
import { requireScores } from '../scores.ts';

/** Runs of scores on one side of a cutoff, in row order; null with a reason. */
export interface RunsTest {
  readonly runs: number;
  readonly atOrAbove: number;
  readonly below: number;
  readonly z: number | null;
  /** Two-sided. */
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * Do scores stay on one side of the middle longer, or switch more often, than independent ones would?
 * @param x scores (n, any unit) in the order of collection
 * @param options cutoff: 'median' or 'mean' ('median'); correct: move the difference by .5 towards 0 for n below 50 (false)
 * @returns runs, counts, z, p; z and p null with a reason when all scores are on one side
 * @throws RangeError when empty, a score is not finite or *cutoff* is none of the two
 * @source Wald & Wolfowitz 1940, Ann. Math. Stat. 11, 147-162: mean 2ab/n + 1, variance 2ab (2ab - n) / (n^2 (n-1))
 * @checked outside check cases runs_test, relative 1e-9
 */
export function runsTest(
  x: Float64Array,
  options: { readonly cutoff?: 'median' | 'mean'; readonly correct?: boolean } = {},
): RunsTest {
  const { cutoff = 'median', correct = false } = options;
  requireScores(x);
  if (cutoff !== 'median' && cutoff !== 'mean') {
    throw new RangeError(`*cutoff* must be median or mean; got ${String(cutoff)}`);
  }
  const middle = cutoff === 'median' ? median(x) : mean(x);
  const high = Array.from(x, (score) => score >= middle);
  const n = x.length;
  const atOrAbove = high.filter(Boolean).length;
  const below = n - atOrAbove;
  const runs = 1 + high.filter((side, i) => i > 0 && side !== high[i - 1]).length;
  const counts = { runs, atOrAbove, below };
  const twice = 2 * atOrAbove * below;
  const variance = (twice * (twice - n)) / (n * n * (n - 1));
  if (below === 0) return { ...counts, z: null, p: null, reason: 'all scores are on one side of the cutoff' };
  if (!(variance > 0)) return { ...counts, z: null, p: null, reason: 'too few scores for the number of runs to vary' };
  const difference = runs - (twice / n + 1);
  const moved = correct && n < 50 ? Math.sign(difference) * Math.max(0, Math.abs(difference) - 0.5) : difference;
  const z = moved / Math.sqrt(variance);
  return { ...counts, z, p: normalP(z, 'two-sided') };
}
