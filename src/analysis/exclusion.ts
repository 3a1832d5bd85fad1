import { Refusal } from '../data/refusal.ts';
import { columnOf } from '../data/table.ts';
import { type Design, fullCondition } from './design.ts';
import {
  type BlindScores,
  type Flagged,
  flagExtremeBlind,
  flagExtremeByCondition,
  flagKeptShare,
  flagLimit,
} from './flagging.ts';
import { type ExtremeRule, type NamedRule, type Rule, ruleLabel } from './rules.ts';

/** A design with one more rule applied, and what the rule's own cell shows of it. */
export interface Applied {
  readonly design: Design;
  readonly flagged: Flagged;
}

/**
 * Applies one exclusion rule to the rows still in.
 *
 * @param design the design above, not modified
 * @param rule one rule of rules.ts with every number filled; a null cutoff or limit sets nothing aside
 * @returns the design with the rule's rows taken out and the rule and its step added
 * @throws Refusal where a named participant or column is not in the table
 * @source order (trials before participants, one pass) and conventions: methods 3.10
 */
export function applyRule(design: Design, rule: Rule): Applied {
  return applyFlagged(design, rule, flag(design, rule));
}

/**
 * The same where the marks have been made already, as by a worker.
 *
 * @param design the design above, not modified
 * @param rule the rule that made the marks
 * @param flagged its marks, one a row of the design
 * @returns as applyRule
 */
export function applyFlagged(design: Design, rule: Rule, flagged: Flagged): Applied {
  const kept = design.kept.slice();
  const rows: number[] = [];
  for (let row = 0; row < kept.length; row++) {
    if (kept[row] === 1 && flagged.rows[row] === 1) {
      kept[row] = 0;
      rows.push(row);
    }
  }
  const lost = lostParticipants(design, kept);
  const step = { rows: Int32Array.from(rows), participants: lost, label: ruleLabel(rule, design.roles.unit) };
  return {
    design: { ...design, kept, rules: [...design.rules, rule], steps: [...design.steps, step] },
    flagged,
  };
}

/** Applies rules in order, starting from the design without any. */
export function applyRules(design: Design, rules: readonly Rule[]): Design {
  return rules.reduce((sofar, rule) => applyRule(sofar, rule).design, design);
}

/** The design as declared, before any rule. */
export function withoutRules(design: Design): Design {
  if (design.rules.length === 0) return design;
  const kept = design.kept.slice();
  for (const step of design.steps) for (const row of step.rows) kept[row] = 1;
  return { ...design, kept, rules: [], steps: [] };
}

function flag(design: Design, rule: Rule): Flagged {
  switch (rule.rule) {
    case 'named':
      return flagNamed(design, rule);
    case 'limit':
      return flagLimit(blindScores(design, rule.column), rule);
    case 'extreme':
      return rule.scope === 'pooled' || rule.scope === 'participant'
        ? flagExtremeBlind(extremeScores(design, rule), rule)
        : flagExtremeByCondition(blindScores(design, rule.column), conditionOf(design, rule), rule);
    case 'kept-share':
      return flagKeptShare(design.kept, design.participant, design.participants.length, rule);
  }
}

/**
 * What a blind extremity rule may look at: scores, marks and participants, and nothing of the conditions.
 *
 * @param design the design above
 * @param rule the rule, for its columns
 * @returns the scores of its column, and of every column where it judges several together
 * @throws Refusal where a column is not in the table or holds no numbers
 */
export function extremeScores(design: Design, rule: ExtremeRule): BlindScores {
  const scores = blindScores(design, rule.column);
  if (rule.columns === undefined) return scores;
  return { ...scores, together: rule.columns.map((column) => blindScores(design, column).values) };
}

function blindScores(design: Design, column: string): BlindScores {
  return {
    values: column === design.roles.outcome ? design.outcome : numbersOf(design, column),
    kept: design.kept,
    participant: design.participant,
    participants: design.participants.length,
  };
}

function numbersOf(design: Design, name: string): Float64Array {
  const column = columnOf(design.table, name);
  if (!column) throw new Refusal(`There is no column called "${name}" to set rows aside by. Choose another column.`);
  if (column.type !== 'number') {
    throw new Refusal(`Column "${name}" holds ${column.type}, and a limit needs numbers. Choose another column.`);
  }
  return column.values;
}

function flagNamed(design: Design, rule: NamedRule): Flagged {
  const wanted = new Set<number>();
  for (const name of rule.participants) {
    const who = design.participants.indexOf(name);
    if (who < 0) {
      throw new Refusal(
        `There is no ${design.roles.participant} called "${name}" in the rows above. Choose from those that are there.`,
      );
    }
    wanted.add(who);
  }
  const rows = new Uint8Array(design.table.rows);
  for (let row = 0; row < rows.length; row++) if (wanted.has(design.participant[row] as number)) rows[row] = 1;
  return { rows, limits: [] };
}

function conditionOf(design: Design, rule: ExtremeRule) {
  const codes = fullCondition(design);
  const count = design.factors.reduce((product, factor) => product * factor.levels.length, 1);
  const perParticipant = new Int32Array(design.participants.length);
  if (rule.on === 'participant') {
    const between = design.factors.filter((factor) => factor.scope === 'between');
    for (let row = 0; row < codes.length; row++) {
      const who = design.participant[row] as number;
      if (who < 0) continue;
      perParticipant[who] = between.reduce((sum, f) => sum * f.levels.length + Math.max(0, f.codes[row] as number), 0);
    }
  }
  return { codes, count, perParticipant };
}

function lostParticipants(design: Design, kept: Uint8Array): string[] {
  const before = new Uint8Array(design.participants.length);
  const after = new Uint8Array(design.participants.length);
  for (let row = 0; row < kept.length; row++) {
    const who = design.participant[row] as number;
    if (design.kept[row] === 1) before[who] = 1;
    if (kept[row] === 1) after[who] = 1;
  }
  return design.participants.filter((_, who) => before[who] === 1 && after[who] === 0);
}
