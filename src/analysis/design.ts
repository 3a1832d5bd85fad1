import type { Table } from '../data/table.ts';
import type { Rule, RuleStep } from './rules.ts';

/** Which column plays which part, as the researcher states it. */
export interface Roles {
  readonly participant: string;
  /** Factors every participant met. */
  readonly within: readonly string[];
  /** Factors that differ between participants. */
  readonly between: readonly string[];
  readonly outcome: string;
  /** Unit of the outcome as written beside numbers: "ms", "points"; may be empty. */
  readonly unit: string;
  readonly direction: 'lower' | 'higher' | 'neither';
}

export interface Factor {
  readonly name: string;
  readonly scope: 'within' | 'between';
  /** In order of first appearance. */
  readonly levels: readonly string[];
  /** One code a row; -1 = missing. */
  readonly codes: Int32Array;
}

/** A table with its roles, and which of its rows are still in. */
export interface Design {
  readonly roles: Roles;
  readonly table: Table;
  /** Participants by first appearance; a participant is called by the text in the participant column. */
  readonly participants: readonly string[];
  /** One code into `participants` a row; -1 where it is missing. */
  readonly participant: Int32Array;
  readonly factors: readonly Factor[];
  /** One score a row in the outcome's unit; NaN where missing. */
  readonly outcome: Float64Array;
  /** Whether a participant has several rows under one combination of conditions (trials). */
  readonly trials: boolean;
  /** 1 = in. Rows with a missing role are never in. */
  readonly kept: Uint8Array;
  /** Rows left out at the start because a role or the outcome is missing. */
  readonly missingRows: number;
  /** Combinations of conditions without any row, as sentences' parts: participant and level names. */
  readonly missingCells: readonly { readonly participant: string; readonly condition: string }[];
  /** The exclusion rules applied so far, in order, and what each set aside. */
  readonly rules: readonly Rule[];
  readonly steps: readonly RuleStep[];
}
