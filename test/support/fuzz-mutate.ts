import type { Rng } from '../../src/numerics/rng.ts';

/** Texts that would do harm wherever text became markup, a program, a field of every object, or a number. */
export const HOSTILE_TEXTS: readonly string[] = [
  '<img src=x onerror="globalThis.planted=1">',
  '</script><script>globalThis.planted=1</script>',
  // biome-ignore lint/suspicious/noTemplateCurlyInString: the text itself is the test
  '${globalThis.planted=1}',
  'javascript:globalThis.planted=1',
  '(() => { globalThis.planted = 1 })()',
  '__proto__',
  'constructor',
  'toString',
  'hasOwnProperty',
  '"; globalThis.planted = 1; "',
  '',
  ' ',
  '\u202egnol',
  '\ud800',
  '\u0000',
  '1e999',
  'NaN',
  'x'.repeat(5000),
];

const NUMBERS: readonly number[] = [
  0,
  -0,
  1,
  -1,
  0.5,
  2,
  3,
  99,
  100,
  101,
  1e6,
  1e9,
  2 ** 31,
  2 ** 53,
  1e15,
  1e154,
  1e308,
  -1e308,
  5e-324,
  1e-300,
  -0.5,
  25,
];

export type Loose = { [key: string]: unknown } | unknown[];

interface Spot {
  readonly holder: Loose;
  readonly key: string;
}

export function pick<T>(random: Rng, items: readonly T[]): T {
  return items[random.below(items.length)] as T;
}

function isLoose(value: unknown): value is Loose {
  return typeof value === 'object' && value !== null;
}

function at(spot: Spot): unknown {
  return (spot.holder as { [key: string]: unknown })[spot.key];
}

function put(spot: Spot, value: unknown): void {
  // defined, not assigned: a mutated key must never reach the prototype of the test's own object
  Object.defineProperty(spot.holder, spot.key, { value, enumerable: true, writable: true, configurable: true });
}

function remove(spot: Spot): void {
  if (Array.isArray(spot.holder)) spot.holder.splice(Number(spot.key), 1);
  else delete spot.holder[spot.key];
}

/** Any place below a part, deep ones as likely as shallow ones. */
function anySpot(random: Rng, root: Loose): Spot | null {
  let holder = root;
  for (;;) {
    const keys = Object.keys(holder);
    if (keys.length === 0) return null;
    const spot = { holder, key: pick(random, keys) };
    const value = at(spot);
    if (!isLoose(value) || Object.keys(value).length === 0 || random.below(3) === 0) return spot;
    holder = value;
  }
}

function rubbish(random: Rng): unknown {
  switch (random.below(7)) {
    case 0:
      return pick(random, [
        null,
        true,
        false,
        [],
        {},
        [[]],
        [null],
        { shared: 'trim' },
        { shared: 'gone' },
        { shared: 3 },
      ]);
    case 1:
      return Array.from({ length: random.below(4) }, () => pick(random, HOSTILE_TEXTS));
    case 2:
      return { [pick(random, ['a', 'value', 'shared', 'length'])]: pick(random, NUMBERS) };
    case 3:
    case 4:
      return pick(random, HOSTILE_TEXTS);
    default:
      return pick(random, NUMBERS);
  }
}

/** Every text that stands somewhere below a part: levels, columns, estimators, ids. */
function textsBelow(part: unknown, found: string[] = []): string[] {
  if (typeof part === 'string') found.push(part);
  else if (isLoose(part)) for (const each of Object.values(part)) textsBelow(each, found);
  return found;
}

interface LooseCell {
  id: string;
  from: Loose;
  settings: Loose;
}

interface LooseWorksheet {
  cells: LooseCell[];
  data: { columns: { values?: unknown[]; codes?: unknown[]; levels?: unknown[] }[] }[];
  shared: unknown[];
  opening: unknown;
}

