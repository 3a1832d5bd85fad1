import { foldColumns, spreadRows } from './arquero-verbs.ts';
import { commonAffixes, trimmed } from './common-affixes.ts';
import { needColumn, needFreeName } from './need-column.ts';
import { Refusal } from './refusal.ts';
import { asLevels, type Column, missingCount, type Table, takeRows, textAt } from './table.ts';
import { counted, grouped, listed, quoted } from './words.ts';

/**
 * Names for turning columns into rows: what the columns share is what they measure.
 *
 * @param columns names of the columns, such as load_tone and load_voice
 * @returns a name for the new condition, one for the new column of values ("load"), and the levels ("tone", "voice")
 */
export function suggestLong(columns: readonly string[]): { name: string; value: string; levels: readonly string[] } {
  const { prefix, suffix, middles } = commonAffixes(columns);
  const value = [trimmed(prefix), trimmed(suffix)].filter((part) => part !== '').join('_') || 'value';
  return { name: value === 'condition' ? 'level' : 'condition', value, levels: middles };
}

/**
 * Turns columns into rows: each row becomes one row a column, with the column's level and its value.
 *
 * @param table the wide table
 * @param options.columns at least two columns of one type
 * @param options.name name of the new condition; its levels are the column names without what they share
 * @param options.value name of the new column of values
 * @returns the long table: the other columns repeated, then condition and value; a missing value keeps its row; each
 *   row keeps the row number it came from
 * @throws Refusal where a column is not there, types differ, or a new name is taken
 */
export function toLong(table: Table, options: { columns: readonly string[]; name: string; value: string }): Table {
  const folded = options.columns.map((name) => needColumn(table, name));
  if (folded.length < 2 || new Set(options.columns).size < folded.length) {
    throw new Refusal('Turning columns into rows needs two different columns or more: choose them.');
  }
  const rest: Table = { ...table, columns: table.columns.filter((column) => !options.columns.includes(column.name)) };
  for (const name of [options.name, options.value]) needFreeName(rest, name);
  if (options.name === options.value) throw new Refusal('The condition and the values need two different names.');
  const joined = joinColumns(folded, options.value);
  const { rows, which, values } = foldColumns(joined.inputs);
  const long = takeRows(rest, rows);
  const levels = commonAffixes(options.columns).middles;
  return {
    ...long,
    columns: [...long.columns, { name: options.name, type: 'text', codes: which, levels }, joined.finish(values)],
  };
}

/** Columns of one type as columns of numbers (or of codes into one list of levels), and the way back. */
function joinColumns(
  columns: readonly Column[],
  name: string,
): { inputs: ArrayLike<number>[]; finish(values: Float64Array): Column } {
  const filled = columns.filter((column) => missingCount(column) < rowsOf(column));
  const type = (filled[0] ?? (columns[0] as Column)).type;
  const other = filled.find((column) => column.type !== type);
  if (other !== undefined) {
    throw new Refusal(
      `Column ${(filled[0] as Column).name} holds ${kindOf(type)} and column ${other.name} ${kindOf(other.type)}: only columns of one type can become one column.`,
    );
  }
  if (type === 'number') {
    const inputs = columns.map((each) =>
      each.type === 'number' ? each.values : new Float64Array(rowsOf(each)).fill(Number.NaN),
    );
    return { inputs, finish: (values) => ({ name, type, values }) };
  }
  const levels: string[] = [];
  const place = new Map<string, number>();
  const inputs = columns.map((column) => {
    if (column.type === 'number') return new Int32Array(rowsOf(column)).fill(-1);
    const codes = column.levels.map((level) => {
      const code = place.get(level) ?? levels.push(level) - 1;
      place.set(level, code);
      return code;
    });
    return column.codes.map((code) => (code < 0 ? -1 : (codes[code] as number)));
  });
  return { inputs, finish: (values) => ({ name, type, codes: Int32Array.from(values), levels }) };
}

function rowsOf(column: Column): number {
  return column.type === 'number' ? column.values.length : column.codes.length;
}

function kindOf(type: Column['type']): string {
  return type === 'number' ? 'numbers' : type === 'date' ? 'dates' : 'text';
}

/**
 * Gives each level of a condition its own column of values.
 *
 * @param table the long table
 * @param options.id columns that tell the rows of the wide table apart, the participant first
 * @param options.by the condition whose levels become columns
 * @param options.value the column whose values they hold
 * @returns one row for each combination of `id` in order of first appearance: the id columns, the other columns that
 *   say one thing in all its rows, and a column `value_level` for each level; numbers stay numbers, what is not there
 *   is missing, and a row has the number of the first row it is made of
 * @throws Refusal naming participant and level where one cell would get two values, and where an id or level is missing
 */
