/** THE LIST of exclusion rules: what each may be set to, and how one is applied. */

export type Scope = 'pooled' | 'participant' | 'condition' | 'participant-condition';
export type Measure = 'MAD' | 'SD' | 'fences';

/** A documented fault: participants by name, with the reason. */
export interface NamedRule {
  readonly rule: 'named';
  readonly participants: readonly string[];
  readonly reason: string;
}

/** A fixed limit in the column's unit; trials, or participants by the mean of one of their columns. */
export interface LimitRule {
  readonly rule: 'limit';
  readonly on: 'trial' | 'participant';
  readonly column: string;
  readonly side: 'below' | 'above';
  /** null = not applied. */
  readonly limit: number | null;
  readonly reason: string;
}

/** Further than k SD, MAD or quartile distances from the middle of the scores in its scope. */
export interface ExtremeRule {
  readonly rule: 'extreme';
  readonly on: 'trial' | 'participant';
  readonly column: string;
  readonly measure: Measure;
  /** null = none: nobody is set aside. */
  readonly cutoff: number | null;
  readonly scope: Scope;
  readonly sides: 'both' | 'above' | 'below';
}

/** A participant with fewer than a share of kept trials (percent of the trials read, in any condition or overall). */
export interface KeptShareRule {
  readonly rule: 'kept-share';
  /** Percent of a participant's trials; null = not applied. */
  readonly least: number | null;
}

export type Rule = NamedRule | LimitRule | ExtremeRule | KeptShareRule;

/** What one rule did. */
export interface RuleStep {
  /** Indices of the rows of the design's table this rule set aside (they were in before). */
  readonly rows: Int32Array;
  /** Participants who lost all they had left by it. */
  readonly participants: readonly string[];
  /** Short words for the flow: "below 150 ms". */
  readonly label: string;
}
