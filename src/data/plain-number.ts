import { DOT } from './import/bytes.ts';
import { losesDigits, parseNumber } from './import/parse-number.ts';

/**
 * A text as one plain decimal number, read as a data file's cells are.
 *
 * @param text any text; spaces around it do not matter
 * @returns the number, or null where the text is none or has more digits than a number holds
 */
export function plainNumber(text: string): number | null {
  const bytes = new TextEncoder().encode(text.trim());
  const value = parseNumber(bytes, 0, bytes.length, DOT);
  return Number.isNaN(value) || losesDigits(bytes, 0, bytes.length, value) ? null : value;
}
