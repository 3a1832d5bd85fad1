import type { Design } from './design.ts';
import type { Finding } from './finding.ts';
import { BETWEEN_MEAN_ROWS } from './rows-between.ts';
import { BETWEEN_RANK_ROWS } from './rows-between-ranks.ts';
import { CONTRAST_ROWS } from './rows-contrast.ts';
import { VALUE_ROWS } from './rows-one.ts';
import { BETWEEN_RESAMPLED_ROWS, WITHIN_RESAMPLED_ROWS } from './rows-resampled.ts';
import { WITHIN_MEAN_ROWS } from './rows-within.ts';
import { WITHIN_RANK_ROWS } from './rows-within-ranks.ts';
import type { SampleScope, Samples } from './samples.ts';

/** What a row needs beside the samples. */
export interface RowContext {
  /** Integer percentage trimmed or winsorized at each end; 0 for rows that do neither. */
  readonly trim: number;
  readonly alternative: 'two-sided' | 'greater' | 'less';
  readonly level: number;
  readonly resamples: number;
  readonly seed: number;
  readonly unit: string;
  readonly direction: Design['roles']['direction'];
  readonly first: string;
  readonly second: string;
}

/** One row of a comparison. */
export interface Estimator {
  /** Kebab-case word in saved files; never renamed or reused. */
  readonly id: string;
  /** The quantity as it stands in the sentence: "trimmed mean of differences". */
  readonly name: string;
  readonly scope: SampleScope;
  /** Whether it has a trim. */
  readonly trims: boolean;
  /** Id of the row it becomes when nobody is trimmed. */
  readonly untrimmed: string;
  readonly sameUnit: boolean;
  /** Whether it needs no resampling, so that it may stand in the strip's grid. */
  readonly closedForm: boolean;
  run(samples: Samples, context: RowContext): Finding;
}

/** THE LIST of rows of two conditions, in the order shown; a new one is a line in one of the files it is made from. */
export const ESTIMATORS: readonly Estimator[] = [
  ...WITHIN_MEAN_ROWS,
  ...WITHIN_RANK_ROWS,
  ...WITHIN_RESAMPLED_ROWS,
  ...BETWEEN_MEAN_ROWS,
  ...BETWEEN_RANK_ROWS,
  ...BETWEEN_RESAMPLED_ROWS,
  ...CONTRAST_ROWS,
  ...VALUE_ROWS,
];

/** The row of that id, or undefined. */
export function estimatorOf(id: string): Estimator | undefined {
  return ESTIMATORS.find((estimator) => estimator.id === id);
}
