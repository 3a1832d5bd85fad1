import { Refusal } from '../data/refusal.ts';
import { asLevels, type Column, columnOf, type Table, textAt } from '../data/table.ts';
import type { HiddenConditions } from './hidden-design.ts';
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
  /** Whether a participant has one row under each combination of conditions, or several (trials). */
  readonly rows: 'one score' | 'several trials';
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
  /** 1 = in. Rows with a missing role are never in. */
  readonly kept: Uint8Array;
  /** Rows left out at the start because a role or the outcome is missing. */
  readonly missingRows: number;
  /** Combinations of within conditions for which a participant has no row. */
  readonly missingCells: readonly { readonly participant: string; readonly condition: string }[];
  /** The exclusion rules applied so far, in order, and what each set aside. */
  readonly rules: readonly Rule[];
  readonly steps: readonly RuleStep[];
  /** Set while the conditions are hidden: no row's level can then be read from the design (hidden-design.ts). */
  readonly hidden?: HiddenConditions;
}

/** Scores beyond this cannot be squared and summed in double precision. */
const LARGEST_SCORE = 1e150;

/**
 * States the design: gives every row its participant, its conditions and its score, and checks that the file bears
 * the statement out.
 *
 * @param table rows as read or reshaped
 * @param roles which column plays which part; every named column must be in the table
 * @param quiet whether refusals must name no level, because the conditions are hidden
 * @returns the design with every complete row kept
 * @throws Refusal where a column is missing or of the wrong type, a participant stands in two groups, or rows repeat
 *   although one score each was stated
 * @source participant flow: Hopewell et al. 2025 (CONSORT), items 20-22; a participant in two groups: methods R9
 */
export function declareDesign(table: Table, roles: Roles, quiet = false): Design {
  const participantColumn = needColumn(table, roles.participant, 'participant');
  const outcome = outcomeValues(table, roles.outcome);
  const { codes: participant, levels: participants } = asLevels(participantColumn);
  const factors = [
    ...roles.within.map((name) => readFactor(table, name, 'within')),
    ...roles.between.map((name) => readFactor(table, name, 'between')),
  ];
  for (const factor of factors) {
    if (factor.scope === 'between') refuseTwoGroups(factor, participant, participants, table, roles.participant, quiet);
  }
  const kept = new Uint8Array(table.rows);
  let missingRows = 0;
  for (let row = 0; row < table.rows; row++) {
    const complete =
      (participant[row] as number) >= 0 &&
      !Number.isNaN(outcome[row] as number) &&
      factors.every((factor) => (factor.codes[row] as number) >= 0);
    if (complete) kept[row] = 1;
    else missingRows++;
  }
  const design: Design = {
    roles,
    table,
    participants,
    participant,
    factors,
    outcome,
    kept,
    missingRows,
    missingCells: [],
    rules: [],
    steps: [],
  };
  const rows = rowsPerCell(design);
  if (roles.rows === 'one score') refuseRepeats(design, rows, quiet);
  return { ...design, missingCells: findMissingCells(design, rows) };
}

/** Combinations of the within factors' levels, the last factor varying fastest; one empty combination without any. */
export function withinConditions(design: Design): { readonly label: string; readonly levels: readonly number[] }[] {
  let conditions: { label: string; levels: number[] }[] = [{ label: '', levels: [] }];
  for (const factor of design.factors) {
    if (factor.scope !== 'within') continue;
    conditions = conditions.flatMap((condition) =>
      factor.levels.map((level, code) => ({
        label: condition.label === '' ? level : `${condition.label}, ${level}`,
        levels: [...condition.levels, code],
      })),
    );
  }
  return conditions;
}

/** For each row, the index into withinConditions(design); -1 where a within factor is missing. */
export function withinCondition(design: Design): Int32Array {
  return crossed(design, (factor) => factor.scope === 'within');
}

/** For each row, the combination of every factor's level, within and between; -1 where one is missing. */
export function fullCondition(design: Design): Int32Array {
  return crossed(design, () => true);
}

function crossed(design: Design, wanted: (factor: Factor) => boolean): Int32Array {
  const code = new Int32Array(design.table.rows);
  for (const factor of design.factors) {
    if (!wanted(factor)) continue;
    for (let row = 0; row < code.length; row++) {
      const level = factor.codes[row] as number;
      const before = code[row] as number;
      code[row] = before < 0 || level < 0 ? -1 : before * factor.levels.length + level;
    }
  }
  return code;
}

function needColumn(table: Table, name: string, role: string): Column {
  const column = columnOf(table, name);
  if (!column) {
    throw new Refusal(
      `There is no column called "${name}" in the rows above, which the ${role} was to be read from. Choose one of: ${table.columns
        .map((each) => each.name)
        .join(', ')}.`,
    );
  }
  return column;
}