export function toWide(table: Table, options: { id: readonly string[]; by: string; value: string }): Table {
  const ids = options.id.map((name) => needColumn(table, name));
  const by = needColumn(table, options.by);
  const value = needColumn(table, options.value);
  const used = [...options.id, options.by, options.value];
  if (ids.length === 0) throw new Refusal('Say which column tells the rows of one participant from another\u2019s.');
  if (new Set(used).size < used.length) {
    throw new Refusal(
      'The participant, the condition and the values must be different columns: choose another for one.',
    );
  }
  const keys = asLevels(by);
  for (const column of [...ids, by]) refuseMissing(table, column);
  const groups = groupRows(ids, table.rows);
  refuseDoubles(table, groups, keys, options);
  const spread = spreadRows(groups, keys.codes, keys.levels.length);
  const first = firstRows(groups, spread.groups);
  const others = table.columns.filter((column) => !used.includes(column.name) && isConstant(column, groups));
  const kept = takeRows({ ...table, columns: [...ids, ...others] }, first);
  const added = keys.levels.map((level, key) =>
    pick(value, spread.rows[key] as Int32Array, `${options.value}_${level}`),
  );
  const names = [...kept.columns, ...added].map((column) => column.name);
  const double = names.find((name, i) => names.indexOf(name) < i);
  if (double !== undefined) {
    throw new Refusal(`There would be two columns called ${quoted(double)}: give one of them another name first.`);
  }
  return { ...kept, columns: [...kept.columns, ...added] };
}

function refuseMissing(table: Table, column: Column): void {
  const missing = missingCount(column);
  if (missing === 0) return;
  let row = 0;
  while (textAt(column, row) !== '') row++;
  throw new Refusal(
    `Column ${column.name} is missing in ${counted(missing, 'row')} (first: row ${grouped(table.origin[row] as number)}), so it cannot be told where they belong: keep only the rows where it is not missing.`,
  );
}

/** A code for each row that is the same where all id columns are. */
function groupRows(ids: readonly Column[], rows: number): Int32Array {
  let groups = new Int32Array(rows);
  for (const column of ids) {
    const { codes, levels } = asLevels(column);
    const seen = new Map<number, number>();
    groups = groups.map((group, row) => {
      const pair = group * (levels.length + 1) + (codes[row] as number);
      const code = seen.get(pair) ?? seen.size;
      seen.set(pair, code);
      return code;
    });
  }
  return groups;
}

function refuseDoubles(
  table: Table,
  groups: Int32Array,
  keys: { codes: Int32Array; levels: readonly string[] },
  options: { id: readonly string[]; value: string },
): void {
  const seen = new Set<number>();
  for (let row = 0; row < table.rows; row++) {
    const cell = (groups[row] as number) * keys.levels.length + (keys.codes[row] as number);
    if (!seen.has(cell)) {
      seen.add(cell);
      continue;
    }
    const same = Array.from({ length: table.rows }, (_, i) => i).filter(
      (i) => groups[i] === groups[row] && keys.codes[i] === keys.codes[row],
    );
    const who = options.id.map((name) => `${name} ${textAt(needColumn(table, name), row)}`).join(', ');
    const rows = listed(
      same.map((i) => grouped(table.origin[i] as number)),
      3,
    );
    throw new Refusal(
      `${who} has ${counted(same.length, 'row')} for ${quoted(keys.levels[keys.codes[row] as number] as string)} (rows ${rows}), but a column has room for one value of ${options.value}. Score each participant first, for example by the mean of the trials, or name another column that tells these rows apart.`,
    );
  }
}

function firstRows(groups: Int32Array, order: Int32Array): Int32Array {
  const first = new Map<number, number>();
  for (let row = groups.length - 1; row >= 0; row--) first.set(groups[row] as number, row);
  return order.map((group) => first.get(group) as number);
}

function isConstant(column: Column, groups: Int32Array): boolean {
  const { codes } = asLevels(column);
  const held = new Map<number, number>();
  for (let row = 0; row < groups.length; row++) {
    const group = groups[row] as number;
    const code = codes[row] as number;
    if ((held.get(group) ?? code) !== code) return false;
    held.set(group, code);
  }
  return true;
}

function pick(column: Column, rows: Int32Array, name: string): Column {
  if (column.type !== 'number') {
    const codes = rows.map((row) => (row < 0 ? -1 : (column.codes[row] as number)));
    return { name, type: column.type, codes, levels: column.levels };
  }
  const values = Float64Array.from(rows, (row) => (row < 0 ? Number.NaN : (column.values[row] as number)));
  return { name, type: 'number', values };
}
