/**
 * The table every data cell gives: typed columns of equal length, missing values settled.
 *
 * A number column holds doubles, with NaN standing for a missing value and for nothing else; a text or date column
 * holds codes into its list of levels, -1 standing for missing, levels in order of first appearance.
 */

export type ColumnType = 'number' | 'text' | 'date';

export interface NumberColumn {
  readonly name: string;
  readonly type: 'number';
  /** One double a row; NaN = missing. */
  readonly values: Float64Array;
}

export interface LevelColumn {
  readonly name: string;
  readonly type: 'text' | 'date';
  /** One code a row into `levels`; -1 = missing. */
  readonly codes: Int32Array;
  /** Distinct values in order of first appearance; dates as ISO 8601 text. */
  readonly levels: readonly string[];
}

export type Column = NumberColumn | LevelColumn;

export interface Table {
  readonly columns: readonly Column[];
  readonly rows: number;
  /** Row i of this table came from data row `origin[i]` of the file (counted from 1, header not counted). */
  readonly origin: Int32Array;
}

/** The column called `name`, or undefined. */
export function columnOf(table: Table, name: string): Column | undefined {
  return table.columns.find((column) => column.name === name);
}

/** Number of missing values in a column. */
export function missingCount(column: Column): number {
  let missing = 0;
  if (column.type === 'number') {
    for (const value of column.values) if (Number.isNaN(value)) missing++;
  } else {
    for (const code of column.codes) if (code < 0) missing++;
  }
  return missing;
}

/**
 * Any column as codes into levels: a number column gets one level for each distinct value, written in its shortest
 * form, in order of first appearance.
 */
export function asLevels(column: Column): { codes: Int32Array; levels: readonly string[] } {
  if (column.type !== 'number') return { codes: column.codes, levels: column.levels };
  const codes = new Int32Array(column.values.length);
  const levels: string[] = [];
  const seen = new Map<number, number>();
  for (let row = 0; row < codes.length; row++) {
    const value = column.values[row] as number;
    if (Number.isNaN(value)) {
      codes[row] = -1;
      continue;
    }
    let code = seen.get(value);
    if (code === undefined) {
      code = levels.length;
      seen.set(value, code);
      levels.push(String(value));
    }
    codes[row] = code;
  }
  return { codes, levels };
}

/** The text shown for one value; an empty string for a missing one. */
export function textAt(column: Column, row: number): string {
  if (column.type === 'number') {
    const value = column.values[row] as number;
    return Number.isNaN(value) ? '' : String(value);
  }
  const code = column.codes[row] as number;
  return code < 0 ? '' : (column.levels[code] as string);
}

/** The rows whose index stands in `rows`, in that order; arguments are not modified. */
export function takeRows(table: Table, rows: ArrayLike<number>): Table {
  const n = rows.length;
  const columns = table.columns.map((column): Column => {
    if (column.type === 'number') {
      const values = new Float64Array(n);
      for (let i = 0; i < n; i++) values[i] = column.values[rows[i] as number] as number;
      return { name: column.name, type: 'number', values };
    }
    const codes = new Int32Array(n);
    for (let i = 0; i < n; i++) codes[i] = column.codes[rows[i] as number] as number;
    return { name: column.name, type: column.type, codes, levels: column.levels };
  });
  const origin = new Int32Array(n);
  for (let i = 0; i < n; i++) origin[i] = table.origin[rows[i] as number] as number;
  return { columns, rows: n, origin };
}
