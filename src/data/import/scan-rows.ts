import { Refusal } from '../refusal.ts';
import { grouped } from '../words.ts';
import { CR, LF, lineOf, QUOTE, SPACE } from './bytes.ts';
import { afterLineEnd, closingQuote, skipBlankLines } from './read-record.ts';

/** Takes the cells of one column as they are found. */
export interface CellReader {
  /**
   * Reads a cell that is written plainly, and stores it.
   *
   * @param bytes UTF-8 text
   * @param start first byte of the cell
   * @param stops 1 for each byte that ends a cell: one look-up a byte in place of three comparisons
   * @param row counted from 0
   * @returns index of the byte that ends the cell; or start, with "missing" stored, where it is empty or not plain
   */
  scan(bytes: Uint8Array, start: number, stops: Uint8Array, row: number): number;
  /** Reads a cell that was not plain, once its end is known. */
  read(bytes: Uint8Array, start: number, end: number, row: number): void;
}

export interface ScanOptions {
  /** First byte after the header. */
  readonly start: number;
  readonly delimiter: number;
  /** Fields a row must have, 1 or more. */
  readonly columns: number;
  /** The file's name, for sentences. */
  readonly name: string;
}

/**
 * Goes through every row below the header once and gives each cell to the reader of its column. Blank lines are
 * skipped; one empty field more than the header has (a delimiter at the end of the line) is let pass.
 *
 * @param bytes UTF-8 text
 * @param options where the rows begin and how they are written
 * @param numbers the reader of each column that takes one of this sort, else null
 * @param levels the same for the other sort; two lists, so that each call meets one sort of reader only
 * @returns the number of rows
 * @throws Refusal naming the line: a row with too few or too many fields, a quotation mark never closed, text after a
 *   closing quotation mark
 * @source RFC 4180, section 2
 */
export function scanRows<N extends CellReader, L extends CellReader>(
  bytes: Uint8Array,
  options: ScanOptions,
  numbers: readonly (N | null)[],
  levels: readonly (L | null)[],
): number {
  const stops = new Uint8Array(256);
  stops[options.delimiter] = stops[LF] = stops[CR] = 1;
  // The field too many that a trailing delimiter makes has a place, so that no look-up falls outside.
  const places = Array.from({ length: options.columns + 1 }, (_, i) => i);
  const scanner: Scanner<N, L> = {
    bytes,
    stops,
    numbers: places.map((i) => (i < options.columns ? (numbers[i] ?? null) : null)),
    levels: places.map((i) => (i < options.columns ? (levels[i] ?? null) : null)),
    options,
  };
  let rows = 0;
  let at = skipBlankLines(bytes, options.start);
  while (at < bytes.length) {
    at = afterLineEnd(bytes, scanRow(scanner, at, rows++));
    const next = at < bytes.length ? bytes[at] : LF;
    if (next === LF || next === CR || next === SPACE) at = skipBlankLines(bytes, at);
  }
  return rows;
}

interface Scanner<N, L> {
  readonly bytes: Uint8Array;
  readonly stops: Uint8Array;
  readonly numbers: readonly (N | null)[];
  readonly levels: readonly (L | null)[];
  readonly options: ScanOptions;
}

/** Scans one row and gives the index of its line end. This is where the time spent on a large file goes. */
function scanRow<N extends CellReader, L extends CellReader>(
  scanner: Scanner<N, L>,
  begin: number,
  row: number,
): number {
  const { bytes, stops, numbers, levels, options } = scanner;
  const { columns, delimiter } = options;
  const length = bytes.length;
  let at = begin;
  for (let column = 0; ; column++, at++) {
    const start = at;
    const number = numbers[column] as N | null;
    const level = levels[column] as L | null;
    if (number !== null) at = number.scan(bytes, at, stops, row);
    else if (level !== null) at = level.scan(bytes, at, stops, row);
    if (at === start) {
      if (at < length && (bytes[at] === QUOTE || bytes[at] === SPACE)) at = skipQuoted(bytes, at, options);
      while (at < length && stops[bytes[at] as number] === 0) at++;
      if (at > start) (number ?? level)?.read(bytes, start, at, row);
    }
    const isLast = at >= length || bytes[at] !== delimiter;
    if (column >= columns && !(isLast && isBlank(bytes, start, at))) throw ragged(bytes, begin, options);
    if (!isLast) continue;
    if (column + 1 < columns) throw ragged(bytes, begin, options);
    return at;
  }
}

function endsLine(bytes: Uint8Array, at: number): boolean {
  return bytes[at] === LF || bytes[at] === CR;
}

function isBlank(bytes: Uint8Array, start: number, end: number): boolean {
  for (let i = start; i < end; i++) if (bytes[i] !== SPACE) return false;
  return true;
}

/** Past the spaces and the quoted text a field begins with, or past the spaces where it is not quoted. */
function skipQuoted(bytes: Uint8Array, start: number, { delimiter, name }: ScanOptions): number {
  let open = start;
  while (bytes[open] === SPACE) open++;
  if (bytes[open] !== QUOTE) return open;
  const close = closingQuote(bytes, open);
  if (close < 0) {
    throw new Refusal(
      `${name}, line ${grouped(lineOf(bytes, open))}: a quotation mark is opened and never closed. Close it, or double it where it belongs to the text.`,
    );
  }
  let after = close + 1;
  while (bytes[after] === SPACE) after++;
  if (after < bytes.length && bytes[after] !== delimiter && !endsLine(bytes, after)) {
    throw new Refusal(
      `${name}, line ${grouped(lineOf(bytes, close))}: text follows a closing quotation mark. Double the mark where it belongs to the text.`,
    );
  }
  return after;
}

function ragged(bytes: Uint8Array, begin: number, { columns, delimiter, name }: ScanOptions): Refusal {
  let found = 1;
  for (let at = begin; at < bytes.length && !endsLine(bytes, at); at++) {
    if (bytes[at] === delimiter) found++;
    else if (bytes[at] === QUOTE) at = Math.max(at, closingQuote(bytes, at));
  }
  const fields = found === 1 ? '1 field' : `${grouped(found)} fields`;
  return new Refusal(
    `${name}, line ${grouped(lineOf(bytes, begin))} has ${fields} where the header has ${grouped(columns)}: correct that line and read the file again.`,
  );
}
