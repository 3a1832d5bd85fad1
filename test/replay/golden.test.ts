import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { main } from '../../src/replay/replay.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { pageWithWorksheet } from '../../src/worksheet/html.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';

// A file of every format version stays here as it was written, and has to be read for ever. This one holds every field
// of version 1, optional ones, too; its cells are of kinds whose records are settled. Data: demo-data/hearing-words.csv
// with a date and a text column more.
const golden = 'test/golden/format-1.standfast.json';
const text = readFileSync(golden, 'utf8');

const folder = mkdtempSync(join(tmpdir(), 'standfast-golden-'));
afterAll(() => rmSync(folder, { recursive: true }));

let said = '';
beforeEach(() => {
  said = '';
  vi.spyOn(process.stdout, 'write').mockImplementation((each) => {
    said += String(each);
    return true;
  });
});
afterEach(() => vi.restoreAllMocks());

function parsed(source = text): Worksheet {
  const read = parseWorksheet(source);
  if (!read.ok) throw new Error(read.sentence);
  return read.worksheet;
}

/** Replays a file with this text, as JSON or inside a page. */
async function replayed(json: string, ending: 'json' | 'html'): Promise<number> {
  const path = join(folder, `changed.standfast.${ending}`);
  writeFileSync(path, ending === 'json' ? json : pageWithWorksheet('<!doctype html><body></body>', '', json));
  return main([path]);
}

function changed(from: string, to: string): string {
  const out = text.replace(from, to);
  if (out === text) throw new Error(`there is no ${from} in the file`);
  return out;
}

describe('the golden file of format version 1', () => {
  test('invariance: it is read, and written back byte for byte', () => {
    expect(writeWorksheet(parsed())).toBe(text);
  });

  test('by hand: its optional fields are there, and the other openings are read in it', () => {
    const { cells, log, reference, shared, data } = parsed();
    expect(cells.filter((cell) => cell.leftOut === true)).toHaveLength(1);
    expect(log.map((entry) => entry.reason !== undefined)).toEqual([true, false]);
    expect(reference?.finding).toEqual({ estimate: 1.5, interval: [0.25, 2.75], reason: null });
    expect(shared.map(({ value }) => value)).toEqual([2.5, null]);
    expect(new Set(data[0]?.columns.map(({ type }) => type))).toEqual(new Set(['number', 'text', 'date']));
    const openings = [{ state: 'blind' }, { state: 'sealed', hash: 'ab'.repeat(32), when: '2026-03-02T09:00:00Z' }];
    for (const opening of openings) {
      expect(parsed(JSON.stringify({ ...parsed(), opening })).opening).toEqual(opening);
    }
  });

  test.each(['json', 'html'] as const)('by hand: everything comes out again, exit 0, as %s', async (ending) => {
    expect(await replayed(text, ending)).toBe(0);
    expect(said).toContain('Everything came out again: 8 cells, ');
    expect(said).toContain(
      `The decision log is whole (2 entries, the last ${parsed().log[1]?.hash}), and the data are`,
    );
  });

  test.each(['json', 'html'] as const)('refuses: one value of the data changed, exit 4, as %s', async (ending) => {
    const { data } = parsed();
    const levels = '"levels": ["2026-01-12", "2026-01-13"]';
    expect(data[0]?.name).toBe('hearing-words.csv');
    expect(await replayed(changed(levels, '"levels": ["2026-01-12", "2026-01-14"]'), ending)).toBe(4);
    expect(said).toMatch(
      /BROKEN {2}The data of hearing-words\.csv are not those that were read: their fingerprint is /,
    );
  });

  test.each(['json', 'html'] as const)('refuses: one recorded number changed, exit 3, as %s', async (ending) => {
    expect(await replayed(changed('"kept": 24', '"kept": 23'), ending)).toBe(3);
    expect(said).toMatch(/DIFFERS {2}c6 \(exclusion\): .*\n.*kept: recorded 23, recomputed 24/);
  });

  test('refuses: one entry of the log changed, exit 4', async () => {
    expect(await replayed(changed('"what": "cutoff none', '"what": "cutoff 3 MAD'), 'json')).toBe(4);
    expect(said).toContain('BROKEN  Entry 2 of the decision log');
  });
});
