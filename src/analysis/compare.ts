import type { Design } from './design.ts';
import { ESTIMATORS, type Estimator, type RowContext } from './estimators.ts';
import type { Finding } from './finding.ts';
import { type Rule, readsCondition } from './rules.ts';
import type { Samples } from './samples.ts';
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
  /** Participants with a score who could not enter, and why. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
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
  return args.withheld ? withhold(finding) : finding;
}

/** The rows offered for a scope, in order. */
export function fittingEstimators(scope: 'within' | 'between'): Estimator[] {
  return ESTIMATORS.filter((estimator) => estimator.scope === scope);
}

/** Whether the rules split the conditions under test, so that textbook p and interval are withheld (methods R2). */
export function withholdsTextbook(rules: readonly Rule[], rows: Design['roles']['rows']): boolean {
  return rules.some(
    (rule) =>
      rule.rule === 'extreme' &&
      rule.cutoff !== null &&
      readsCondition(rule) &&
      (rule.scope === 'condition' || rows === 'one score'),
  );
}

function withhold(finding: Finding): Finding {
  return {
    ...finding,
    reason: 'p and interval withheld: an exclusion rule above looks at each condition separately',
    se: null,
    df: null,
    statistic: null,
    p: null,
    interval: null,
    effects: finding.effects.map((effect) => ({ ...effect, interval: null, reason: 'withheld with the interval' })),
    cautions: [...finding.cautions, 'R2'],
  };
}