type Mutation = (random: Rng, whole: LooseWorksheet) => void;

const inSettings: Mutation = (random, { cells }) => {
  const { settings } = pick(random, cells);
  const spot = anySpot(random, settings);
  if (spot === null) return;
  if (random.below(8) === 0) remove(spot);
  else put(spot, random.below(3) === 0 ? pick(random, textsBelow(cells)) : rubbish(random));
};

const rewired: Mutation = (random, { cells }) => {
  const spot = anySpot(random, pick(random, cells).from);
  if (spot !== null) put(spot, pick(random, cells).id);
};

const inColumns: Mutation = (random, { data }) => {
  const block = pick(random, data);
  if (block === undefined) return;
  const { values, codes, levels } = pick(random, block.columns);
  const odd = pick(random, [...NUMBERS, null]);
  if (values !== undefined) {
    const every = random.below(3) === 0;
    for (let row = 0; row < values.length; row++) if (every || random.below(10) === 0) values[row] = odd;
  } else if (levels !== undefined && random.below(2) === 0) {
    levels[random.below(levels.length)] = pick(random, HOSTILE_TEXTS);
  } else if (codes !== undefined) {
    for (let row = 0; row < codes.length; row++) if (random.below(5) === 0) codes[row] = random.below(3) - 1;
  }
};

const moved: Mutation = (random, { cells }) => {
  const from = random.below(cells.length);
  const [gone] = cells.splice(from, 1);
  if (gone !== undefined && random.below(2) === 0) cells.splice(random.below(cells.length + 1), 0, gone);
  if (cells.length > 0 && random.below(3) === 0) {
    cells.push({ ...structuredClone(pick(random, cells)), id: pick(random, ['z1', ...HOSTILE_TEXTS]) });
  }
};

const anywhere: Mutation = (random, whole) => {
  const spot = anySpot(random, whole as unknown as Loose);
  if (spot === null) return;
  if (random.below(4) === 0) remove(spot);
  else put(spot, rubbish(random));
};

const hidden: Mutation = (_random, whole) => {
  whole.opening = { state: 'blind' };
};

/** A text that stands in several places is another text in all of them: what is hostile then gets far. */
function renamed(random: Rng, json: string): string {
  const old = pick(random, [
    'thin',
    'glove',
    'seconds',
    'who',
    'load_tone',
    'slow',
    'c6',
    'note',
    'trim',
    'w3',
    'alert',
  ]);
  return json.replaceAll(JSON.stringify(old), JSON.stringify(pick(random, HOSTILE_TEXTS)));
}

function letters(random: Rng, json: string): string {
  const place = random.below(json.length);
  const put = pick(random, ['', '"', '{', '}', ',', '0', '9', 'e', '-', '\\', '\u0000', '\ufeff', '__proto__']);
  return json.slice(0, place) + put + json.slice(place + random.below(3));
}

const MUTATIONS: readonly Mutation[] = [
  inSettings,
  inSettings,
  inSettings,
  inSettings,
  rewired,
  inColumns,
  inColumns,
  moved,
  anywhere,
  anywhere,
  hidden,
];

/** The text of a worksheet file with one to three things wrong or odd about it. */
export function mutated(random: Rng, worksheet: unknown): string {
  const whole = structuredClone(worksheet) as LooseWorksheet;
  const count = 1 + random.below(3);
  for (let i = 0; i < count; i++) {
    // an earlier mutation may have taken away what a later one looks for
    if (Array.isArray(whole.cells) && whole.cells.length > 0) tryTo(() => pick(random, MUTATIONS)(random, whole));
  }
  let json = JSON.stringify(whole);
  if (random.below(5) === 0) json = renamed(random, json);
  if (random.below(20) === 0) json = letters(random, json);
  return json;
}

function tryTo(act: () => void): void {
  try {
    act();
  } catch (error) {
    if (!(error instanceof TypeError)) throw error;
  }
}
