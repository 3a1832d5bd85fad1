import { CR, LF, QUOTE, SPACE } from './bytes.ts';

/** One record: where each of its fields ends, and where the next record begins. */
export interface RecordFields {
  readonly ends: readonly number[];
  readonly next: number;
}

/**
 * Reads one record, of any number of fields.
 *
 * @param bytes UTF-8 text
 * @param start first byte of the record
 * @param delimiter byte between fields
 * @returns one end a field (the index of the delimiter or line end after it)
 * @source RFC 4180, section 2: fields in quotation marks may hold delimiters, line ends and doubled quotation marks
 */
export function readRecord(bytes: Uint8Array, start: number, delimiter: number): RecordFields {
  const ends: number[] = [];
  let at = start;
  for (;;) {
    at = fieldEnd(bytes, at, delimiter);
    ends.push(at);
    if (bytes[at] !== delimiter) break;
    at++;
  }
  return { ends, next: afterLineEnd(bytes, at) };
}

/**
 * Where the field that begins here ends.
 *
 * @param bytes UTF-8 text
 * @param start first byte of the field
 * @param delimiter byte between fields
 * @returns index of the delimiter or line end after it, or the length
 */
export function fieldEnd(bytes: Uint8Array, start: number, delimiter: number): number {
  let at = start;
  while (bytes[at] === SPACE) at++;
  if (bytes[at] === QUOTE) at = Math.max(closingQuote(bytes, at), at);
  for (; at < bytes.length; at++) {
    const byte = bytes[at];
    if (byte === delimiter || byte === LF || byte === CR) return at;
  }
  return bytes.length;
}

/**
 * The quotation mark that closes the one at `open`; doubled ones inside stand for one.
 *
 * @param bytes UTF-8 text
 * @param open index of the opening mark
 * @returns index of the closing mark, or -1 where there is none
 */
export function closingQuote(bytes: Uint8Array, open: number): number {
  for (let at = open + 1; at < bytes.length; at++) {
    if (bytes[at] !== QUOTE) continue;
    if (bytes[at + 1] !== QUOTE) return at;
    at++;
  }
  return -1;
}

/**
 * The byte after a line end: CRLF, LF or a lone CR.
 *
 * @param bytes UTF-8 text
 * @param at index of the line end, or the length
 * @returns index of the next line's first byte, or the length
 */
export function afterLineEnd(bytes: Uint8Array, at: number): number {
  return bytes[at] === CR && bytes[at + 1] === LF ? at + 2 : Math.min(at + 1, bytes.length);
}

/**
 * Skips empty lines and lines of spaces.
 *
 * @param bytes UTF-8 text
 * @param start where to begin
 * @returns index of the first byte of the first line that holds something, or the length
 */
export function skipBlankLines(bytes: Uint8Array, start: number): number {
  let line = start;
  for (let i = start; i < bytes.length; i++) {
    const byte = bytes[i];
    if (byte === LF || byte === CR) line = i + 1;
    else if (byte !== SPACE) return line;
  }
  return bytes.length;
}
