import type { Design } from './design.ts';

export interface ScoreSpec {
  readonly statistic: 'mean' | 'median' | 'trimmed mean';
  /** Trim of trials: integer percentage at each end, 0 to 25; used by the trimmed mean only. */
  readonly trim: number;
}

/** One score for each participant under each combination of the within factors. */
export interface Scores {
  readonly design: Design;
  readonly score: ScoreSpec;
  /** Participants with at least one kept row, by first appearance. */
  readonly participants: readonly string[];
  /** Combinations of the within factors' levels; one with an empty label where there is no within factor. */
  readonly conditions: readonly { readonly label: string; readonly levels: readonly number[] }[];
  /** participants x conditions, row by row, in the outcome's unit; NaN where no row is kept. */
  readonly values: Float64Array;
  /** Kept rows behind each score, same layout. */
  readonly trials: Int32Array;
  /** For each between factor: one level code a participant. */
  readonly groups: readonly {
    readonly factor: string;
    readonly levels: readonly string[];
    readonly codes: Int32Array;
  }[];
}
