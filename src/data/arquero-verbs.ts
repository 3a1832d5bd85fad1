import { table } from 'arquero';

/**
 * The only module that calls the library's verbs, which compile their expressions. What is given to them are numbers
 * under names made here (c0, c1, ...); names, levels and texts of a reader never come near it.
 */

/** Each row of the input several times, once for each folded column. */
export interface Folded {
  /** Row of the input, counted from 0. */
  readonly rows: Int32Array;
  /** Which of the folded columns, counted from 0. */
  readonly which: Int32Array;
  readonly values: Float64Array;
}

/**
 * Folds columns of numbers (or codes) into one.
 *
 * @param columns at least one, of equal length
 * @returns rows in the order of the input, and within a row in the order of the columns
 */
export function foldColumns(columns: readonly ArrayLike<number>[]): Folded {
  const length = columns[0]?.length ?? 0;
  const names = columns.map((_, i) => `c${i + 1}`);
  const input: Record<string, ArrayLike<number>> = { c0: Int32Array.from({ length }, (_, row) => row) };
  for (const [i, column] of columns.entries()) input[names[i] as string] = column;
  const folded = table(input).fold(names, { as: ['which', 'value'] });
  const place = new Map(names.map((name, i) => [name, i]));
  const rows = folded.numRows();
  return {
    rows: Int32Array.from({ length: rows }, (_, row) => folded.get('c0', row) as number),
    which: Int32Array.from({ length: rows }, (_, row) => place.get(folded.get('which', row) as string) as number),
    values: Float64Array.from({ length: rows }, (_, row) => folded.get('value', row) as number),
  };
}

/**
 * Spreads rows over columns: one output row for each group, one output column for each key.
 *
 * @param groups group of each row: codes from 0
 * @param keys key of each row: codes from 0 to keyCount - 1
 * @param keyCount number of keys
 * @returns groups in order of first appearance, and for each key the input row that holds it in each group, -1 where
 *   there is none
 */
export function spreadRows(
  groups: Int32Array,
  keys: Int32Array,
  keyCount: number,
): { readonly groups: Int32Array; readonly rows: readonly Int32Array[] } {
  const c2 = Int32Array.from({ length: groups.length }, (_, row) => row);
  const spread = table({ c0: groups, c1: keys, c2 }).groupby('c0').pivot('c1', 'c2', { sort: false });
  const length = spread.numRows();
  const present = new Set(spread.columnNames());
  const column = (name: string) =>
    Int32Array.from({ length }, (_, row) => {
      const value: unknown = present.has(name) ? spread.get(name, row) : undefined;
      return typeof value === 'number' && value >= 0 ? value : -1;
    });
  return { groups: column('c0'), rows: Array.from({ length: keyCount }, (_, key) => column(String(key))) };
}
