import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { main } from '../../src/replay/replay.ts';
import type { Json, Worksheet } from '../../src/worksheet/format.ts';

/** The demo worksheets are the goldens of the whole chain; a changed one is read as a diff. */
const place = 'demo-data';
const goldens = readdirSync(place).filter((name) => name.endsWith('.standfast.json'));
const folder = mkdtempSync(join(tmpdir(), 'standfast-golden-'));
afterAll(() => rmSync(folder, { recursive: true }));

let told = '';
beforeEach(() => {
  told = '';
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    told += String(text);
    return true;
  });
  return () => vi.restoreAllMocks();
});

function goldenOf(name: string): Worksheet {
  return JSON.parse(readFileSync(join(place, name), 'utf8')) as Worksheet;
}

/** The first number that is no whole one and no count, moved by a share; the others as they are. */
function moved(value: Json, share: number, done: { was: number | null }): Json {
  if (typeof value === 'number' && done.was === null && !Number.isInteger(value)) {
    done.was = value;
    return value * (1 + share);
  }
  if (Array.isArray(value)) return value.map((each: Json) => moved(each, share, done));
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, each]) => [key, moved(each, share, done)]));
}

/** The file with one recorded number of one cell moved. */
function edited(worksheet: Worksheet, cell: string, share: number): { text: string; was: number | null } {
  const done = { was: null };
  const result = worksheet.results[cell];
  const value = moved(result?.value ?? null, share, done);
  const results = { ...worksheet.results, [cell]: { ...result, value } };
  return { text: JSON.stringify({ ...worksheet, results }), was: done.was };
}

function cellOf(worksheet: Worksheet, kind: string): string {
  return worksheet.cells.find((cell) => cell.kind === kind)?.id ?? '';
}

test('by hand: one golden for each demo worksheet', () => {
  expect(goldens.map((name) => name.replace('.standfast.json', ''))).toEqual([
    'bridge-alerts',
    'bridge-workload',
    'glove-peg-test',
    'hearing-words',
  ]);
});

describe.each(goldens)('%s', (name) => {
  test('agrees with its recorded results', async () => {
    expect(await main([join(place, name)])).toBe(0);
    expect(told).toMatch(/Everything came out again: \d+ cells, \d+ values\./);
  });

  test('refuses a recorded estimate that is off by a millionth, naming its cell and both numbers', async () => {
    const golden = goldenOf(name);
    const id = cellOf(golden, 'comparison');
    const { text, was } = edited(golden, id, 1e-6);
    const file = join(folder, name);
    writeFileSync(file, text);
    expect(await main([file])).toBe(3);
    expect(told).toMatch(new RegExp(`^DIFFERS {2}${id} \\(comparison\\): Compare `, 'm'));
    expect(told).toContain(`recomputed ${was}`);
    expect(told.match(/^DIFFERS/gm)).toHaveLength(1);
  });

  test('theory: 1e-9 of a number is the tolerance, on either side of it', async () => {
    const golden = goldenOf(name);
    const id = cellOf(golden, 'score');
    const file = join(folder, name);
    writeFileSync(file, edited(golden, cellOf(golden, 'comparison'), 5e-10).text);
    expect(await main([file])).toBe(0);
    const { text, was } = edited(golden, id, 2e-9);
    writeFileSync(file, text);
    expect(await main([file])).toBe(was === null ? 0 : 3);
  });
});
