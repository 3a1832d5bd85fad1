/** Whole cells that stand for a missing value where the rest of the column is numbers or dates; letter case is free. */
export const MISSING_CODES: readonly string[] = ['NA', 'N/A', 'NaN', 'null', '.'];

const LOOKUP = new Map(MISSING_CODES.map((code) => [code.toLowerCase(), code]));

/**
 * The missing code a cell holds.
 *
 * @param text a whole cell
 * @returns the code as MISSING_CODES writes it, or null
 */
export function missingCode(text: string): string | null {
  return text.length > 4 ? null : (LOOKUP.get(text.toLowerCase()) ?? null);
}

/** A number that may stand for a missing value. */
export interface SuspiciousCode {
  readonly value: number;
  readonly count: number;
  /** Row of its first appearance, counted from 1. */
  readonly row: number;
  /** Range of the other values. */
  readonly low: number;
  readonly high: number;
}

/** Numbers in use as codes for "missing", "refused" or "not asked": common practice. */
const USUAL = [
  0, 9, 88, 99, 888, 999, 8888, 9999, 88888, 99999, 999999, -1, -9, -88, -99, -888, -999, -8888, -9999, -99999,
];

/**
 * Finds numbers of the kind used as missing codes that lie beyond the rest by more than half the range of the rest.
 * They are only pointed out: a guess would change the data.
 *
 * @param values one double a row, NaN = missing
 * @param range their lowest and highest value, so that most columns need not be looked through
 * @returns each such number, in the order found
 * @source numbers in use as codes, and the half range: common practice
 */
export function suspiciousCodes(values: Float64Array, range: { low: number; high: number }): SuspiciousCode[] {
  const found: SuspiciousCode[] = [];
  const judged = new Set<number>();
  let all = range;
  for (;;) {
    const code = [all.low, all.high].find((end) => USUAL.includes(end) && !judged.has(end));
    if (code === undefined) return found;
    judged.add(code);
    const left = found.map((each) => each.value);
    const rest = rangeWithout(values, left, code);
    const reach = (rest.high - rest.low) / 2;
    if (rest.count < 3 || !(reach > 0)) continue;
    if (code >= rest.low - reach && code <= rest.high + reach) continue;
    found.push({ value: code, ...occurrences(values, code), low: rest.low, high: rest.high });
    all = rest;
    // Without this one, a code judged before may turn out to be far from the rest.
    judged.clear();
  }
}

function rangeWithout(
  values: Float64Array,
  left: readonly number[],
  code: number,
): { low: number; high: number; count: number } {
  let low = Infinity;
  let high = -Infinity;
  let count = 0;
  for (let row = 0; row < values.length; row++) {
    const value = values[row] as number;
    if (value === code || Number.isNaN(value) || (left.length > 0 && left.includes(value))) continue;
    if (value < low) low = value;
    if (value > high) high = value;
    count++;
  }
  return { low, high, count };
}

function occurrences(values: Float64Array, code: number): { count: number; row: number } {
  let count = 0;
  for (const value of values) if (value === code) count++;
  return { count, row: values.indexOf(code) + 1 };
}
