import { suspiciousCodes } from '../missing-codes.ts';
import type { Column } from '../table.ts';
import { counted, grouped, quoted } from '../words.ts';

/** A column and what the reader should know about how it was read. */
export interface ColumnRead {
  readonly column: Column;
  readonly warnings: readonly string[];
}

/** How the cells of a number column were written, as far as a reader should know. Rows are counted from 1. */
export interface Written {
  /** Missing code -> number of cells. */
  readonly codes: ReadonlyMap<string, number>;
  /** The first cell with a leading zero. */
  readonly leadingZero: { readonly row: number; readonly text: string } | null;
  /** Range of the values; low > high where there is none. */
  readonly low: number;
  readonly high: number;
  /** The first cell with a decimal comma, where the comma is the decimal mark. */
  readonly comma: { readonly row: number; readonly text: string } | null;
}

/**
 * A number column with the sentences that belong to it.
 *
 * @param name the column's name
 * @param values one double a row, NaN = missing
 * @param written how its cells were written
 * @returns the column and warnings
 */
export function numberColumn(name: string, values: Float64Array, written: Written): ColumnRead {
  const { codes, leadingZero, comma, low, high } = written;
  const warnings = codeWarnings(name, codes);
  for (const odd of suspiciousCodes(values, { low, high })) {
    warnings.push(
      `Column ${name} holds ${grouped(odd.value)} in ${counted(odd.count, 'row')} (first in row ${grouped(odd.row)}), far from the rest (${grouped(odd.low)} to ${grouped(odd.high)}). It was left as it is; recode it where it stands for a missing value.`,
    );
  }
  if (comma !== null) {
    warnings.push(
      `Column ${name} was read with the comma as its decimal mark (row ${grouped(comma.row)}: ${quoted(comma.text)} is ${grouped(values[comma.row - 1] as number)}).`,
    );
  }
  if (leadingZero !== null) {
    warnings.push(
      `Column ${name} was read as numbers, which do not keep leading zeros (row ${grouped(leadingZero.row)}: ${quoted(leadingZero.text)}).`,
    );
  }
  if (low > high) warnings.push(`Column ${name} holds no value.`);
  return { column: { name, type: 'number', values }, warnings };
}

/**
 * A sentence for each missing code that was read as missing.
 *
 * @param name the column's name
 * @param codes missing code -> number of cells
 * @returns the sentences
 */
export function codeWarnings(name: string, codes: ReadonlyMap<string, number>): string[] {
  return [...codes].map(
    ([code, n]) =>
      `Column ${name}: ${counted(n, 'cell')} with ${quoted(code)} ${n === 1 ? 'is' : 'are'} read as missing.`,
  );
}
