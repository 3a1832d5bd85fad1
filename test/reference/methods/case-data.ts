/**
 * How an outside check case selects its scores: the "Arguments all methods share" of test/reference/cases/README.md.
 * Rows keep their 1-based number in the CSV (header not counted), so that outlier rules can name them.
 */

export interface CaseRow {
  /** 1-based data row of the CSV, header not counted. */
  readonly number: number;
  readonly cells: Readonly<Record<string, string>>;
}

export interface CaseData {
  readonly columns: readonly string[];
  readonly rows: readonly CaseRow[];
}

export type CaseArgs = Record<string, unknown>;
export type CaseMethod = (data: CaseData, args: CaseArgs) => Record<string, unknown>;
export type CaseMethods = Record<string, CaseMethod>;

/** What a method returns where the quantity is not computable (`expect: {"status": "undefined"}`). */
export const undefinedResult: Readonly<Record<string, unknown>> = { status: 'undefined' };

function splitLine(line: string): string[] {
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < line.length; i++) {
    const c = line.charAt(i);
    if (quoted && c === '"' && line.charAt(i + 1) === '"') {
      cell += '"';
      i++;
    } else if (c === '"') quoted = !quoted;
    else if (c === ',' && !quoted) {
      cells.push(cell);
      cell = '';
    } else cell += c;
  }
  cells.push(cell);
  return cells;
}

export function parseCaseCsv(text: string): CaseData {
  const lines = text
    .replace(/^\ufeff/, '')
    .split(/\r?\n/)
    .filter((line) => line !== '');
  const columns = splitLine(lines[0] ?? '');
  const rows = lines.slice(1).map((line, i) => {
    const values = splitLine(line);
    return { number: i + 1, cells: Object.fromEntries(columns.map((name, j) => [name, values[j] ?? ''])) };
  });
  return { columns, rows };
}

/** Text of a row's cell; throws when the data set has no such column. */
export function cellText(row: CaseRow, column: string): string {
  const text = row.cells[column];
  if (text === undefined) throw new RangeError(`*column* must be a column of the data set; got ${column}`);
  return text;
}

/** Number in a row's cell, NaN for an empty cell. */
export function cellNumber(row: CaseRow, column: string): number {
  const text = cellText(row, column);
  if (text.trim() === '') return Number.NaN;
  const value = Number(text);
  if (Number.isNaN(value)) throw new RangeError(`*${column}* must hold numbers; got "${text}" in row ${row.number}`);
  return value;
}

export function stringArg(args: CaseArgs, name: string): string {
  const value = args[name];
  if (typeof value !== 'string') throw new TypeError(`*${name}* must be a string; got ${JSON.stringify(value)}`);
  return value;
}

export function numberArg(args: CaseArgs, name: string, fallback?: number): number {
  const value = args[name] ?? fallback;
  if (typeof value !== 'number') throw new TypeError(`*${name}* must be a number; got ${JSON.stringify(value)}`);
  return value;
}

export function numbersArg(args: CaseArgs, name: string): number[] {
  const value = args[name];
  if (!Array.isArray(value)) throw new TypeError(`*${name}* must be a list of numbers; got ${JSON.stringify(value)}`);
  return value.map(Number);
}

/** A list of names; a single name counts as a list of one; `[]` when the argument is missing. */
export function stringsArg(args: CaseArgs, name: string): string[] {
  const value = args[name];
  if (value === undefined || value === null) return [];
  return Array.isArray(value) ? value.map(String) : [String(value)];
}

/** `trim` of the cases is a fraction; ours is an integer percentage. */
export function trimPercent(args: CaseArgs, fallback?: number): number {
  const share = numberArg(args, 'trim', fallback);
  const percent = Math.round(share * 100);
  if (Math.abs(share * 100 - percent) > 1e-9) throw new RangeError(`*trim* must be whole percent; got ${share}`);
  return percent;
}

/** `alternative` in our spelling. */
export function alternativeArg(args: CaseArgs): 'two-sided' | 'greater' | 'less' {
  const value = args.alternative ?? 'two.sided';
  if (value === 'greater' || value === 'less') return value;
  if (value === 'two.sided' || value === 'two-sided') return 'two-sided';
  throw new RangeError(`*alternative* must be two.sided, greater or less; got ${JSON.stringify(value)}`);
}

export function levelArg(args: CaseArgs): number {
  return numberArg(args, 'conf', 0.95);
}

/** Rows that `where` keeps, in CSV order (missing outcomes still present). */
export function whereRows(data: CaseData, args: CaseArgs): CaseRow[] {
  const where = (args.where ?? {}) as Record<string, unknown>;
  const tests = Object.entries(where).map(([column, wanted]) => {
    const values = new Set((Array.isArray(wanted) ? wanted : [wanted]).map(String));
    return (row: CaseRow) => values.has(cellText(row, column));
  });
  return data.rows.filter((row) => tests.every((test) => test(row)));
}

/** Rows that `where` keeps and whose `columns` (default: the outcome) all hold numbers. */
export function usedRows(data: CaseData, args: CaseArgs, columns: string[] = [stringArg(args, 'outcome')]): CaseRow[] {
  return whereRows(data, args).filter((row) => columns.every((column) => !Number.isNaN(cellNumber(row, column))));
}

export function numbersOf(rows: readonly CaseRow[], column: string): Float64Array {
  return Float64Array.from(rows, (row) => cellNumber(row, column));
}

/** Scores of the outcome after `where`, missing dropped, in CSV order. */
export function outcomeValues(data: CaseData, args: CaseArgs): Float64Array {
  return numbersOf(usedRows(data, args), stringArg(args, 'outcome'));
}

