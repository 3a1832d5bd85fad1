import type { Json, Settings } from '../../cells/kind.ts';

const known = new WeakMap<Settings, readonly string[]>();

/** Ids of the shared numbers that stand as `{shared: id}` anywhere in the settings, each once, in order of appearance. */
export function sharedIdsIn(settings: Settings): readonly string[] {
  let ids = known.get(settings);
  if (ids === undefined) {
    const found = new Set<string>();
    collect(settings, found);
    ids = [...found];
    known.set(settings, ids);
  }
  return ids;
}

/**
 * The settings with every `{shared: id}` replaced by the number it stands for; parts without one are kept as they are.
 *
 * @param numbers id -> number, null = none; must hold every id of `sharedIdsIn(settings)`
 * @throws RangeError for an id that is not in `numbers`
 */
export function resolveShared(settings: Settings, numbers: ReadonlyMap<string, number | null>): Settings {
  return sharedIdsIn(settings).length === 0 ? settings : (resolve(settings, numbers) as Settings);
}

function sharedIdOf(value: Json): string | null {
  if (value === null || typeof value !== 'object' || Array.isArray(value)) return null;
  const { shared } = value as { readonly shared?: Json };
  return typeof shared === 'string' && Object.keys(value).length === 1 ? shared : null;
}

function collect(value: Json, found: Set<string>): void {
  if (value === null || typeof value !== 'object') return;
  const id = sharedIdOf(value);
  if (id !== null) found.add(id);
  else for (const each of Object.values(value)) collect(each, found);
}

function resolve(value: Json, numbers: ReadonlyMap<string, number | null>): Json {
  if (value === null || typeof value !== 'object') return value;
  const id = sharedIdOf(value);
  if (id !== null) {
    const number = numbers.get(id);
    if (number === undefined) throw new RangeError(`*numbers* must hold every shared number; got none called "${id}"`);
    return number;
  }
  if (Array.isArray(value)) return value.map((each: Json) => resolve(each, numbers));
  return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, resolve(each as Json, numbers)]));
}
