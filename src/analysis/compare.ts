import type { Finding } from './finding.ts';
import type { Scores } from './score.ts';

export interface ComparisonSpec {
  readonly factor: string;
  /** The estimate is first minus second. */
  readonly first: string;
  readonly second: string;
  /** Id of the planned estimator (analysis/estimators.ts). */
  readonly estimator: string;
  /** Integer percentage trimmed (or winsorized) at each end over participants. */
  readonly trim: number;
  readonly alternative: 'two-sided' | 'greater' | 'less';
  readonly alpha: number;
  /** Resamples of every bootstrap row. */
  readonly resamples: number;
  readonly seed: number;
}

/** A comparison with its whole chain as plain data, so that what follows can re-run exactly it. */
export interface Result {
  /** Design, rules and score stand inside `scores`. */
  readonly scores: Scores;
  readonly comparison: ComparisonSpec;
  readonly scope: 'within' | 'between';
  /** Every fitting row, in the order of analysis/estimators.ts; the planned one is `findings[planned]`. */
  readonly findings: readonly Finding[];
  readonly planned: number;
}
