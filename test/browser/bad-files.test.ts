import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { dropFile, openFile, pasteText } from '../support/arrive.ts';
import { ownRows } from '../support/own-experiment.ts';
import { usePage } from '../support/page.ts';
import { cellsOf, decidedOf, openOther, recordOf, sentenceOf, statusesOf } from '../support/worksheet-page.ts';

const harness = usePage();
const demo = { path: '#w=demo-glove-peg-test' };

function demoFile(): Worksheet {
  return JSON.parse(readFileSync('demo-data/glove-peg-test.standfast.json', 'utf8')) as Worksheet;
}

async function bannerOf(page: Page): Promise<string> {
  return ((await page.locator('[data-part="banner"][role=alert] p').textContent()) ?? '').trim();
}

describe('files that cannot be read', () => {
  test('refuses a ragged, a binary and an empty file in a sentence, and leaves the worksheet as it is', async () => {
    const { page } = await harness.open(demo);
    const before = await decidedOf(page);
    await dropFile(page, { name: 'ragged.csv', text: 'who,glove,seconds\n1,thin,39\n2,thick\n' });
    expect(await bannerOf(page)).toMatch(/^ragged\.csv, line 3 has 2 fields where the header has 3: correct that line/);
    await dropFile(page, { name: 'picture.csv', text: Uint8Array.of(0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10, 0, 1) });
    expect(await bannerOf(page)).toMatch(/^picture\.csv is a picture, not delimited text/);
    await dropFile(page, { name: 'empty.csv', text: '' });
    expect(await bannerOf(page)).toMatch(/^empty\.csv is empty: choose a file/);
    await openFile(page, { name: 'names.csv', text: 'who,seconds\n' });
    expect(await bannerOf(page)).toMatch(/^names\.csv has column names but no rows/);
    expect(await decidedOf(page)).toEqual(before);
    expect(Object.values(await statusesOf(page)).every((status) => status === 'fresh')).toBe(true);
    await page.getByRole('button', { name: 'close' }).click();
    await page.locator('[data-part="banner"]').waitFor({ state: 'detached' });
  });

  test('refuses worksheet files that are none, cut off, polluted, or nested without end', async () => {
    const { page } = await harness.open(demo);
    const before = await decidedOf(page);
    const whole = JSON.stringify(demoFile());
    const wrong: readonly (readonly [string, string, RegExp])[] = [
      ['cut.standfast.json', whole.slice(0, 5000), /^cut\.standfast\.json: .*is not JSON/],
      ['other.json', '{"a":1}', /^other\.json: This is not a Standfast worksheet/],
      ['proto.json', `{"__proto__":{"planted":1},${whole.slice(1)}`, /__proto__ is not allowed as a name/],
      [
        'deep.json',
        whole.replace('"settings":{', `"settings":{"deep":${'['.repeat(3000)}${']'.repeat(3000)},`),
        /nested/,
      ],
      ['page.html', '<!doctype html><script>globalThis.planted = 1</script>', /^page\.html: /],
    ];
    for (const [name, text, sentence] of wrong) {
      await openFile(page, { name, text });
      expect(await bannerOf(page)).toMatch(sentence);
      expect(await decidedOf(page)).toEqual(before);
    }
    expect(await page.evaluate(() => 'planted' in globalThis || 'planted' in {})).toBe(false);
  });

  test('refuses to run markup of a worksheet file: it is shown as text everywhere', async () => {
    const { page } = await harness.open(demo);
    const evil = '<img src=x onerror="globalThis.planted=1"><script>globalThis.planted=1</script> {{planted}}';
    const file = demoFile();
    const columns = file.data[0]?.columns.map((column) => {
      if (column.name !== 'glove' || column.type === 'number') return column;
      return { ...column, levels: [evil, 'insulated'] };
    });
    const rename = (value: unknown): unknown =>
      JSON.parse(JSON.stringify(value).replaceAll('"thin"', JSON.stringify(evil)));
    const hostile = {
      ...file,
      title: evil,
      results: {},
      cells: [
        ...(rename(file.cells) as Worksheet['cells']),
        {
          id: 'n1',
          kind: 'note',
          version: 1,
          settings: { text: `# ${evil}\n\n**${evil}** [a](javascript:1)` },
          from: {},
        },
        { id: 'u1', kind: evil, version: 1, settings: { a: evil }, from: { [evil]: evil } },
      ],
      data: [{ ...file.data[0], name: evil, columns, warnings: [evil] }],
      shared: file.shared.map((each) => ({ ...each, name: evil })),
      opening: { state: 'opened-early', reason: evil, when: '2026-03-02T09:00:00.000Z' },
    };
    await openOther(page, () => openFile(page, { name: 'hostile.standfast.json', text: JSON.stringify(hostile) }));
    expect((await recordOf(page)).title).toBe(evil);
    expect(await page.locator('[data-part="unknown"]').textContent()).toContain(evil);
    expect(await sentenceOf(cellsOf(page, 'comparison'))).toContain(evil);
    for (const part of ['log', 'save', 'worksheets']) {
      await page.locator(`[data-part="${part}"]`).first().click();
      await page.locator('dialog').waitFor();
      await page.keyboard.press('Escape');
      await page.locator('dialog').waitFor({ state: 'detached' });
    }
    for (const summary of await page.locator('main summary').all()) await summary.click();
    expect(await page.locator('#page img, sf-app img, sf-app script, sf-app a[href^="javascript"]').count()).toBe(0);
    expect(await page.evaluate(() => 'planted' in globalThis)).toBe(false);
  });

  test('degenerate: settings of a known kind that hold nothing or nonsense spoil their own cell only', async () => {
    const { page } = await harness.open(demo);
    const file = demoFile();
    const kinds = ['reshape', 'derive', 'exclusion', 'data', 'design', 'score', 'comparison', 'claim', 'note'];
    const odd = kinds.flatMap((kind, i) => [
      { id: `e${i}`, kind, version: 1, settings: {}, from: {} },
      {
        id: `f${i}`,
        kind,
        version: 1,
        settings: { participants: 7, columns: {}, text: 3, within: 'x', data: 5 },
        from: {},
      },
    ]);
    const text = JSON.stringify({ ...file, cells: [...file.cells, ...odd], results: {} });
    await openOther(page, () => openFile(page, { name: 'odd.standfast.json', text }));
    // those of the strip have no place of their own
    const own = file.cells.filter(({ kind }) => kind !== 'standing' && kind !== 'joint');
    expect(await page.locator('[data-cell]').count()).toBe(own.length + odd.length);
    const statuses = await statusesOf(page);
    for (const cell of file.cells) expect(statuses[cell.id]).toBe('fresh');
    await page.locator('[data-part="undo"]').waitFor();
    await page.locator('[data-cell="e2"] [data-part="arrange"]').click();
    await page.locator('[data-cell="e2"] [data-part="remove"]').click();
    expect(await page.locator('[data-cell="e2"]').count()).toBe(0);
  });
});

describe('data that arrive by paste and drop', () => {
  test('by hand: pasted and dropped rows fill the open data blank', async () => {
    const { page } = await harness.open();
    await page.locator('[data-part="worksheets"]').click();
    await openOther(page, () => page.locator('[data-part="new-empty"]').click());
    await page.locator('main').focus();
    await pasteText(page, ownRows('\t'));
    expect(await sentenceOf(cellsOf(page, 'data'))).toBe('Read pasted rows: 13 rows, one per trial, from 13 persons.');
    await page.locator('[data-part="undo"]').click();
    await dropFile(page, { name: 'load.csv', text: ownRows(';') });
    expect(await sentenceOf(cellsOf(page, 'data'))).toBe('Read load.csv: 13 rows, one per trial, from 13 persons.');
    expect((await recordOf(page)).data[0]?.columns.map(({ name }) => name)).toEqual([
      'person',
      'shift',
      'load_tone',
      'load_voice',
    ]);
  });
});