function outcomeValues(table: Table, name: string): Float64Array {
  const column = needColumn(table, name, 'outcome');
  if (column.type !== 'number') {
    const row = firstNonNumber(column);
    throw new Refusal(
      `The outcome has to be numbers, but column "${name}" holds ${column.type === 'date' ? 'dates' : 'text'}` +
        (row >= 0 ? `, such as "${textAt(column, row)}" in row ${table.origin[row]}` : '') +
        '. Correct the file, or choose another column.',
    );
  }
  for (let row = 0; row < column.values.length; row++) {
    const value = column.values[row] as number;
    if (Math.abs(value) > LARGEST_SCORE) {
      throw new Refusal(
        `Row ${table.origin[row]} of column "${name}" holds ${value}, too large to compute with. Correct the file, or derive the outcome in a larger unit.`,
      );
    }
  }
  return column.values;
}

function firstNonNumber(column: Column): number {
  for (let row = 0; column.type !== 'number' && row < column.codes.length; row++) {
    const text = textAt(column, row);
    if (text !== '' && !Number.isFinite(Number(text))) return row;
  }
  return -1;
}

function readFactor(table: Table, name: string, scope: Factor['scope']): Factor {
  const { codes, levels } = asLevels(needColumn(table, name, 'condition'));
  if (levels.length < 2) {
    throw new Refusal(
      `Column "${name}" has ${levels.length === 0 ? 'no value' : `one level only ("${levels[0]}")`}, so there is nothing to compare. Choose a column with two or more levels.`,
    );
  }
  if (levels.length > 50) {
    throw new Refusal(
      `Column "${name}" has ${levels.length} different values, too many for a condition (50 at most). Choose another column, or recode it into a few levels first.`,
    );
  }
  return { name, scope, levels, codes };
}

function refuseTwoGroups(
  factor: Factor,
  participant: Int32Array,
  participants: readonly string[],
  table: Table,
  noun: string,
  quiet: boolean,
): void {
  const firstRow = new Int32Array(participants.length).fill(-1);
  for (let row = 0; row < participant.length; row++) {
    const who = participant[row] as number;
    const level = factor.codes[row] as number;
    if (who < 0 || level < 0) continue;
    const first = firstRow[who] as number;
    if (first < 0) firstRow[who] = row;
    else if (factor.codes[first] !== level) {
      if (quiet) {
        throw new Refusal(
          `A ${noun} stands in two groups of ${factor.name}. A participant can be in one group only: correct the file, or state ${factor.name} as a condition that every participant met. Which one, and where, is told once the conditions are open.`,
        );
      }
      throw new Refusal(
        `${noun} ${participants[who]} stands in two groups of ${factor.name}: "${factor.levels[factor.codes[first] as number]}" in row ${table.origin[first]} and "${factor.levels[level]}" in row ${table.origin[row]}. ` +
          `A participant can be in one group only: correct the file, or state ${factor.name} as a condition that every participant met.`,
      );
    }
  }
}

/** Complete rows of each participant under each within condition, participants x conditions. */
function rowsPerCell(design: Design): Int32Array {
  const conditions = withinConditions(design).length;
  const condition = withinCondition(design);
  const rows = new Int32Array(design.participants.length * conditions);
  for (let row = 0; row < condition.length; row++) {
    if (design.kept[row] !== 1) continue;
    const cell = (design.participant[row] as number) * conditions + (condition[row] as number);
    rows[cell] = (rows[cell] as number) + 1;
  }
  return rows;
}

function refuseRepeats(design: Design, rows: Int32Array, quiet: boolean): void {
  const conditions = withinConditions(design);
  const cell = rows.findIndex((count) => count > 1);
  if (cell < 0) return;
  if (quiet) {
    throw new Refusal(
      `A ${design.roles.participant} has several rows under one condition, but one score each was stated. If the rows are trials, say "several trials": they are then scored per participant before any test. Otherwise correct the file.`,
    );
  }
  const who = Math.floor(cell / conditions.length);
  const where = cell % conditions.length;
  const condition = withinCondition(design);
  const found: number[] = [];
  for (let row = 0; row < condition.length && found.length < 3; row++) {
    if (design.kept[row] === 1 && design.participant[row] === who && condition[row] === where) {
      found.push(design.table.origin[row] as number);
    }
  }
  const label = conditions[where]?.label ?? '';
  throw new Refusal(
    `${design.roles.participant} ${design.participants[who]} has ${rows[cell]} rows${label === '' ? '' : ` under ${label}`} (rows ${found.join(', ')}${(rows[cell] as number) > found.length ? ' and more' : ''}), but one score each was stated. ` +
      'If the rows are trials, say "several trials": they are then scored per participant before any test. Otherwise correct the file.',
  );
}

function findMissingCells(design: Design, rows: Int32Array): Design['missingCells'] {
  const conditions = withinConditions(design);
  const missing: { participant: string; condition: string }[] = [];
  for (let who = 0; who < design.participants.length; who++) {
    for (let where = 0; where < conditions.length; where++) {
      if (rows[who * conditions.length + where] === 0) {
        missing.push({ participant: design.participants[who] as string, condition: conditions[where]?.label ?? '' });
      }
    }
  }
  return missing;
}

/** The word for one participant, taken from the column's name where that is a word: "officer", else "participant". */
export function participantNoun(roles: Roles): string {
  return /^[a-z]{3,20}$/.test(roles.participant) && !/^(id|code|pid|subj|ppt|subject)$/.test(roles.participant)
    ? roles.participant
    : 'participant';
}
