import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { canonicalTable } from '../../src/data/canonical-table.ts';
import { tableFromStored } from '../../src/data/stored.ts';
import { recordResults } from '../../src/replay/record.ts';
import { main } from '../../src/replay/replay.ts';
import { exitOf, replayWorksheet } from '../../src/replay/replay-worksheet.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import { appendEntry } from '../../src/worksheet/decision-log.ts';
import { sha256 } from '../../src/worksheet/digest.ts';
import type { Cell, Worksheet } from '../../src/worksheet/format.ts';
import { escapeForScript } from '../../src/worksheet/html.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';
import { testRegistry } from '../support/kinds.ts';
import { cell, dataBlock, worksheet } from '../support/worksheets.ts';

const folder = mkdtempSync(join(tmpdir(), 'standfast-replay-'));
afterAll(() => rmSync(folder, { recursive: true }));

let written = '';
let complained = '';
beforeEach(() => {
  written = '';
  complained = '';
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    written += String(text);
    return true;
  });
  vi.spyOn(process.stderr, 'write').mockImplementation((text) => {
    complained += String(text);
    return true;
  });
});
afterEach(() => vi.restoreAllMocks());

function fileOf(name: string, text: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, text);
  return path;
}

function withPrint(block: Worksheet['data'][number]): Worksheet['data'][number] {
  const table = sha256(canonicalTable(tableFromStored(block)));
  return { ...block, fingerprint: { ...block.fingerprint, table } };
}

/** The program's own data cell on a small file, recorded. */
async function saved(): Promise<Worksheet> {
  const kind = registry.data;
  const data = [withPrint(dataBlock('d1', [1.5, null, 2.25]))];
  const context = { shared: [], given: {}, data: [{ id: 'd1', name: 'd1.csv' }] };
  const [editor] = kind
    .sentence(kind.defaults(context), context)
    .flatMap((part) => (typeof part === 'string' ? [] : [part.editor]));
  if (editor?.type !== 'file') throw new Error('the data cell begins with its file');
  const cells: Cell[] = [{ ...cell('c1', 'data', editor.set('d1')), version: kind.version }];
  const log = appendEntry([], { when: '2026-03-01T09:30:00Z', who: 'A', what: 'read d1.csv', opening: 'opened-early' });
  return recordResults(worksheet(cells, { data, log }), registry, inlineRunner(), '0.1.0');
}

