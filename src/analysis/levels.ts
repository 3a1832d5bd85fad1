/** Each level of a comparison of several, with the interval of its own location: for the picture. */
import { medianInterval } from '../numerics/median-ci.ts';
import { trimCount } from '../numerics/scores.ts';
import { trimmedMeanTest } from '../numerics/trimmed-mean.ts';
import type { Limits } from './finding.ts';
import { cellsOf, type Layout } from './layout.ts';

/** One level, or one combination of levels, in the outcome's unit. */
export interface Level {
  readonly label: string;
  readonly estimate: number | null;
  readonly interval: Limits | null;
  readonly n: number;
  /** Scores averaged after trimming. */
  readonly h: number;
}

/** Which location of a level is shown beside a planned row. */
export type LevelMeasure = 'mean' | 'trimmed mean' | 'median';

/**
 * Location and interval of every level asked about, other groups together.
 *
 * @param layout groups and columns
 * @param measure what is shown: mean and trimmed mean with their t interval, or the median with the interval of its
 *   order statistics
 * @param options trim of the trimmed mean (integer percentage), alpha
 * @returns one entry a level, or a combination of levels, in the order of the design
 * @source Tukey & McLaughlin 1963; median: order statistics at the exact binomial quantile
 * @checked agrees with the reference cases trimmed_one_sample_t and median_ci
 */
export function levelsOf(layout: Layout, measure: LevelMeasure, options: { trim: number; alpha: number }): Level[] {
  const level = 1 - options.alpha;
  return cellsOf(layout).map(({ label, scores }) => {
    const n = scores.length;
    if (n === 0) return { label, estimate: null, interval: null, n, h: 0 };
    if (measure === 'median') {
      const found = medianInterval(scores, { level });
      return { label, estimate: found.estimate, interval: found.interval, n, h: n };
    }
    const trim = measure === 'mean' ? 0 : options.trim;
    const found = trimmedMeanTest(scores, { trim, level });
    return { label, estimate: found.estimate, interval: found.interval, n, h: n - 2 * trimCount(n, trim) };
  });
}
