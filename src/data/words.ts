/**
 * A count with its noun: "1 row", "2,120 rows".
 *
 * @param n whole number, 0 or more
 * @param one the noun in the singular
 * @param many the plural where it is not the singular with an s
 * @returns the count with a comma at each thousand, and the noun
 */
export function counted(n: number, one: string, many = `${one}s`): string {
  return `${grouped(n)} ${n === 1 ? one : many}`;
}

/**
 * A number as sentences write it: a comma at each thousand, a real minus sign.
 *
 * @param value any finite number
 * @returns its shortest form, the whole part grouped by thousands
 */
export function grouped(value: number): string {
  const text = String(Math.abs(value));
  const [whole = '', ...rest] = text.split('.');
  const marked = /^\d+$/.test(whole) ? whole.replace(/\B(?=(\d{3})+$)/g, ',') : whole;
  return (value < 0 ? '\u2212' : '') + [marked, ...rest].join('.');
}

/**
 * A value from a file inside quotation marks, on one line and cut at 40 characters.
 *
 * @param text the value
 * @returns the quoted text
 */
export function quoted(text: string): string {
  const line = text.replace(/[\p{Cc}\u2028\u2029]+/gu, ' ');
  const marks = [...line];
  return `"${marks.length > 40 ? `${marks.slice(0, 39).join('')}\u2026` : line}"`;
}

/**
 * A list as a sentence writes it: "a", "a and b", "a, b and 4 more".
 *
 * @param items what to list
 * @param most how many are written out, 1 or more
 * @returns the list
 */
export function listed(items: readonly string[], most = 5): string {
  if (items.length > most + 1) return `${items.slice(0, most).join(', ')} and ${grouped(items.length - most)} more`;
  if (items.length < 2) return items.join('');
  return `${items.slice(0, -1).join(', ')} and ${items[items.length - 1]}`;
}
