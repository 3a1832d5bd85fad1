/** Bytes the reader of delimited text looks for. */
export const TAB = 0x09;
export const LF = 0x0a;
export const CR = 0x0d;
export const SPACE = 0x20;
export const QUOTE = 0x22;
export const COMMA = 0x2c;
export const DOT = 0x2e;
export const SEMICOLON = 0x3b;
export const BAR = 0x7c;

/** Where a cell's text lies in the bytes; one object is filled again and again so that reading makes no garbage. */
export interface Span {
  start: number;
  end: number;
  /** Whether it stood in quotation marks; the marks themselves are outside the span. */
  quoted: boolean;
}

/**
 * Narrows a field to its text: quotation marks taken off, or, where there are none, the spaces around it.
 *
 * @param bytes UTF-8 text
 * @param start first byte of the field
 * @param end one past its last byte
 * @param span filled with the result
 */
export function narrow(bytes: Uint8Array, start: number, end: number, span: Span): void {
  while (start < end && bytes[start] === SPACE) start++;
  while (end > start && bytes[end - 1] === SPACE) end--;
  const quoted = start < end && bytes[start] === QUOTE;
  span.start = quoted ? start + 1 : start;
  span.end = quoted ? end - 1 : end;
  span.quoted = quoted;
}

const decoder = new TextDecoder('utf-8', { ignoreBOM: true });

/**
 * The text of a narrowed cell, doubled quotation marks inside quotation marks undone.
 *
 * @param bytes UTF-8 text
 * @param span a narrowed cell
 * @returns its text
 */
export function spanText(bytes: Uint8Array, span: Span): string {
  const text = decoder.decode(bytes.subarray(span.start, span.end));
  return span.quoted ? text.replaceAll('""', '"') : text;
}

/**
 * The number of the line a byte stands on; CRLF, LF and a lone CR each end a line.
 *
 * @param bytes UTF-8 text
 * @param position index of a byte
 * @returns the line, counted from 1
 */
export function lineOf(bytes: Uint8Array, position: number): number {
  let line = 1;
  for (let i = 0; i < position; i++) {
    if (bytes[i] === LF || (bytes[i] === CR && bytes[i + 1] !== LF)) line++;
  }
  return line;
}