describe('replay', () => {
  test('by hand: a saved worksheet comes out again, as JSON file and inside a page', async () => {
    const text = writeWorksheet(await saved());
    expect(await main([fileOf('good.standfast.json', text)])).toBe(0);
    expect(written).toContain('Everything came out again: 1 cell, ');
    const html = `<!doctype html><html><head></head><body><script type="application/json" id="standfast-worksheet">${escapeForScript(text)}</script></body></html>`;
    expect(await main([fileOf('good.standfast.html', html)])).toBe(0);
    expect(complained).toBe('');
  });

  test('refuses: a result that differs is named with its cell, place and both values; exit 3', async () => {
    const worksheet = await saved();
    const results = JSON.parse(
      JSON.stringify(worksheet.results).replace('"rows":3', '"rows":4'),
    ) as Worksheet['results'];
    const path = fileOf('differs.json', writeWorksheet({ ...worksheet, results }));
    expect(await main([path])).toBe(3);
    expect(written).toMatch(/DIFFERS {2}c1 \(data\): Read d1\.csv/);
    expect(written).toMatch(/: recorded 4, recomputed 3/);
    written = '';
    expect(await main([path, '--json'])).toBe(3);
    const report = JSON.parse(written) as { exit: number; cells: { id: string; differences: object[] }[] };
    expect(report).toMatchObject({ exit: 3, cells: [{ id: 'c1', kind: 'data', came: 'different' }] });
    expect(report.cells[0]?.differences[0]).toMatchObject({ recorded: 4, recomputed: 3 });
  });

  test('refuses: nothing recorded, a result of a cell that is not there, an unknown kind; exit 3', async () => {
    const worksheet = await saved();
    expect(await main([fileOf('bare.json', writeWorksheet({ ...worksheet, results: {} }))])).toBe(3);
    expect(written).toContain('nothing is recorded for it');
    const results = { ...worksheet.results, c9: { status: 'value' as const, value: 1 } };
    expect(await main([fileOf('gone.json', writeWorksheet({ ...worksheet, results }))])).toBe(3);
    expect(written).toContain('A result is recorded for "c9", but there is no such cell.');
    const cells = [...worksheet.cells, cell('c2', 'of-tomorrow')];
    expect(await main([fileOf('unknown.json', writeWorksheet({ ...worksheet, cells }))])).toBe(3);
    expect(written).toContain('UNKNOWN  c2: this program does not know cells of the kind "of-tomorrow".');
  });

  test('refuses: a changed value of the data, or a changed log, before anything else; exit 4', async () => {
    const worksheet = await saved();
    const [block] = worksheet.data;
    if (block === undefined) throw new Error('no data');
    const data = [{ ...block, columns: [{ name: 'x', type: 'number' as const, values: [1.5, null, 2.5] }] }];
    expect(await main([fileOf('data.json', writeWorksheet({ ...worksheet, data, results: {} }))])).toBe(4);
    expect(written).toContain('BROKEN  The data of d1.csv are not those that were read');
    expect(written).toContain('nothing is recorded for it');
    const log = worksheet.log.map((entry) => ({ ...entry, what: 'something else' }));
    expect(await main([fileOf('log.json', writeWorksheet({ ...worksheet, log }))])).toBe(4);
    expect(written).toContain(
      'BROKEN  Entry 1 of the decision log ("something else") was changed after it was written.',
    );
  });

  test.each<[string, () => string, string]>([
    ['no such file', () => join(folder, 'none.json'), 'there is no such file'],
    ['a folder', () => folder, 'it is not a file'],
    ['an empty file', () => fileOf('empty.json', ''), 'is not JSON'],
    [
      'bytes that are not text',
      () => fileOf('bytes.json', Uint8Array.of(0xff, 0xfe, 0x00, 0x9f)),
      'it is not text in UTF-8',
    ],
    [
      'a page without a worksheet',
      () => fileOf('page.html', '<!doctype html><p>Hello</p>'),
      'There is no worksheet in this page',
    ],
    ['another JSON file', () => fileOf('other.json', '{"a":1}'), 'This is not a Standfast worksheet'],
  ])('refuses: %s; exit 2 with a sentence and no trace of the program', async (_title, path, sentence) => {
    expect(await main([path()])).toBe(2);
    expect(complained).toContain(sentence);
    expect(complained).not.toContain('    at ');
    expect(await main([path(), '--json'])).toBe(2);
    expect(JSON.parse(written)).toMatchObject({ exit: 2, sentence: complained.trim() });
  });

  test.each([[[]], [['a.json', 'b.json']], [['--verbose', 'a.json']]])('refuses: arguments %j', async (argv) => {
    expect(await main(argv)).toBe(2);
    expect(complained).toContain('npm run -s replay -- FILE [--json]');
  });

  test('by hand: cells left out, veiled or failed as recorded count as equal; failed otherwise does not', async () => {
    const cells = [
      cell('c1', 'number', { value: -1 }),
      { ...cell('c2', 'number', { value: 1 }), leftOut: true },
      cell('c3', 'add', {}, 'c1'),
      cell('c4', 'number', { value: 3 }),
      cell('c5', 'slow', { ms: 1 }, 'c4'),
      cell('c6', 'veiled', {}, 'c5'),
    ];
    const blind = worksheet(cells, { opening: { state: 'blind' } });
    const recorded = await recordResults(blind, testRegistry, inlineRunner(), '1');
    const same = await replayWorksheet(recorded, testRegistry, inlineRunner());
    expect(same.cells.map(({ came }) => came)).toEqual(Array(6).fill('same'));
    expect(exitOf(same)).toBe(0);
    const results = { ...recorded.results, c1: { status: 'failed' as const, value: 'Another reason.' } };
    const other = await replayWorksheet({ ...recorded, results }, testRegistry, inlineRunner());
    expect(other.cells[0]).toMatchObject({
      came: 'different',
      differences: [{ path: 'value', recorded: 'Another reason.' }],
    });
    expect(exitOf(other)).toBe(3);
  });
});
