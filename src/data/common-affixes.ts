const SEPARATORS = /[\s_.\-:/]/;

/** Names with what they share at either end taken off. */
export interface Affixes {
  readonly prefix: string;
  readonly suffix: string;
  /** What is left of each name, without separators at its ends. */
  readonly middles: readonly string[];
}

/**
 * Takes off what names share at their beginning and end, cutting only between words, so that "load_tone" and
 * "load_total" leave "tone" and "total".
 *
 * @param names column names
 * @returns prefix, suffix and what is left; where anything would be left empty nothing is taken off
 */
export function commonAffixes(names: readonly string[]): Affixes {
  const none = { prefix: '', suffix: '', middles: [...names] };
  const [first = '', ...others] = names;
  if (others.length === 0) return none;
  let ahead = 0;
  while (ahead < first.length && others.every((name) => name[ahead] === first[ahead])) ahead++;
  while (ahead > 0 && !names.every((name) => isBoundary(name, ahead))) ahead--;
  const shortest = Math.min(...names.map((name) => name.length)) - ahead;
  let behind = 0;
  while (behind < shortest && others.every((name) => name.at(-1 - behind) === first.at(-1 - behind))) behind++;
  while (behind > 0 && !names.every((name) => isBoundary(name, name.length - behind))) behind--;
  const middles = names.map((name) => trimmed(name.slice(ahead, name.length - behind)));
  if (middles.includes('') || new Set(middles).size < middles.length) return none;
  return { prefix: first.slice(0, ahead), suffix: first.slice(first.length - behind), middles };
}

/** Whether a word ends before position i: at a separator, a capital after a small letter, or between letter and digit. */
function isBoundary(name: string, i: number): boolean {
  if (i <= 0 || i >= name.length) return true;
  const [before, after] = [name[i - 1] as string, name[i] as string];
  if (SEPARATORS.test(before) || SEPARATORS.test(after)) return true;
  if (/\p{Ll}/u.test(before) && /\p{Lu}/u.test(after)) return true;
  return (/\p{L}/u.test(before) && /\d/.test(after)) || (/\d/.test(before) && /\p{L}/u.test(after));
}

/**
 * A name without separators at its ends.
 *
 * @param name any text
 * @returns what is left
 */
export function trimmed(name: string): string {
  return name.replace(/^[\s_.\-:/]+|[\s_.\-:/]+$/g, '');
}
