import { FORMAT, FORMAT_VERSION, type JsonObject } from './format.ts';

/** Version -> what makes a record of that version one of the next. Version 1 is the first. */
export type Migrations = { readonly [version: number]: (record: JsonObject) => JsonObject };

const MIGRATIONS: Migrations = {};

export type Migrated =
  | { readonly ok: true; readonly record: JsonObject }
  | { readonly ok: false; readonly place: string; readonly sentence: string };

/**
 * A record of any earlier version as one of the present version; its parts are not looked at.
 *
 * @param record the outermost object of the file
 * @returns the record, or why it cannot be read
 */
export function migrateRecord(
  record: JsonObject,
  migrations: Migrations = MIGRATIONS,
  target: number = FORMAT_VERSION,
): Migrated {
  const { format, version } = record;
  if (format !== FORMAT) {
    return { ok: false, place: 'format', sentence: `This is not a Standfast worksheet: "format" is not "${FORMAT}".` };
  }
  if (typeof version !== 'number' || !Number.isInteger(version) || version < 1) {
    return { ok: false, place: 'version', sentence: '"version" must be a whole number of 1 or more.' };
  }
  if (version > target) {
    const sentence = `This worksheet has format version ${version}; this program reads versions up to ${target}. Open it with a newer Standfast.`;
    return { ok: false, place: 'version', sentence };
  }
  let current = record;
  for (let from = version; from < target; from++) {
    const step = migrations[from];
    if (step === undefined) throw new RangeError(`*migrations* must lead from every version; got none from ${from}`);
    current = { ...step(current), version: from + 1 };
  }
  return { ok: true, record: current };
}
