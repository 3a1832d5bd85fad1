import { Fault, inside } from './check-part.ts';
import type { JsonObject, Worksheet } from './format.ts';
import { migrateRecord } from './migrate.ts';
import { checkWorksheet } from './schema.ts';

/** Largest text that is read, in characters, and deepest nesting. */
export const MAX_TEXT = 64 * 1024 * 1024;
export const MAX_DEPTH = 40;

export type Parsed =
  | { readonly ok: true; readonly worksheet: Worksheet }
  /** `place` such as "cells[3].settings.trim", "" for the file as a whole; `sentence` names it too. */
  | { readonly ok: false; readonly place: string; readonly sentence: string };

/** Names that would reach into every object, were they ever used as fields. */
const UNSAFE = new Set(['__proto__', 'constructor', 'prototype']);

/**
 * Reads a saved worksheet. Nothing in it is evaluated; unknown kinds of cells are kept as they are; unknown fields are
 * refused, because saving would silently drop what this version does not understand.
 *
 * @param source the text of a .standfast.json file, at most 64 MiB
 */
export function parseWorksheet(source: string): Parsed {
  if (source.length > MAX_TEXT) return unusable('', `is larger than ${MAX_TEXT / 1024 / 1024} MiB`);
  let value: unknown;
  try {
    value = JSON.parse(source.startsWith('\ufeff') ? source.slice(1) : source);
  } catch (error) {
    return unusable('', `is not JSON${lineOf(error, source)}`);
  }
  try {
    checkPlain(value, '', 0);
    if (typeof value !== 'object' || value === null || Array.isArray(value)) throw new Fault('', 'is not a worksheet');
    const migrated = migrateRecord(value as JsonObject);
    if (!migrated.ok) return migrated;
    checkWorksheet(migrated.record, '');
    return { ok: true, worksheet: migrated.record as unknown as Worksheet };
  } catch (error) {
    if (error instanceof Fault) return unusable(error.place, error.message);
    throw error;
  }
}

function unusable(place: string, what: string): Parsed {
  const sentence = `This file cannot be opened as a worksheet: ${place === '' ? 'it' : place} ${what}.`;
  return { ok: false, place, sentence };
}

/** Depth, names and numbers of everything, also of the parts whose shape is a kind's own. */
function checkPlain(value: unknown, place: string, depth: number): void {
  if (typeof value === 'number' && !Number.isFinite(value)) throw new Fault(place, 'is not a finite number');
  if (typeof value !== 'object' || value === null) return;
  if (depth >= MAX_DEPTH) throw new Fault(place, `is nested more than ${MAX_DEPTH} deep`);
  if (Array.isArray(value)) {
    for (let i = 0; i < value.length; i++) {
      const each: unknown = value[i];
      if (typeof each === 'object' || typeof each === 'number') checkPlain(each, `${place}[${i}]`, depth + 1);
    }
    return;
  }
  for (const [key, each] of Object.entries(value)) {
    const at = inside(place, key);
    if (UNSAFE.has(key)) throw new Fault(at, 'is not allowed as a name');
    if (key.length > 10_000) throw new Fault(at, 'is a name of more than 10000 characters');
    checkPlain(each, at, depth + 1);
  }
}

/** Where the engine's message says at which character the text goes wrong. */
function lineOf(error: unknown, source: string): string {
  const at = /position (\d+)/.exec(error instanceof Error ? error.message : '')?.[1];
  if (at === undefined) return '';
  return ` (line ${source.slice(0, Number(at)).split('\n').length})`;
}
