import { isoMoment } from '../iso-date.ts';
import { missingCode } from '../missing-codes.ts';
import { relabel } from '../relabel.ts';
import { counted, grouped, listed, quoted } from '../words.ts';
import { COMMA, DOT } from './bytes.ts';
import { type ColumnRead, codeWarnings, numberColumn } from './number-column.ts';
import { losesDigits, parseNumber } from './parse-number.ts';

/** A column read as text, whose type is still to be told. */
export interface Texts {
  readonly name: string;
  readonly codes: Int32Array;
  readonly levels: readonly string[];
}

/** After this many levels without one number the rest is not tried. */
const HOPELESS = 1000;

/**
 * Gives a column read as text the type its levels show: number where every level is a plain decimal number (or a
 * missing code), date where every one is an ISO 8601 date, else text.
 *
 * @param texts the column
 * @param mayHaveDecimalComma whether a comma can be a decimal mark (the delimiter is another byte)
 * @returns the column and warnings
 */
export function typeLevels(texts: Texts, mayHaveDecimalComma: boolean): ColumnRead {
  const counts =
    texts.levels.slice(0, HOPELESS).some(mayBeNumber) || texts.levels.length === 0 ? countLevels(texts) : null;
  if (counts === null) return asText(texts, []);
  const dot = tryNumbers(texts.levels, counts, DOT);
  const comma = dot.others > 0 && mayHaveDecimalComma ? tryNumbers(texts.levels, counts, COMMA) : null;
  const best = comma !== null && comma.others < dot.others ? comma : dot;
  if (best.others === 0 && best.long < 0) return asNumbers(texts, best.values, best === comma ? COMMA : DOT);
  const date = asDates(texts, counts);
  if (date !== null) return date;
  return asText(texts, numericLook(texts, counts, best));
}

/** Numbers and dates begin so; a column of missing codes alone counts as numbers. */
function mayBeNumber(level: string): boolean {
  return /^\s*[+\-\u2212]?[.,]?\d/.test(level) || missingCode(level.trim()) !== null;
}

function asText({ name, codes, levels }: Texts, look: readonly string[]): ColumnRead {
  const warnings = [...look];
  const held = levels.filter((level) => missingCode(level) !== null);
  if (held.length > 0 && warnings.length === 0) {
    warnings.push(
      `Column ${name} holds ${listed(held.map(quoted))} as text; recode it where it stands for a missing value.`,
    );
  }
  return { column: { name, type: 'text', codes, levels }, warnings };
}

interface Attempt {
  /** The number of each level, NaN where it is none. */
  readonly values: Float64Array;
  /** Cells that are numbers, and cells that are neither numbers nor missing codes. */
  readonly numbers: number;
  readonly others: number;
  /** A level with more digits than a double holds, or -1. */
  readonly long: number;
}

function countLevels({ codes, levels }: Texts): Int32Array {
  const counts = new Int32Array(levels.length);
  for (let row = 0; row < codes.length; row++) {
    const code = codes[row] as number;
    if (code >= 0) counts[code] = (counts[code] as number) + 1;
  }
  return counts;
}

function tryNumbers(levels: readonly string[], counts: Int32Array, mark: number): Attempt {
  const values = new Float64Array(levels.length).fill(Number.NaN);
  const encoder = new TextEncoder();
  let numbers = 0;
  let others = 0;
  let long = -1;
  for (let k = 0; k < levels.length && (numbers > 0 || k < HOPELESS); k++) {
    const text = (levels[k] as string).trim();
    const bytes = encoder.encode(text);
    const value = parseNumber(bytes, 0, bytes.length, mark);
    values[k] = value;
    if (!Number.isNaN(value)) numbers += counts[k] as number;
    else if (text !== '' && missingCode(text) === null) others += counts[k] as number;
    if (long < 0 && losesDigits(bytes, 0, bytes.length, value)) long = k;
  }
  return { values, numbers, others, long };
}

function asNumbers({ name, codes, levels }: Texts, numbers: Float64Array, mark: number): ColumnRead {
  const values = new Float64Array(codes.length).fill(Number.NaN);
  const missing = new Map<string, number>();
  let leadingZero: { row: number; text: string } | null = null;
  for (let row = 0; row < codes.length; row++) {
    const code = codes[row] as number;
    if (code < 0) continue;
    values[row] = numbers[code] as number;
    const text = levels[code] as string;
    const word = Number.isNaN(values[row]) ? missingCode(text.trim()) : null;
    if (word !== null) missing.set(word, (missing.get(word) ?? 0) + 1);
    if (leadingZero === null && /^0\d/.test(text)) leadingZero = { row: row + 1, text };
  }
  const commaAt = mark === COMMA ? levels.findIndex((level) => level.includes(',')) : -1;
  const comma = commaAt < 0 ? null : { row: codes.indexOf(commaAt) + 1, text: levels[commaAt] as string };
  const found = numbers.filter((number) => !Number.isNaN(number));
  const low = found.reduce((a, b) => Math.min(a, b), Infinity);
  const high = found.reduce((a, b) => Math.max(a, b), -Infinity);
  return numberColumn(name, values, { codes: missing, leadingZero, comma, low, high });
}

function asDates({ name, codes, levels }: Texts, counts: Int32Array): ColumnRead | null {
  const isDate = (level: string) => missingCode(level) !== null || isoMoment(level) !== null;
  if (!levels.every(isDate) || levels.every((level) => missingCode(level) !== null)) return null;
  const missing = new Map<string, number>();
  for (const [k, level] of levels.entries()) {
    const word = missingCode(level);
    if (word !== null) missing.set(word, (missing.get(word) ?? 0) + (counts[k] as number));
  }
  const dates = relabel(codes, levels, (level) => (missingCode(level) === null ? level.replace(' ', 'T') : null));
  return { column: { name, type: 'date', ...dates }, warnings: codeWarnings(name, missing) };
}

function numericLook({ name, codes, levels }: Texts, counts: Int32Array, best: Attempt): string[] {
  if (best.numbers > 0 && best.others === 0) {
    return [
      `Column ${name} holds whole numbers too long for a number to keep exactly (first in row ${grouped(codes.indexOf(best.long) + 1)}); it is kept as text.`,
    ];
  }
  if (best.numbers <= best.others) return [];
  const strange: number[] = [];
  for (let k = 0; k < levels.length && strange.length < 3; k++) {
    const text = (levels[k] as string).trim();
    if (Number.isNaN(best.values[k]) && text !== '' && missingCode(text) === null) strange.push(k);
  }
  const said = strange.map((k) => `row ${grouped(codes.indexOf(k) + 1)} holds ${quoted(levels[k] as string)}`);
  const more = best.others - strange.reduce((sum, k) => sum + (counts[k] as number), 0);
  if (more > 0) said.push(`${counted(more, 'other cell')} ${more === 1 ? 'is' : 'are'} no number either`);
  return [`Column ${name} looks numeric but ${listed(said)}; it is kept as text.`];
}