/** Distinct non-empty texts of a column in the order of first appearance in the CSV, restricted to `rows`. */
export function levelsOf(data: CaseData, rows: readonly CaseRow[], column: string): string[] {
  const present = new Set(rows.map((row) => cellText(row, column)));
  const ordered = new Set(data.rows.map((row) => cellText(row, column)));
  return [...ordered].filter((level) => level !== '' && present.has(level));
}

export interface Groups {
  readonly levels: readonly string[];
  /** Scores of each level, in the order of `levels`. */
  readonly scores: readonly Float64Array[];
  /** The rows behind them. */
  readonly rows: readonly (readonly CaseRow[])[];
}

/** Independent groups: `group` with `levels` (default: order of first appearance in the CSV). */
export function groupsOf(data: CaseData, args: CaseArgs): Groups {
  const outcome = stringArg(args, 'outcome');
  const group = stringArg(args, 'group');
  const used = usedRows(data, args);
  const levels = args.levels === undefined ? levelsOf(data, used, group) : stringsArg(args, 'levels');
  const rows = levels.map((level) => used.filter((row) => cellText(row, group) === level));
  return { levels, scores: rows.map((part) => numbersOf(part, outcome)), rows };
}

/** Cells of `by` (every combination present), in CSV order of first appearance; one cell of all rows without `by`. */
export function cellsBy(rows: readonly CaseRow[], by: readonly string[]): { key: string[]; rows: CaseRow[] }[] {
  const cells = new Map<string, { key: string[]; rows: CaseRow[] }>();
  for (const row of rows) {
    const key = by.map((column) => cellText(row, column));
    const id = JSON.stringify(key);
    const cell = cells.get(id) ?? { key, rows: [] };
    cell.rows.push(row);
    cells.set(id, cell);
  }
  return [...cells.values()];
}

export interface RepeatedScores {
  readonly subjects: readonly string[];
  /** The `within` levels, one list of level names per column of scores (one name per within factor). */
  readonly columns: readonly (readonly string[])[];
  /** One vector per column, one score per subject. */
  readonly scores: readonly Float64Array[];
  /** First row of each subject, for its between-participant columns. */
  readonly firstRows: readonly CaseRow[];
}

function crossed(levels: readonly (readonly string[])[]): string[][] {
  return levels.reduce<string[][]>((all, own) => all.flatMap((key) => own.map((level) => [...key, level])), [[]]);
}

/**
 * Repeated scores: subject x the crossing of the `within` columns (first factor slowest). `levels` names the levels of
 * a single within factor; subjects with any missing cell are dropped; subjects in order of first appearance.
 */
export function repeatedScores(data: CaseData, args: CaseArgs, within = stringsArg(args, 'within')): RepeatedScores {
  const outcome = stringArg(args, 'outcome');
  const subject = stringArg(args, 'subject');
  const rows = whereRows(data, args);
  const named = args.levels !== undefined && within.length === 1;
  const levels = named ? [stringsArg(args, 'levels')] : within.map((column) => levelsOf(data, rows, column));
  const columns = crossed(levels);
  const wanted = new Set(columns.map((key) => JSON.stringify(key)));
  const bySubject = new Map<string, { first: CaseRow; scores: Map<string, number> }>();
  for (const row of rows) {
    const name = cellText(row, subject);
    const entry = bySubject.get(name) ?? { first: row, scores: new Map<string, number>() };
    bySubject.set(name, entry);
    const key = JSON.stringify(within.map((column) => cellText(row, column)));
    const score = cellNumber(row, outcome);
    if (!wanted.has(key) || Number.isNaN(score)) continue;
    if (entry.scores.has(key)) throw new RangeError(`*${subject}* must have one row per cell; got two for ${name}`);
    entry.scores.set(key, score);
  }
  const complete = [...bySubject].filter(([, entry]) => entry.scores.size === columns.length);
  return {
    subjects: complete.map(([name]) => name),
    columns,
    scores: columns.map((key) =>
      Float64Array.from(complete, ([, entry]) => entry.scores.get(JSON.stringify(key)) ?? Number.NaN),
    ),
    firstRows: complete.map(([, entry]) => entry.first),
  };
}

export interface Pairs {
  readonly x: Float64Array;
  readonly y: Float64Array;
}

/** Paired scores: `subject`, `condition`, `levels` [a, b] give x = a, y = b; or columns `outcome` and `outcome2`. */
export function pairsOf(data: CaseData, args: CaseArgs): Pairs {
  if (typeof args.outcome2 === 'string') {
    const outcome = stringArg(args, 'outcome');
    const rows = usedRows(data, args, [outcome, args.outcome2]);
    return { x: numbersOf(rows, outcome), y: numbersOf(rows, args.outcome2) };
  }
  const { scores } = repeatedScores(data, args, [stringArg(args, 'condition')]);
  const [x, y] = scores;
  if (x === undefined || y === undefined || scores.length !== 2) {
    throw new RangeError(`*levels* must name two conditions; got ${scores.length}`);
  }
  return { x, y };
}

/** Differences of the pairs where a pairing is given, else the scores themselves. */
export function differencesOrValues(data: CaseData, args: CaseArgs): Float64Array {
  if (args.condition === undefined && args.outcome2 === undefined) return outcomeValues(data, args);
  const { x, y } = pairsOf(data, args);
  return x.map((value, i) => value - (y[i] as number));
}

/** A limit as the cases write it: null = no limit on that side. */
export function limitText(limit: number | null, side: 'lower' | 'upper'): number | string {
  return limit ?? (side === 'lower' ? '-Infinity' : 'Infinity');
}

/** An interval as the cases write it. */
export function intervalText(interval: readonly [number | null, number | null]): (number | string)[] {
  return [limitText(interval[0], 'lower'), limitText(interval[1], 'upper')];
}
