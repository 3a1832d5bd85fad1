import { Refusal } from '../refusal.ts';
import { CR, LF } from './bytes.ts';
import { refuseContainer } from './refuse-container.ts';

/** A file as UTF-8 bytes, whatever it was saved in. */
export interface SourceText {
  readonly bytes: Uint8Array;
  /** Index of the first byte after a byte order mark. */
  readonly start: number;
  /** Line ends in it, those inside quotation marks among them. */
  readonly lineEnds: number;
  readonly warnings: readonly string[];
}

/** Windows-1252 gives the bytes 0x80 to 0x9f letters and marks where Latin-1 has controls nobody types. */
const HIGH_CONTROLS = [
  ...[0x20ac, 0x81, 0x201a, 0x0192, 0x201e, 0x2026, 0x2020, 0x2021, 0x02c6, 0x2030, 0x0160, 0x2039, 0x0152, 0x8d],
  ...[0x017d, 0x8f, 0x90, 0x2018, 0x2019, 0x201c, 0x201d, 0x2022, 0x2013, 0x2014, 0x02dc, 0x2122, 0x0161, 0x203a],
  ...[0x0153, 0x9d, 0x017e, 0x0178],
];

/**
 * Reads a file's bytes as text: UTF-8 with or without a mark, UTF-16 with a mark, else Latin-1.
 *
 * @param bytes the file
 * @param name its name, for sentences
 * @returns UTF-8 bytes, and a warning where the encoding was guessed
 * @throws Refusal for an empty file, one of 2 GB or more, a spreadsheet or other container, and bytes that are not text
 * @source The Unicode Standard 15, table 3-7 (well-formed UTF-8); WHATWG Encoding, windows-1252
 * @checked against TextDecoder in fatal mode, exactly
 */
export function sourceText(bytes: Uint8Array, name: string): SourceText {
  refuseSize(bytes.length, name);
  refuseContainer(bytes, name);
  const wide =
    bytes[0] === 0xff && bytes[1] === 0xfe ? 'utf-16le' : bytes[0] === 0xfe && bytes[1] === 0xff ? 'utf-16be' : null;
  const text = wide === null ? bytes : fromUtf16(bytes.subarray(2), wide);
  const start = text[0] === 0xef && text[1] === 0xbb && text[2] === 0xbf ? 3 : 0;
  const scan = scanText(text);
  if (scan.nul >= 0) {
    throw new Refusal(
      `${name} is not a text file (byte ${scan.nul + 1} is NUL): export the table as CSV, in UTF-8, and read that file.`,
    );
  }
  if (scan.broken < 0) return { bytes: text, start, lineEnds: scan.lineEnds, warnings: [] };
  return {
    bytes: fromLatin1(text),
    start: 0,
    lineEnds: scan.lineEnds,
    warnings: [
      `${name} is not UTF-8 (first on line ${scan.brokenLine}); it was read as Latin-1. Check letters such as \u00e9 or \u00fc in names and text.`,
    ],
  };
}

/**
 * Refuses a size that cannot be read.
 *
 * @param size bytes
 * @param name the file's name
 * @throws Refusal for none at all, and for 2^31 or more
 */
export function refuseSize(size: number, name: string): void {
  if (size === 0) throw new Refusal(`${name} is empty: choose a file with a line of column names and one line a row.`);
  if (size >= 2 ** 31) {
    throw new Refusal(`${name} is larger than 2 GB, more than can be read here: leave out columns or split the file.`);
  }
}

interface Scan {
  /** First NUL byte, or -1. */
  nul: number;
  /** First byte that is not UTF-8, or -1, and its line. */
  broken: number;
  brokenLine: number;
  lineEnds: number;
}

