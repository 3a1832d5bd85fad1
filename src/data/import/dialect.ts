import { BAR, COMMA, narrow, SEMICOLON, type Span, spanText, TAB } from './bytes.ts';
import { readRecord, skipBlankLines } from './read-record.ts';

/** How a file separates its fields, and where its header begins. */
export interface Dialect {
  readonly delimiter: number;
  readonly start: number;
}

/** Ties go to the mark that is rarer inside values. */
const CANDIDATES = [TAB, SEMICOLON, BAR, COMMA];
const SAMPLE_RECORDS = 200;
const DECIMAL_COMMA = /^\s*"?[+\-\u2212]?\d+,\d+"?\s*$/;

/**
 * Tells the delimiter by content: the one whose count of fields in the header is met by the most records of the
 * beginning of the file, then the one that gives the most fields.
 *
 * @param bytes UTF-8 text
 * @param start first byte after a byte order mark
 * @returns tab, semicolon, bar or comma; comma for a file of one column
 */
export function dialectOf(bytes: Uint8Array, start: number): Dialect {
  const begin = skipBlankLines(bytes, start);
  const declared = declaredDelimiter(bytes, begin);
  if (declared !== null) return declared;
  let best = { delimiter: COMMA, share: -1, fields: 1 };
  for (const delimiter of CANDIDATES) {
    const { fields, share } = agreement(bytes, begin, delimiter);
    if (fields < 2) continue;
    if (share > best.share || (share === best.share && fields > best.fields)) best = { delimiter, share, fields };
  }
  if (best.share < 0) return { delimiter: oneColumnDelimiter(bytes, begin), start: begin };
  return { delimiter: best.delimiter, start: begin };
}

/** Some spreadsheets write a first line "sep=;" that names the delimiter. */
function declaredDelimiter(bytes: Uint8Array, start: number): Dialect | null {
  const line = String.fromCharCode(...bytes.subarray(start, start + 6));
  const match = /^sep=([\t;,|])[\r\n]/i.exec(line);
  if (match === null) return null;
  return { delimiter: (match[1] as string).charCodeAt(0), start: skipBlankLines(bytes, start + 5) };
}

function agreement(bytes: Uint8Array, start: number, delimiter: number): { fields: number; share: number } {
  const header = readRecord(bytes, start, delimiter);
  const fields = header.ends.length;
  let agree = 0;
  let records = 0;
  for (let at = header.next; records < SAMPLE_RECORDS; records++) {
    at = skipBlankLines(bytes, at);
    if (at >= bytes.length) break;
    const record = readRecord(bytes, at, delimiter);
    if (record.ends.length === fields) agree++;
    at = record.next;
  }
  return { fields, share: records === 0 ? 1 : agree / records };
}

/**
 * A header without any delimiter: one column, of decimal commas perhaps, or else rows that are longer than the header,
 * which the reader is told about.
 */
function oneColumnDelimiter(bytes: Uint8Array, start: number): number {
  const span: Span = { start: 0, end: 0, quoted: false };
  for (const delimiter of CANDIDATES) {
    let at = readRecord(bytes, start, delimiter).next;
    let commas = true;
    let longer = false;
    for (let records = 0; records < SAMPLE_RECORDS && at < bytes.length; records++) {
      const record = readRecord(bytes, at, delimiter);
      longer ||= record.ends.length > 1;
      narrow(bytes, at, record.ends[record.ends.length - 1] as number, span);
      commas &&= span.start === span.end || DECIMAL_COMMA.test(spanText(bytes, span));
      at = skipBlankLines(bytes, record.next);
    }
    if (longer) return delimiter === COMMA && commas ? SEMICOLON : delimiter;
  }
  return COMMA;
}
