import { readFileSync } from 'node:fs';

/** Number columns of a data set of test/reference/cases, by name. */
export function referenceColumns(name: string): Readonly<Record<string, Float64Array>> {
  const text = readFileSync(new URL(`../reference/cases/${name}.csv`, import.meta.url), 'utf8');
  const [head = '', ...lines] = text.trim().split(/\r?\n/);
  const rows = lines.map((line) => line.split(','));
  return Object.fromEntries(
    head.split(',').map((column, at) => [column, Float64Array.from(rows, (row) => Number(row[at]))]),
  );
}

/** A column that must be there. */
export function columnIn(columns: Readonly<Record<string, Float64Array>>, name: string): Float64Array {
  const found = columns[name];
  if (found === undefined) throw new Error(`no column ${name}`);
  return found;
}
