/** THE LIST of exclusion rules: what each may be set to, what it reads, and its short words. */

export type Scope = 'pooled' | 'participant' | 'condition' | 'participant-condition';
/** How far a score lies from the others is measured; old files say "fences" for quartiles of type 7. */
export type Measure =
  | 'MAD'
  | 'double MAD'
  | 'SD'
  | 'fences'
  | 'hinge fences'
  | 'adjusted fences'
  | 'Carling'
  | 'moving'
  | 'recursive'
  | 'MCD';

/** Measures whose own definition says how far is too far, by the number of scores: their cutoff is 1. */
export const OWN_CUTOFF: ReadonlySet<Measure> = new Set(['Carling', 'moving', 'recursive']);

/** A documented fault: participants by name, with the reason. */
export interface NamedRule {
  readonly rule: 'named';
  readonly participants: readonly string[];
  readonly reason: string;
}

/** A fixed limit in the column's unit, on trials or on each participant's mean of the column. */
export interface LimitRule {
  readonly rule: 'limit';
  readonly on: 'trial' | 'participant';
  readonly column: string;
  readonly side: 'below' | 'above';
  /** null = not applied. */
  readonly limit: number | null;
  readonly reason: string;
}

/**
 * Further than k SD, MAD or quartile distances from the middle of the scores in its scope; with the measure MCD further out on
 * several columns together than k percent of normal participants.
 */
export interface ExtremeRule {
  readonly rule: 'extreme';
  readonly on: 'trial' | 'participant';
  readonly column: string;
  readonly measure: Measure;
  /** null = none: nobody is set aside. */
  readonly cutoff: number | null;
  readonly scope: Scope;
  readonly sides: 'both' | 'above' | 'below';
  /** Whether it looks again at who is left until nobody more is beyond it. */
  readonly repeated?: boolean;
  /** Measure MCD: the columns judged together; `column` is the first of them. */
  readonly columns?: readonly string[];
}

/** A participant with fewer than a share of kept trials. */
export interface KeptShareRule {
  readonly rule: 'kept-share';
  /** Percent of the rows read for the participant; null = not applied. */
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

/** Whether a rule reads the condition a row belongs to. */
export function readsCondition(rule: Rule): boolean {
  return rule.rule === 'extreme' && (rule.scope === 'condition' || rule.scope === 'participant-condition');
}

/** Whether a rule takes whole participants, and so comes after the rules on trials. */
export function onParticipants(rule: Rule): boolean {
  return rule.rule === 'kept-share' || (rule.rule !== 'named' && rule.on === 'participant');
}

const SCOPE_WORDS: Readonly<Record<Scope, string>> = {
  pooled: 'all scores pooled',
  participant: 'within participant',
  condition: 'within condition',
  'participant-condition': 'within participant and condition',
};

/** Short words for a rule: "beyond 2.5 MAD within participant", "below 150 ms", "by name". */
export function ruleLabel(rule: Rule, unit: string): string {
  switch (rule.rule) {
    case 'named':
      return 'by name';
    case 'limit':
      return rule.limit === null ? 'no limit' : `${rule.side} ${rule.limit}${unit === '' ? '' : ` ${unit}`}`;
    case 'extreme':
      return rule.measure === 'MCD' ? cutoffLabel(rule) : `${cutoffLabel(rule)} ${SCOPE_WORDS[rule.scope]}`;
    case 'kept-share':
      return rule.least === null ? 'no least share' : `fewer than ${rule.least} % kept`;
  }
}

/** Columns of the table a rule reads. */
export function columnsRead(rule: Rule): readonly string[] {
  if (rule.rule === 'limit') return [rule.column];
  return rule.rule === 'extreme' ? (rule.columns ?? [rule.column]) : [];
}

const DISTANCES: Readonly<Record<Measure, (cutoff: number) => string>> = {
  MAD: (cutoff) => `${cutoff} MAD`,
  'double MAD': (cutoff) => `${cutoff} MAD of its side`,
  SD: (cutoff) => `${cutoff} SD`,
  fences: (cutoff) => `fences of ${cutoff} IQR`,
  'hinge fences': (cutoff) => `fences of ${cutoff} hinge distances`,
  'adjusted fences': (cutoff) => `skew-adjusted fences of ${cutoff} hinge distances`,
  Carling: () => 'Carling\u2019s limits',
  moving: () => 'the moving criterion',
  recursive: () => 'the recursive moving criterion',
  MCD: (cutoff) => `${cutoff} % of MCD distances`,
};

/** "beyond 3 MAD", "beyond fences of 1.5 IQR", "beyond 2 SD, repeated", "no cutoff". */
export function cutoffLabel(rule: Pick<ExtremeRule, 'measure' | 'cutoff' | 'repeated' | 'columns'>): string {
  if (rule.cutoff === null) return 'no cutoff';
  const on = rule.columns === undefined ? '' : ` on ${rule.columns.join(' and ')}`;
  return `beyond ${DISTANCES[rule.measure](rule.cutoff)}${on}${rule.repeated === true ? ', repeated,' : ''}`;
}
