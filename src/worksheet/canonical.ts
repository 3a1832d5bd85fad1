/**
 * Plain data as canonical JSON text: no spaces, fields sorted by their UTF-16 code units, numbers in the shortest form
 * that reads back the same.
 *
 * @param value null, booleans, finite numbers, well-formed strings, arrays and plain objects of these
 * @returns the text whose UTF-8 bytes a digest is taken over
 * @throws TypeError for anything else, naming the place
 * @source RFC 8785 (Rundgren, Jordan & Erdtman 2020), sections 3.2.2 and 3.2.3: numbers and strings as ECMAScript writes
 *   them, property names sorted by code unit
 * @checked the examples of RFC 8785 sections 3.2.2, 3.2.3 and appendix B, exactly
 */
export function canonicalJson(value: unknown): string {
  return write(value, '');
}

function write(value: unknown, place: string): string {
  if (value === null || typeof value === 'boolean') return String(value);
  if (typeof value === 'number') {
    if (!Number.isFinite(value)) throw refused(place, String(value));
    return JSON.stringify(value);
  }
  if (typeof value === 'string') return writeText(value, place);
  if (Array.isArray(value)) return `[${value.map((each: unknown, i) => write(each, `${place}[${i}]`)).join(',')}]`;
  const prototype: unknown = typeof value === 'object' ? Object.getPrototypeOf(value) : undefined;
  if (prototype !== Object.prototype && prototype !== null) throw refused(place, `a ${typeof value}`);
  const fields = value as { readonly [key: string]: unknown };
  // The default order of sort() is by UTF-16 code units.
  const keys = Object.keys(fields).sort();
  return `{${keys.map((key) => `${writeText(key, place)}:${write(fields[key], `${place}.${key}`)}`).join(',')}}`;
}

const LONE_SURROGATE = /[\ud800-\udbff](?![\udc00-\udfff])|(?<![\ud800-\udbff])[\udc00-\udfff]/;

function writeText(text: string, place: string): string {
  if (LONE_SURROGATE.test(text)) throw refused(place, 'text with half a character');
  return JSON.stringify(text);
}

function refused(place: string, got: string): TypeError {
  return new TypeError(`*value${place}* must be plain JSON data; got ${got}`);
}
