import { isoMoment } from '../iso-date.ts';
import { needColumn } from '../need-column.ts';
import { plainNumber } from '../plain-number.ts';
import { Refusal } from '../refusal.ts';
import { type Column, type Table, takeRows } from '../table.ts';
import { listed, quoted } from '../words.ts';

export type FilterOperation =
  | 'is at least'
  | 'is at most'
  | 'is above'
  | 'is below'
  | 'is'
  | 'is not'
  | 'is one of'
  | 'is missing'
  | 'is not missing';

export interface FilterOptions {
  readonly column: string;
  readonly op: FilterOperation;
  /** What values are held against; several for "is one of", as a list or separated by commas; none for "is missing". */
  readonly value?: string | number | readonly (string | number)[] | null;
}

export interface Filtered {
  readonly table: Table;
  /** Rows dropped, and those among them that were dropped because the value is missing. */
  readonly dropped: number;
  readonly droppedMissing: number;
}

/**
 * Keeps the rows in which a column fulfils a condition. A missing value fulfils none but "is missing".
 *
 * @param table any table
 * @param options see FilterOptions
 * @returns the kept rows in their order, and counts of what was dropped
 * @throws Refusal where the column is not there, a value is no number or date for a column of such, text is asked for an
 *   order, or no row is left
 */
export function filterRows(table: Table, options: FilterOptions): Filtered {
  const column = needColumn(table, options.column);
  const isKept = test(column, options);
  const kept: number[] = [];
  let droppedMissing = 0;
  for (let row = 0; row < table.rows; row++) {
    const missing = column.type === 'number' ? Number.isNaN(column.values[row]) : (column.codes[row] as number) < 0;
    const keep = missing ? options.op === 'is missing' : isKept(row);
    if (keep) kept.push(row);
    else if (missing) droppedMissing++;
  }
  if (kept.length === 0) {
    throw new Refusal(
      `No row is left: in none is ${options.column} as asked (${options.op}${shown(options.value)}). Choose another value or condition.`,
    );
  }
  return { table: takeRows(table, kept), dropped: table.rows - kept.length, droppedMissing };
}

function shown(value: FilterOptions['value']): string {
  return value === undefined || value === null || value === '' ? '' : ` ${[value].flat().join(', ')}`;
}

/** Whether a row whose value is not missing is kept. */
function test(column: Column, { op, value }: FilterOptions): (row: number) => boolean {
  if (op === 'is missing') return () => false;
  if (op === 'is not missing') return () => true;
  const wanted = wantedValues(column, op, value);
  if (column.type === 'text') return textTest(column, op, wanted);
  const limits = wanted.map((text) => limitOf(text, column));
  const numbers = column.type === 'number' ? column.values : null;
  const moments = column.type === 'number' ? [] : column.levels.map((level) => isoMoment(level) as number);
  const at = (row: number) =>
    numbers === null
      ? (moments[(column as { codes: Int32Array }).codes[row] as number] as number)
      : (numbers[row] as number);
  const limit = limits[0] as number;
  switch (op) {
    case 'is at least':
      return (row) => at(row) >= limit;
    case 'is at most':
      return (row) => at(row) <= limit;
    case 'is above':
      return (row) => at(row) > limit;
    case 'is below':
      return (row) => at(row) < limit;
    case 'is not':
      return (row) => at(row) !== limit;
    default:
      return (row) => limits.includes(at(row));
  }
}

function wantedValues(column: Column, op: FilterOperation, value: FilterOptions['value']): string[] {
  const given = value === undefined || value === null ? [] : [value].flat().map(String);
  const isLevel = column.type !== 'number' && column.levels.includes(given[0] ?? '');
  const isList = op === 'is one of' && !Array.isArray(value) && !isLevel;
  const parts = isList ? given.flatMap((text) => text.split(',')) : given;
  const wanted = parts.map((text) => text.trim()).filter((text) => text !== '');
  if (wanted.length === 0) throw new Refusal('Say which value rows are kept by.');
  return wanted;
}

function limitOf(text: string, column: Column): number {
  const limit = column.type === 'number' ? plainNumber(text) : isoMoment(text);
  if (limit !== null) return limit;
  const due = column.type === 'number' ? 'a number' : 'a date such as 2024-01-31';
  throw new Refusal(`Column ${column.name} is compared with ${quoted(text)}, which is not ${due}: write one.`);
}

function textTest(
  column: Column & { type: 'text' | 'date' },
  op: FilterOperation,
  wanted: string[],
): (row: number) => boolean {
  if (op !== 'is' && op !== 'is not' && op !== 'is one of') {
    throw new Refusal(
      `Column ${column.name} is text, which has no order, so ${quoted(op)} is not defined: choose "is", "is not" or "is one of".`,
    );
  }
  const strange = wanted.filter((text) => !column.levels.includes(text));
  if (strange.length > 0) {
    throw new Refusal(
      `Column ${column.name} never is ${listed(strange.map(quoted))}: choose among ${listed(column.levels.map(quoted), 8)}.`,
    );
  }
  const codes = new Set(wanted.map((text) => column.levels.indexOf(text)));
  const keep = op !== 'is not';
  return (row) => codes.has(column.codes[row] as number) === keep;
}
