import { counted, grouped } from '../words.ts';
import { COMMA, DOT, narrow, type Span } from './bytes.ts';
import { LevelReader } from './level-reader.ts';
import { type ColumnRead, numberColumn } from './number-column.ts';
import { NumberReader } from './number-reader.ts';
import { parseNumber } from './parse-number.ts';
import { readRecord, skipBlankLines } from './read-record.ts';
import { type ScanOptions, scanRows } from './scan-rows.ts';
import { typeLevels } from './type-levels.ts';

export interface ReadOptions extends Omit<ScanOptions, 'columns'> {
  /** The names of the columns; as many as a row has fields. */
  readonly names: readonly string[];
  /** Most rows there can be. */
  readonly rowLimit: number;
}

/** Rows whose cells tell what to expect of a column. */
const SAMPLE_ROWS = 50;

/**
 * Reads the rows below the header into typed columns. Columns whose first rows are numbers are read as numbers on the
 * way; a column that does not keep that up is read again as text.
 *
 * @param bytes UTF-8 text
 * @param options where the rows begin and how they are written
 * @returns the number of rows, and each column with its warnings
 * @throws Refusal as scanRows
 */
export function readColumns(bytes: Uint8Array, options: ReadOptions): { rows: number; columns: ColumnRead[] } {
  const { names, rowLimit } = options;
  const marks = expectedMarks(bytes, options);
  const readers = marks.map((mark) => (mark === null ? new LevelReader(rowLimit) : new NumberReader(rowLimit, mark)));
  const rows = pass(bytes, options, readers);
  const failed = readers.map((reader) => reader instanceof NumberReader && reader.failed);
  const settled = readers.map((reader, i) => (failed[i] ? new LevelReader(rows) : reader));
  if (failed.includes(true)) {
    pass(
      bytes,
      options,
      settled.map((reader, i) => (failed[i] ? reader : null)),
    );
  }
  const columns = settled.map((reader, i) => finish(reader, names[i] as string, rows, options.delimiter));
  return { rows, columns };
}

function pass(
  bytes: Uint8Array,
  options: ReadOptions,
  readers: readonly (NumberReader | LevelReader | null)[],
): number {
  const numbers = readers.map((reader) => (reader instanceof NumberReader ? reader : null));
  const levels = readers.map((reader) => (reader instanceof LevelReader ? reader : null));
  return scanRows(bytes, { ...options, columns: options.names.length }, numbers, levels);
}

function finish(reader: NumberReader | LevelReader, name: string, rows: number, delimiter: number): ColumnRead {
  if (reader instanceof NumberReader) {
    const values = exactly(reader.values, rows);
    return numberColumn(name, values, reader);
  }
  const codes = reader.codes.length === rows ? reader.codes : reader.codes.slice(0, rows);
  const read = typeLevels({ name, codes, levels: reader.levels() }, delimiter !== COMMA);
  if (reader.spaced === 0 || read.column.type !== 'text') return read;
  const warning = `Column ${name}: spaces around the text of ${counted(reader.spaced, 'cell')} were taken off (first in row ${grouped(reader.spacedRow)}).`;
  return { column: read.column, warnings: [...read.warnings, warning] };
}

/** A column owns its whole buffer, so that it can be handed on without a copy. */
function exactly(values: Float64Array, rows: number): Float64Array {
  return values.length === rows ? values : values.slice(0, rows);
}

/** For each column the decimal mark its first rows are written with, null where they are not numbers. */
function expectedMarks(bytes: Uint8Array, { start, delimiter, names }: ReadOptions): (number | null)[] {
  const dot = new Int32Array(names.length);
  const comma = new Int32Array(names.length);
  const filled = new Int32Array(names.length);
  const span: Span = { start: 0, end: 0, quoted: false };
  const plus = (tally: Int32Array, i: number, by: boolean) => {
    tally[i] = (tally[i] as number) + (by ? 1 : 0);
  };
  let at = skipBlankLines(bytes, start);
  for (let row = 0; row < SAMPLE_ROWS && at < bytes.length; row++) {
    const { ends, next } = readRecord(bytes, at, delimiter);
    for (let i = 0; i < Math.min(names.length, ends.length); i++) {
      narrow(bytes, i === 0 ? at : (ends[i - 1] as number) + 1, ends[i] as number, span);
      plus(filled, i, span.end > span.start);
      plus(dot, i, !Number.isNaN(parseNumber(bytes, span.start, span.end, DOT)));
      plus(comma, i, delimiter !== COMMA && !Number.isNaN(parseNumber(bytes, span.start, span.end, COMMA)));
    }
    at = skipBlankLines(bytes, next);
  }
  return names.map((_, i) => {
    const best = Math.max(dot[i] as number, comma[i] as number);
    if (best * 2 <= (filled[i] as number)) return null;
    return dot[i] === best ? DOT : COMMA;
  });
}
