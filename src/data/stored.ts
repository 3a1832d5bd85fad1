import { Refusal } from './refusal.ts';
import type { Column, Table } from './table.ts';
import { counted, grouped, quoted } from './words.ts';

/** A column as plain JSON data, as the saved worksheet holds it. */
export type PlainColumn =
  | { readonly name: string; readonly type: 'number'; readonly values: readonly (number | null)[] }
  | {
      readonly name: string;
      readonly type: 'text' | 'date';
      readonly levels: readonly string[];
      readonly codes: readonly number[];
    };

/** What is read of a stored data block. */
export interface PlainBlock {
  readonly name?: string;
  readonly rows: number;
  readonly columns: readonly PlainColumn[];
}

/**
 * A table from a stored data block, its rows numbered from 1.
 *
 * @param block the block, taken as it stands in a file: nothing about it is trusted
 * @returns the table
 * @throws Refusal naming the column, where lengths differ, a code has no level, a level or name occurs twice, or a
 *   value is no finite number
 */
export function tableFromStored(block: PlainBlock): Table {
  const where = block.name === undefined ? 'The stored data' : `The stored data of ${block.name}`;
  const { rows } = block;
  if (!Number.isInteger(rows) || rows < 0 || rows >= 2 ** 31) {
    throw new Refusal(
      `${where} say they have ${String(rows)} rows: the worksheet file is damaged, read the data again.`,
    );
  }
  const names = new Set<string>();
  const columns = block.columns.map((stored): Column => {
    const refuse = (what: string) =>
      new Refusal(
        `${where} are damaged: column ${quoted(String(stored.name))} ${what}. Read the data file again, or use an undamaged copy of the worksheet.`,
      );
    if (typeof stored.name !== 'string' || stored.name === '') throw refuse('has no name');
    if (names.has(stored.name)) throw refuse('occurs twice');
    names.add(stored.name);
    return stored.type === 'number' ? numberColumn(stored, rows, refuse) : levelColumn(stored, rows, refuse);
  });
  const origin = new Int32Array(rows);
  for (let row = 0; row < rows; row++) origin[row] = row + 1;
  return { columns, rows, origin };
}

type Refuse = (what: string) => Refusal;

function numberColumn(stored: PlainColumn & { type: 'number' }, rows: number, refuse: Refuse): Column {
  if (stored.values.length !== rows) throw refuse(`holds ${lengths(stored.values.length, rows)}`);
  const values = new Float64Array(rows);
  for (let row = 0; row < rows; row++) {
    const value = stored.values[row];
    if (value !== null && (typeof value !== 'number' || !Number.isFinite(value))) {
      throw refuse(`holds something other than a number in row ${grouped(row + 1)}`);
    }
    values[row] = value === null ? Number.NaN : value;
  }
  return { name: stored.name, type: 'number', values };
}

function levelColumn(stored: PlainColumn & { type: 'text' | 'date' }, rows: number, refuse: Refuse): Column {
  const { name, type, levels, codes } = stored;
  if (type !== 'text' && type !== 'date') throw refuse(`has a type that is not known (${quoted(String(type))})`);
  if (codes.length !== rows) throw refuse(`holds ${lengths(codes.length, rows)}`);
  if (!levels.every((level) => typeof level === 'string' && level !== ''))
    throw refuse('has a level that is not a text');
  if (new Set(levels).size !== levels.length) throw refuse('has a level twice');
  const out = new Int32Array(rows);
  for (let row = 0; row < rows; row++) {
    const code = codes[row] as number;
    if (!Number.isInteger(code) || code < -1 || code >= levels.length) {
      throw refuse(`has no level for row ${grouped(row + 1)}`);
    }
    out[row] = code;
  }
  return { name, type, codes: out, levels: [...levels] };
}

function lengths(found: number, due: number): string {
  return `${counted(found, 'value')} where there are ${counted(due, 'row')}`;
}

/**
 * A table's columns as plain JSON data; row numbers are not stored, because a stored table is the file as read.
 *
 * @param table any table
 * @returns one stored column each, missing numbers as null
 */
export function storedFromTable(table: Table): PlainColumn[] {
  return table.columns.map((column): PlainColumn => {
    const { name } = column;
    if (column.type !== 'number') {
      return { name, type: column.type, levels: [...column.levels], codes: Array.from(column.codes) };
    }
    return { name, type: 'number', values: Array.from(column.values, (value) => (Number.isNaN(value) ? null : value)) };
  });
}
