import { Refusal } from '../refusal.ts';
import { type Column, missingCount, type Table } from '../table.ts';
import { counted, grouped } from '../words.ts';
import { CR, LF, narrow, type Span, spanText } from './bytes.ts';
import { columnNames } from './column-names.ts';
import { type Dialect, dialectOf } from './dialect.ts';
import type { ColumnRead } from './number-column.ts';
import { readColumns } from './read-columns.ts';
import { readRecord } from './read-record.ts';
import { scanRows } from './scan-rows.ts';
import { type SourceText, sourceText } from './source-text.ts';

/** A data file as a table, and what the import did that a reader should know, as sentences. */
export interface Imported {
  readonly table: Table;
  readonly warnings: readonly string[];
}

/** As wide as a spreadsheet may be: common practice. */
const MOST_COLUMNS = 16_384;

/**
 * Reads delimited text: delimiter, encoding, decimal mark and column types are told by content, never by the name.
 *
 * @param bytes the file
 * @param name its name, for sentences
 * @returns the table, its rows numbered from 1 in the order of the file, and warnings
 * @throws Refusal with a sentence that says what cannot be read, on which line, and what to do
 * @source RFC 4180, widened: four delimiters, any line end, blank lines and a trailing delimiter let pass
 * @checked by writing and reading hostile names and values; numbers against Number(text), exactly
 */
export function importBytes(bytes: Uint8Array, name: string): Imported {
  const source = sourceText(bytes, name);
  const dialect = dialectOf(source.bytes, source.start);
  if (dialect.start >= source.bytes.length) {
    throw new Refusal(`${name} holds only blank lines: choose a file with a line of column names and one line a row.`);
  }
  const header = readHeader(source.bytes, dialect, name);
  const { names, notes, warnings } = columnNames(header.fields, name);
  const { rows, columns: read } = readRows(source, dialect, header, names, name);
  if (rows === 0) {
    throw new Refusal(`${name} has column names but no rows below them: choose a file with one line a row.`);
  }
  const columns: Column[] = [];
  const said: string[] = [...source.warnings, ...warnings];
  for (const [at, { column, warnings: about }] of read.entries()) {
    if (header.fields[at] === '' && missingCount(column) === rows) continue;
    columns.push(column);
    said.push(...[notes[at] ?? []].flat(), ...about);
  }
  if (columns.length === 0) throw new Refusal(`${name} holds neither column names nor values: choose another file.`);
  said.push(...shapeWarnings(columns, rows));
  const origin = new Int32Array(rows);
  for (let row = 0; row < rows; row++) origin[row] = row + 1;
  return { table: { columns, rows: rows, origin }, warnings: said };
}

/**
 * Reads pasted text as importBytes reads a file.
 *
 * @param text delimited text
 * @param name what to call it in sentences
 * @returns the table and warnings
 * @throws Refusal as importBytes
 */
export function importText(text: string, name: string): Imported {
  return importBytes(new TextEncoder().encode(text), name);
}

interface Header {
  readonly fields: readonly string[];
  readonly next: number;
}

function readHeader(bytes: Uint8Array, { start, delimiter }: Dialect, name: string): Header {
  const { ends, next } = readRecord(bytes, start, delimiter);
  if (ends.length > MOST_COLUMNS) {
    throw new Refusal(
      `${name} has ${grouped(ends.length)} columns, more than the ${grouped(MOST_COLUMNS)} that can be read: leave some out.`,
    );
  }
  // For its refusals: the header is held to the same rules of quotation marks as the rows.
  scanRows(bytes.subarray(0, next), { start, delimiter, columns: ends.length, name }, [], []);
  const span: Span = { start: 0, end: 0, quoted: false };
  const fields = ends.map((end, i) => {
    narrow(bytes, i === 0 ? start : (ends[i - 1] as number) + 1, end, span);
    return spanText(bytes, span).trim();
  });
  return { fields, next };
}

/** A header that ends in a delimiter may stand over rows that do not. */
function readRows(
  { bytes, lineEnds }: SourceText,
  { delimiter }: Dialect,
  { fields, next }: Header,
  names: readonly string[],
  name: string,
): { rows: number; columns: ColumnRead[] } {
  const options = { start: next, delimiter, rowLimit: rowsAtMost(bytes, lineEnds), name };
  try {
    return readColumns(bytes, { ...options, names });
  } catch (error) {
    if (fields.length === 1 || fields[fields.length - 1] !== '') throw error;
    try {
      return readColumns(bytes, { ...options, names: names.slice(0, -1) });
    } catch {
      throw error;
    }
  }
}

/** The header's own line end is one of `lineEnds`; a last line need not have one. */
function rowsAtMost(bytes: Uint8Array, lineEnds: number): number {
  const last = bytes[bytes.length - 1];
  return lineEnds - (last === LF || last === CR ? 1 : 0);
}

function shapeWarnings(columns: readonly Column[], rows: number): string[] {
  const warnings: string[] = [];
  const [first, ...others] = columns as [Column, ...Column[]];
  let empty = 0;
  let emptyRow = 0;
  for (let row = 0; row < rows; row++) {
    if (!isMissing(first, row) || others.some((column) => !isMissing(column, row))) continue;
    if (empty++ === 0) emptyRow = row + 1;
  }
  if (empty > 0) {
    warnings.push(
      `${counted(empty, 'row')} ${empty === 1 ? 'is' : 'are'} empty in every column (first: row ${grouped(emptyRow)}).`,
    );
  }
  if (columns.length === 1) {
    warnings.push('Only one column was found; fields are separated by a comma, semicolon, tab or vertical bar.');
  }
  return warnings;
}

function isMissing(column: Column, row: number): boolean {
  return column.type === 'number' ? Number.isNaN(column.values[row]) : (column.codes[row] as number) < 0;
}
