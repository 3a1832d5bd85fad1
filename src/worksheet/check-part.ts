/** How the parts of a record are checked: each check throws a `Fault` with its place, and parse makes a sentence of it. */
export class Fault extends Error {
  readonly place: string;

  constructor(place: string, message: string) {
    super(message);
    this.place = place;
  }
}

export type Check = (value: unknown, place: string) => void;

type Fields = { readonly [key: string]: unknown };

/** An object with exactly these fields. */
export function object(
  required: { readonly [key: string]: Check },
  optional: { readonly [key: string]: Check } = {},
): Check {
  return (value, place) => {
    const fields = fieldsOf(value, place);
    for (const key of Object.keys(fields)) {
      const check = own(required, key) ?? own(optional, key);
      if (check === undefined) throw new Fault(inside(place, key), 'is not a field this version of Standfast knows');
      check(fields[key], inside(place, key));
    }
    for (const key of Object.keys(required)) {
      if (!Object.hasOwn(fields, key)) throw new Fault(inside(place, key), 'is missing');
    }
  };
}

/** An object with any names and values that pass. */
export function table(most: number, each: Check): Check {
  return (value, place) => {
    const entries = Object.entries(fieldsOf(value, place));
    if (entries.length > most) throw new Fault(place, `has ${entries.length} entries; at most ${most} are allowed`);
    for (const [key, part] of entries) each(part, inside(place, key));
  };
}

export function list(most: number, each: Check): Check {
  return (value, place) => {
    if (!Array.isArray(value)) throw new Fault(place, `must be a list; it is ${nameOf(value)}`);
    if (value.length > most) throw new Fault(place, `has ${value.length} entries; at most ${most} are allowed`);
    for (let i = 0; i < value.length; i++) each(value[i], `${place}[${i}]`);
  };
}

export function text(most: number, least = 0): Check {
  return (value, place) => {
    if (typeof value !== 'string') throw new Fault(place, `must be text; it is ${nameOf(value)}`);
    if (value.length > most) throw new Fault(place, `has ${value.length} characters; at most ${most} are allowed`);
    if (value.length < least) throw new Fault(place, 'is empty');
  };
}

/** Text of a certain look; `look` completes "must be ...". */
export function textLike(pattern: RegExp, look: string): Check {
  return (value, place) => {
    if (typeof value !== 'string' || !pattern.test(value))
      throw new Fault(place, `must be ${look}; it is ${nameOf(value)}`);
  };
}

export function oneOf(...values: readonly (string | number | boolean)[]): Check {
  return (value, place) => {
    if (values.some((each) => each === value)) return;
    throw new Fault(
      place,
      `must be ${values.map((each) => JSON.stringify(each)).join(' or ')}; it is ${nameOf(value)}`,
    );
  };
}

export function wholeNumber(least: number, most: number): Check {
  return (value, place) => {
    if (Number.isInteger(value) && (value as number) >= least && (value as number) <= most) return;
    throw new Fault(place, `must be a whole number from ${least} to ${most}; it is ${nameOf(value)}`);
  };
}

export const number: Check = (value, place) => {
  // 1e999 is valid JSON, and reads as Infinity.
  if (typeof value !== 'number' || !Number.isFinite(value))
    throw new Fault(place, `must be a number; it is ${nameOf(value)}`);
};

export const boolean: Check = (value, place) => {
  if (typeof value !== 'boolean') throw new Fault(place, `must be true or false; it is ${nameOf(value)}`);
};

export function orNull(check: Check): Check {
  return (value, place) => {
    if (value !== null) check(value, place);
  };
}

/** Any plain data. */
export const anything: Check = () => undefined;

/** Any object of plain data. */
export const anyObject: Check = (value, place) => void fieldsOf(value, place);

export function fieldsOf(value: unknown, place: string): Fields {
  if (typeof value === 'object' && value !== null && !Array.isArray(value)) return value as Fields;
  throw new Fault(place, `must be an object; it is ${nameOf(value)}`);
}

/** A value in a sentence, short. */
export function nameOf(value: unknown): string {
  if (value === undefined) return 'missing';
  if (Array.isArray(value)) return 'a list';
  if (typeof value === 'object' && value !== null) return 'an object';
  const shown = typeof value === 'string' ? JSON.stringify(value) : String(value);
  return shown.length > 60 ? `${shown.slice(0, 60)}...` : shown;
}

export function inside(place: string, key: string): string {
  const shown = key.length > 60 ? `${key.slice(0, 60)}...` : key;
  if (!/^[A-Za-z_][\w-]*$/.test(shown)) return `${place}[${JSON.stringify(shown)}]`;
  return place === '' ? shown : `${place}.${shown}`;
}

function own(checks: { readonly [key: string]: Check }, key: string): Check | undefined {
  return Object.hasOwn(checks, key) ? checks[key] : undefined;
}
