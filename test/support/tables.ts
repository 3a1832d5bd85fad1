import type { Column, Table } from '../../src/data/table.ts';

/** A table from plain arrays: numbers make a number column (null = missing), text a text column ('' = missing). */
export function tableOf(columns: Readonly<Record<string, readonly (number | string | null)[]>>): Table {
  const made = Object.entries(columns).map(([name, values]) => columnFrom(name, values));
  const rows = Object.values(columns)[0]?.length ?? 0;
  return { columns: made, rows, origin: Int32Array.from({ length: rows }, (_, row) => row + 1) };
}

function columnFrom(name: string, values: readonly (number | string | null)[]): Column {
  if (values.every((value) => value === null || typeof value === 'number')) {
    return { name, type: 'number', values: Float64Array.from(values, (value) => value ?? NaN) };
  }
  const levels: string[] = [];
  const codes = Int32Array.from(values, (value) => {
    const text = String(value ?? '');
    if (text === '') return -1;
    if (!levels.includes(text)) levels.push(text);
    return levels.indexOf(text);
  });
  return { name, type: 'text', codes, levels };
}
