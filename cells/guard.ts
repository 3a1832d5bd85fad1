import type { Context, Json, Kind, Registry, Settings } from './kind.ts';

const EMPTY: Context = { shared: [], given: {}, data: [] };

function isShared(value: Json): boolean {
  return typeof value === 'object' && value !== null && 'shared' in value && typeof value.shared === 'string';
}

function isList(value: Json): boolean {
  return Array.isArray(value) && value.every((each) => typeof each === 'string');
}

/** Numbers that every kind has for itself: they are never shared, and never none. */
const OWN_NUMBERS = new Set(['alpha', 'resamples', 'relabellings', 'runs']);

/** Whether a value can stand where a kind's own settings hold `usual`; null stands for a number or text not given. */
function stands(usual: Json, value: Json): boolean {
  if (Array.isArray(usual)) return isList(value);
  if (usual === null)
    return value === null || ['number', 'string'].includes(typeof value) || isShared(value) || isList(value);
  if (typeof usual === 'number') return value === null || typeof value === 'number' || isShared(value);
  return typeof value === typeof usual;
}

/** Whether every part of settings that the kind's own have too is of its type. */
export function settingsFit(own: Settings, settings: Settings): boolean {
  return Object.entries(own).every(([key, usual]) => {
    const value = settings[key];
    if (OWN_NUMBERS.has(key) && value !== undefined && typeof value !== 'number') return false;
    return value === undefined || stands(usual, value);
  });
}

/**
 * The kind with its words kept from settings it cannot read. A part that a file leaves out is the kind's own, and stands
 * in the sentence as such; a part of another type spoils its own cell, which says so, and never the page.
 */
export function guarded(kind: Kind): Kind {
  let known: Settings | null = null;
  const own = (): Settings => {
    known ??= kind.defaults(EMPTY);
    return known;
  };
  const fits = (settings: Settings): boolean => settingsFit(own(), settings);
  const whole = (settings: Settings): Settings => {
    const missing = Object.keys(own()).some((key) => settings[key] === undefined);
    return missing ? { ...own(), ...settings } : settings;
  };
  const wrong = `The settings of this ${kind.name} cell cannot be read: a part of them is of another type. Remove the cell, or correct the file.`;
  return {
    ...kind,
    title: (settings) => (fits(settings) ? kind.title(whole(settings)) : kind.name),
    check: (settings, context) => (fits(settings) ? kind.check(whole(settings), context) : [wrong]),
    sentence: (settings, context) =>
      fits(settings) ? kind.sentence(whole(settings), context) : ['Settings that cannot be read.'],
    compute: (settings, given, env) => kind.compute(whole(settings), given, env),
  };
}

/** Every kind of a registry guarded, under its name. */
export function guardAll<R extends Registry>(kinds: R): { readonly [K in keyof R]: Kind } {
  const entries = Object.entries(kinds).map(([name, kind]) => [name, guarded(kind)]);
  return Object.fromEntries(entries) as { readonly [K in keyof R]: Kind };
}
