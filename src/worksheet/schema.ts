import {
  anyObject,
  anything,
  boolean,
  type Check,
  Fault,
  fieldsOf,
  list,
  nameOf,
  number,
  object,
  oneOf,
  orNull,
  table,
  text,
  textLike,
  wholeNumber,
} from './check-part.ts';
import { FORMAT, FORMAT_VERSION } from './format.ts';

/** The most a worksheet may hold. */
export const BOUNDS = {
  cells: 2_000,
  shared: 200,
  dataBlocks: 50,
  columns: 16_384,
  rows: 5_000_000,
  levels: 5_000_000,
  warnings: 10_000,
  logEntries: 100_000,
  nameLength: 10_000,
  textLength: 1_000_000,
} as const;

const reference = textLike(/^[^\p{Cc}]{1,200}$/u, 'an id of 1 to 200 characters');
// The page finds its parts by selectors such as [data-cell="c1"].
const idText = textLike(/^[^\p{Cc}"\\]{1,200}$/u, 'an id of 1 to 200 characters without quotation marks');

/** What results and settings are looked up by: never a name that every object has of itself. */
const id: Check = (value, place) => {
  idText(value, place);
  apart(value as string, place);
};

const kindName: Check = (value, place) => {
  text(200, 1)(value, place);
  apart(value as string, place);
};

function apart(key: string, place: string): void {
  if (key in Object.prototype || key === 'prototype') throw new Fault(place, `must not be ${nameOf(key)}`);
}

const name = text(BOUNDS.nameLength);
const hash = textLike(/^[0-9a-f]{64}$/, '64 hexadecimal digits');
const when = textLike(
  /^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d{1,9})?)?(Z|[+-]\d{2}:\d{2})$/,
  'a time such as 2026-03-01T09:30:00Z',
);

const shared = object({
  id,
  name,
  value: orNull(number),
  unit: text(200),
  min: number,
  max: number,
  step: number,
  none: boolean,
});

const cell = object(
  { id, kind: kindName, version: wholeNumber(1, 1_000_000), settings: anyObject, from: table(100, reference) },
  { leftOut: boolean },
);

const opening: Check = (value, place) => {
  const { state } = fieldsOf(value, place);
  oneOf('blind', 'opened-early', 'sealed')(state, `${place}.state`);
  if (state === 'blind') object({ state: anything })(value, place);
  else if (state === 'sealed') object({ state: anything, hash, when })(value, place);
  else object({ state: anything, reason: text(BOUNDS.textLength), when })(value, place);
};

const logEntry = object(
  {
    when,
    who: name,
    what: text(BOUNDS.textLength),
    opening: oneOf('blind', 'opened-early', 'sealed'),
    before: hash,
    hash,
  },
  { reason: text(BOUNDS.textLength) },
);

const column: Check = (value, place) => {
  const { type } = fieldsOf(value, place);
  oneOf('number', 'text', 'date')(type, `${place}.type`);
  if (type === 'number') object({ name, type: anything, values: list(BOUNDS.rows, orNull(number)) })(value, place);
  else levelColumn(value, place);
};

const levelColumn: Check = (value, place) => {
  object({
    name,
    type: anything,
    levels: list(BOUNDS.levels, text(BOUNDS.textLength)),
    codes: list(BOUNDS.rows, anything),
  })(value, place);
  const { levels, codes } = value as { levels: readonly string[]; codes: readonly unknown[] };
  if (new Set(levels).size !== levels.length) throw new Fault(`${place}.levels`, 'has the same level twice');
  const code = wholeNumber(-1, levels.length - 1);
  for (let i = 0; i < codes.length; i++) code(codes[i], `${place}.codes[${i}]`);
};

/** Checks a data block, so that what is read from a data file is never more than a worksheet may hold. */
export const checkDataBlock: Check = (value, place) => {
  object({
    id,
    name,
    rows: wholeNumber(0, BOUNDS.rows),
    columns: list(BOUNDS.columns, column),
    fingerprint: object({ bytes: hash, table: hash }),
    warnings: list(BOUNDS.warnings, text(BOUNDS.textLength)),
  })(value, place);
  const { rows, columns } = value as { rows: number; columns: readonly { values?: unknown[]; codes?: unknown[] }[] };
  for (const [i, { values, codes }] of columns.entries()) {
    const length = (values ?? codes ?? []).length;
    if (length !== rows) throw new Fault(`${place}.columns[${i}]`, `has ${length} values; the table has ${rows} rows`);
  }
  distinct('name', columns, `${place}.columns`);
};

const result: Check = (value, place) => {
  object({ status: oneOf('value', 'failed', 'veiled', 'left-out'), value: anything })(value, place);
};

const held = object({
  when,
  label: text(BOUNDS.textLength),
  shared: table(BOUNDS.shared, orNull(number)),
  finding: orNull(anyObject),
});

const parts = object({
  format: oneOf(FORMAT),
  version: oneOf(FORMAT_VERSION),
  id,
  title: name,
  shared: list(BOUNDS.shared, shared),
  cells: list(BOUNDS.cells, cell),
  data: list(BOUNDS.dataBlocks, checkDataBlock),
  opening,
  log: list(BOUNDS.logEntries, logEntry),
  reference: orNull(held),
  seed: wholeNumber(0, 0xffffffff),
  program: object({ name: oneOf('standfast'), version: text(200) }),
  results: table(2 * BOUNDS.cells, result),
});

/**
 * Checks that a value is a worksheet of the present version.
 *
 * @throws Fault with the place of the first thing that is wrong
 */
export const checkWorksheet: Check = (value, place) => {
  parts(value, place);
  const worksheet = value as { cells: readonly object[]; shared: readonly object[]; data: readonly object[] };
  distinct('id', worksheet.cells, 'cells');
  distinct('id', worksheet.shared, 'shared');
  distinct('id', worksheet.data, 'data');
};

function distinct(key: string, items: readonly object[], place: string): void {
  const seen = new Map<unknown, number>();
  for (const [i, item] of items.entries()) {
    const value = (item as { readonly [key: string]: unknown })[key];
    const before = seen.get(value);
    if (before !== undefined)
      throw new Fault(`${place}[${i}].${key}`, `is ${nameOf(value)}, as in ${place}[${before}]`);
    seen.set(value, i);
  }
}
