/** The one shape in which every comparison, association and specification gives its result. */

/** [lower, upper]; null = no limit on that side (a one-sided interval). */
export type Limits = readonly [number | null, number | null];

export interface EffectSize {
  /** As the field names it: "Hedges' g (pooled SD)", "d_av", "P(superiority)". */
  readonly name: string;
  readonly value: number | null;
  readonly interval: Limits | null;
  /** How the interval was made: "noncentral t", "percentile bootstrap, B = 2,000". */
  readonly how: string;
  /** Why value or interval is null. */
  readonly reason?: string;
}

export interface ConditionCount {
  readonly condition: string;
  /** Participants that enter the estimate under this condition. */
  readonly n: number;
  /** Scores actually averaged after trimming at each end (h); equals n where nothing is trimmed. */
  readonly h: number;
}

export interface Finding {
  /** Id of the estimator in analysis/estimators.ts. */
  readonly estimator: string;
  /** The row's label: "20 % trimmed mean of differences". */
  readonly label: string;
  /** What is estimated, in words: "typical change (20 % trimmed mean of the differences)". */
  readonly quantity: string;
  /** Rows of one group estimate the same quantity: "means", "trimmed means", "medians", ... */
  readonly group: string;
  /** Unit of estimate, SE and interval: the outcome's unit, or "" for ratios and probabilities. */
  readonly unit: string;
  /** Whether the estimate is in the outcome's unit, so that it may share an axis with the planned row. */
  readonly sameUnit: boolean;
  /** Value of the estimate when the conditions do not differ: 0 for differences, 1 for ratios, .5 for probabilities. */
  readonly nullValue: number;
  /** Whether a larger estimate means that the first condition is smaller (a probability of being lower). */
  readonly reversed: boolean;
  /** Integer percentage trimmed at each end; 0 where nothing is trimmed. */
  readonly trim: number;
  readonly estimate: number | null;
  /** Why the estimate (or its p and interval) is not given. */
  readonly reason?: string;
  readonly se: number | null;
  readonly df: number | null;
  /** Denominator degrees of freedom of an F; absent or null for every other statistic. */
  readonly df2?: number | null;
  /** Name as the field writes it: "t", "V", "U", "W", "z", "F", "H". */
  readonly statistic: { readonly name: string; readonly value: number } | null;
  readonly p: number | null;
  /** How p was found: "t distribution", "exact conditional", "percentile bootstrap, B = 2,000". */
  readonly pHow: string;
  readonly interval: Limits | null;
  /** Confidence level of the interval, 1 - alpha. */
  readonly level: number;
  readonly alternative: 'two-sided' | 'greater' | 'less';
  readonly effects: readonly EffectSize[];
  readonly n: number;
  readonly counts: readonly ConditionCount[];
  /** Ids of the cautions of analysis/cautions.ts that apply to this row. */
  readonly cautions: readonly string[];
  /** Author, year and convention: "how this is computed". */
  readonly method: string;
}

/** The numbers of a row as they are saved and replayed: no words that a later version might put otherwise. */
export function findingRecord(finding: Finding) {
  return {
    estimator: finding.estimator,
    trim: finding.trim,
    estimate: finding.estimate,
    se: finding.se,
    df: finding.df,
    ...(finding.df2 === undefined || finding.df2 === null ? {} : { df2: finding.df2 }),
    statistic: finding.statistic ? [finding.statistic.name, finding.statistic.value] : null,
    p: finding.p,
    interval: finding.interval,
    effects: finding.effects.map((effect) => ({ value: effect.value, interval: effect.interval })),
    n: finding.n,
    counts: finding.counts.map((each) => [each.condition, each.n, each.h]),
  };
}