function scanText(bytes: Uint8Array): Scan {
  const scan: Scan = { nul: -1, broken: -1, brokenLine: 0, lineEnds: 0 };
  const head = Math.min(bytes.length, -bytes.byteOffset & 3);
  const words = new Uint32Array(bytes.buffer, bytes.byteOffset + head, (bytes.length - head) >> 2);
  let at = scanBytes(bytes, 0, head, scan);
  while (at < bytes.length && scan.nul < 0) {
    let word = (at - head) >> 2;
    while (word < words.length && isPlainWord(words[word] as number)) word++;
    const from = Math.max(at, head + word * 4);
    at = scanBytes(bytes, from, Math.min(bytes.length, head + word * 4 + 4), scan);
  }
  return scan;
}

/** Whether none of four bytes is below 14 (NUL and line ends are) or above 127; others may be judged not plain. */
function isPlainWord(word: number): boolean {
  return (((((word | 0) - 0x0e0e0e0e) & ~word) | word) & 0x80808080) === 0;
}

/** Scans some bytes one by one and gives the first index not scanned: past `end` where a character goes past it. */
function scanBytes(bytes: Uint8Array, start: number, end: number, scan: Scan): number {
  for (let i = start; i < end; i++) {
    const byte = bytes[i] as number;
    if (byte > CR && byte < 0x80) continue;
    if (byte === LF || (byte === CR && bytes[i + 1] !== LF)) scan.lineEnds++;
    else if (byte === 0) {
      scan.nul = i;
      return i;
    } else if (byte >= 0x80 && scan.broken < 0) {
      const length = sequenceLength(bytes, i);
      if (length === 0) {
        scan.broken = i;
        scan.brokenLine = scan.lineEnds + 1;
      } else i += length - 1;
      end = Math.max(end, i + 1);
    }
  }
  return end;
}

/** Bytes of the UTF-8 sequence that begins at i, 0 where it is not well formed. */
function sequenceLength(bytes: Uint8Array, i: number): number {
  const first = bytes[i] as number;
  const length =
    first >= 0xc2 && first < 0xe0 ? 2 : first >= 0xe0 && first < 0xf0 ? 3 : first >= 0xf0 && first < 0xf5 ? 4 : 0;
  if (i + length > bytes.length) return 0;
  for (let k = 1; k < length; k++) if (((bytes[i + k] as number) & 0xc0) !== 0x80) return 0;
  const second = bytes[i + 1] as number;
  // Overlong forms, surrogates and code points above U+10FFFF show in the second byte.
  if ((first === 0xe0 && second < 0xa0) || (first === 0xed && second > 0x9f)) return 0;
  if ((first === 0xf0 && second < 0x90) || (first === 0xf4 && second > 0x8f)) return 0;
  return length;
}

function fromLatin1(bytes: Uint8Array): Uint8Array {
  let size = bytes.length;
  for (const byte of bytes) if (byte >= 0x80) size += byte < 0xa0 ? 2 : 1;
  const out = new Uint8Array(size);
  let at = 0;
  for (const byte of bytes) {
    const point = byte >= 0x80 && byte < 0xa0 ? (HIGH_CONTROLS[byte - 0x80] as number) : byte;
    if (point < 0x80) out[at++] = point;
    else if (point < 0x800) {
      out[at++] = 0xc0 | (point >> 6);
      out[at++] = 0x80 | (point & 0x3f);
    } else {
      out[at++] = 0xe0 | (point >> 12);
      out[at++] = 0x80 | ((point >> 6) & 0x3f);
      out[at++] = 0x80 | (point & 0x3f);
    }
  }
  return out.subarray(0, at);
}

function fromUtf16(bytes: Uint8Array, encoding: 'utf-16le' | 'utf-16be'): Uint8Array {
  const decoder = new TextDecoder(encoding);
  const encoder = new TextEncoder();
  // In pieces: one string of the whole file could pass the longest string an engine allows.
  const piece = 1 << 20;
  const parts: Uint8Array[] = [];
  for (let at = 0; at < bytes.length; at += piece) {
    const last = at + piece >= bytes.length;
    parts.push(encoder.encode(decoder.decode(bytes.subarray(at, at + piece), { stream: !last })));
  }
  const out = new Uint8Array(parts.reduce((size, part) => size + part.length, 0));
  let at = 0;
  for (const part of parts) {
    out.set(part, at);
    at += part.length;
  }
  return out;
}
