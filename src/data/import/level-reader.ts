import { narrow, QUOTE, SPACE, type Span } from './bytes.ts';
import { hashOf, LevelTable, nextHash, SEED } from './level-table.ts';
import type { CellReader } from './scan-rows.ts';

/** Reads a column as text: codes into levels in order of first appearance, an empty cell missing. */
export class LevelReader implements CellReader {
  readonly codes: Int32Array;
  /** Cells that had spaces around their text, and the first of them, rows counted from 1. */
  spaced = 0;
  spacedRow = 0;
  private readonly table = new LevelTable();
  private readonly span: Span = { start: 0, end: 0, quoted: false };

  /**
   * @param rowLimit most rows there can be
   */
  constructor(rowLimit: number) {
    this.codes = new Int32Array(rowLimit);
  }

  scan(bytes: Uint8Array, start: number, stops: Uint8Array, row: number): number {
    const length = bytes.length;
    let at = start;
    let hash = SEED;
    for (; at < length; at++) {
      const byte = bytes[at] as number;
      if (stops[byte] === 1) break;
      hash = nextHash(hash, byte);
    }
    if (at === start || bytes[start] === QUOTE || bytes[start] === SPACE || bytes[at - 1] === SPACE) {
      this.codes[row] = -1;
      return start;
    }
    this.codes[row] = this.table.codeOf(bytes, start, at, hash);
    return at;
  }

  read(bytes: Uint8Array, start: number, end: number, row: number): void {
    const { span } = this;
    narrow(bytes, start, end, span);
    if (span.start === span.end) return;
    const plain = span.quoted ? undoubled(bytes, span) : bytes.subarray(span.start, span.end);
    this.codes[row] = this.table.codeOf(plain, 0, plain.length, hashOf(plain));
    if (!span.quoted && ++this.spaced === 1) this.spacedRow = row + 1;
  }

  /** The levels as texts, in order of their codes. */
  levels(): string[] {
    return this.table.levels();
  }
}

/** The bytes of a quoted cell with each doubled quotation mark made one. */
function undoubled(bytes: Uint8Array, { start, end }: Span): Uint8Array {
  const inside = bytes.subarray(start, end);
  if (!inside.includes(QUOTE)) return inside;
  const plain = new Uint8Array(inside.length);
  let size = 0;
  for (let i = 0; i < inside.length; i++) {
    plain[size++] = inside[i] as number;
    if (inside[i] === QUOTE) i++;
  }
  return plain.subarray(0, size);
}
