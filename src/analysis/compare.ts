import type { Asked } from './asked.ts';
import type { Design } from './design.ts';
import { ESTIMATORS, type Estimator, type RowContext } from './estimators.ts';
import type { Finding } from './finding.ts';
import type { Level } from './levels.ts';
import type { Pairs } from './pairs.ts';
import type { SampleScope, Samples } from './samples.ts';
import type { Scores } from './score.ts';
import { withheldFinding } from './withhold.ts';

export interface ComparisonSpec {
  readonly factor: string;
  /** What is asked, where it is not this pair of levels. */
  readonly effect?: Asked;
  /** The two levels, or the two sides in words. The estimate is first minus second. */
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
  readonly scope: SampleScope | 'omnibus';
  /** Every fitting row, in the order of analysis/estimators.ts; the planned one is `findings[planned]`. */
  readonly findings: readonly Finding[];
  readonly planned: number;
  /** Participants with a score who could not enter, and why. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
  /** A question about several levels only: each of them, for the picture. */
  readonly levels?: readonly Level[];
  /** A question about several levels only: all pairs, where they were asked for. */
  readonly pairs?: Pairs | null;
}

/** What a comparison job needs: two samples and how they are compared. No design, so that little is cloned. */
export interface CompareArgs {
  readonly samples: Samples;
  readonly comparison: ComparisonSpec;
  readonly unit: string;
  readonly direction: Design['roles']['direction'];
  /** Whether p and interval are withheld because a rule above splits the conditions under test. */
  readonly withheld: boolean;
}

/**
 * Every row that fits the design, the planned one among them.
 *
 * @param args two samples in the outcome's unit, and how they are compared
 * @returns one Finding an estimator, in the order of the list; undefined quantities are null with a reason
 * @source the rows and their quantities: analysis/estimators.ts
 */
export function compareSamples(args: CompareArgs): Finding[] {
  return fittingEstimators(args.samples.scope).map((estimator) => compareRow(estimator, args));
}

/** One row; what the sweep, and later every re-run, calls too. */
export function compareRow(estimator: Estimator, args: CompareArgs, trim = args.comparison.trim): Finding {
  const { comparison, samples } = args;
  const context: RowContext = {
    trim: estimator.trims ? trim : 0,
    alternative: comparison.alternative,
    level: 1 - comparison.alpha,
    resamples: comparison.resamples,
    seed: comparison.seed,
    unit: args.unit,
    direction: args.direction,
    first: samples.first,
    second: samples.second,
  };
  const finding = estimator.run(samples, context);
  return args.withheld ? withheldFinding(finding) : finding;
}

/** The rows offered for a scope, in order. */
export function fittingEstimators(scope: SampleScope): Estimator[] {
  return ESTIMATORS.filter((estimator) => estimator.scope === scope);
}
