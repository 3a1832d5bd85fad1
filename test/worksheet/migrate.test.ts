import { describe, expect, test } from 'vitest';
import type { JsonObject } from '../../src/worksheet/format.ts';
import { migrateRecord } from '../../src/worksheet/migrate.ts';

const record = (version: unknown): JsonObject => ({ format: 'standfast-worksheet', version, title: 'a' }) as JsonObject;

const steps = {
  1: (old: JsonObject) => ({ ...old, heading: old.title ?? null }),
  2: (old: JsonObject) => ({ ...old, heading: `${old.heading}!` }),
};

describe('migrateRecord', () => {
  test('by hand: the present version is left as it is', () => {
    expect(migrateRecord(record(1))).toEqual({ ok: true, record: record(1) });
  });

  test('by hand: every step from the version of the file to the present one, in order', () => {
    expect(migrateRecord(record(1), steps, 3)).toMatchObject({ ok: true, record: { version: 3, heading: 'a!' } });
    expect(migrateRecord({ ...record(2), heading: 'b' }, steps, 3)).toMatchObject({
      ok: true,
      record: { heading: 'b!' },
    });
  });

  test('refuses: a newer version, saying to use a newer program', () => {
    const sentence =
      'This worksheet has format version 2; this program reads versions up to 1. Open it with a newer Standfast.';
    expect(migrateRecord(record(2))).toEqual({ ok: false, place: 'version', sentence });
  });

  test.each([0, 1.5, '1', null, undefined])('refuses: version %s', (version) => {
    expect(migrateRecord(record(version))).toMatchObject({ ok: false, place: 'version' });
  });

  test('refuses: another format', () => {
    expect(migrateRecord({ ...record(1), format: 'something' })).toMatchObject({ ok: false, place: 'format' });
  });

  test('refuses: a table of steps with a gap', () => {
    expect(() => migrateRecord(record(1), {}, 2)).toThrow('*migrations*');
  });
});
