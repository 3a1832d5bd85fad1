import { missingCode } from '../missing-codes.ts';
import { COMMA, narrow, type Span, spanText } from './bytes.ts';
import { losesDigits, parseNumber, scanNumber } from './parse-number.ts';
import type { CellReader } from './scan-rows.ts';

const ZERO = 0x30;

/** Reads a column that is expected to hold numbers; when it holds anything else `failed` is set and it is read again. */
export class NumberReader implements CellReader {
  readonly values: Float64Array;
  /** Whether a cell was neither empty, nor a missing code, nor a number that a double holds. */
  failed = false;
  /** Missing code -> number of cells. */
  readonly codes = new Map<string, number>();
  /** The first cell written with a leading zero, rows counted from 1. */
  leadingZero: { row: number; text: string } | null = null;
  /** The first cell written with a decimal comma, where the comma is the decimal mark. */
  comma: { row: number; text: string } | null = null;
  /** Range of the values; low > high where there is none. */
  low = Infinity;
  high = -Infinity;
  private readonly mark: number;
  private readonly span: Span = { start: 0, end: 0, quoted: false };

  /**
   * @param rowLimit most rows there can be
   * @param mark byte of the decimal mark
   */
  constructor(rowLimit: number, mark: number) {
    this.values = new Float64Array(rowLimit);
    this.mark = mark;
  }

  scan(bytes: Uint8Array, start: number, stops: Uint8Array, row: number): number {
    // Until one cell with a comma has been seen, every cell is looked at closely.
    if (this.mark === COMMA && this.comma === null) {
      this.values[row] = Number.NaN;
      return start;
    }
    const end = scanNumber(bytes, start, stops, this.mark, this.values, row);
    this.widen(this.values[row] as number);
    return end;
  }

  read(bytes: Uint8Array, start: number, end: number, row: number): void {
    if (this.failed) return;
    const { span } = this;
    narrow(bytes, start, end, span);
    if (span.quoted) narrow(bytes, span.start, span.end, span);
    if (span.start === span.end) return;
    const value = parseNumber(bytes, span.start, span.end, this.mark);
    this.values[row] = value;
    this.widen(value);
    if (Number.isNaN(value)) {
      const code = span.end - span.start > 4 ? null : missingCode(spanText(bytes, span));
      if (code === null) this.failed = true;
      else this.codes.set(code, (this.codes.get(code) ?? 0) + 1);
    } else if (losesDigits(bytes, span.start, span.end, value)) this.failed = true;
    else this.note(bytes, row + 1);
  }

  private widen(value: number): void {
    if (value < this.low) this.low = value;
    if (value > this.high) this.high = value;
  }

  private note(bytes: Uint8Array, row: number): void {
    const { start, end } = this.span;
    const second = end - start < 2 ? 0 : (bytes[start + 1] as number);
    if (this.leadingZero === null && bytes[start] === ZERO && second >= ZERO && second <= ZERO + 9) {
      this.leadingZero = { row, text: spanText(bytes, this.span) };
    }
    if (this.mark === COMMA && this.comma === null && bytes.subarray(start, end).includes(COMMA)) {
      this.comma = { row, text: spanText(bytes, this.span) };
    }
  }
}
