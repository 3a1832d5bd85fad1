import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import type { Finding } from '../../src/analysis/finding.ts';
import { usePage } from '../support/page.ts';
import { cellsOf, downloadOf, recordOf } from '../support/worksheet-page.ts';

const harness = usePage();

/** The rows of the comparison as the engine holds them. */
async function findingsOf(page: Page): Promise<readonly Finding[]> {
  const id = (await recordOf(page)).cells.find(({ kind }) => kind === 'comparison')?.id ?? '';
  return page.evaluate((cellId) => {
    const { engine } = (globalThis as unknown as { standfast: { engine: { state(id: string): unknown } } }).standfast;
    const state = engine.state(cellId) as { computed: { value: { findings: readonly Finding[] } } };
    return state.computed.value.findings;
  }, id);
}

/** Values of a CSV file whose quoted values hold no line ends. */
function valuesOf(csv: string): string[][] {
  return csv
    .replace(/^\ufeff/, '')
    .trimEnd()
    .split('\r\n')
    .map((line) => [...line.matchAll(/("(?:[^"]|"")*"|[^,]*)(?:,|$)/g)].map((match) => match[1] ?? ''))
    .map((row) => row.slice(0, -1).map((value) => value.replace(/^"|"$/g, '').replaceAll('""', '"')));
}

describe('what a reader takes away', () => {
  test('by hand: the result as a sentence, on the clipboard', async () => {
    const { page } = await harness.open({ path: '#w=demo-glove-peg-test' });
    await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
    const comparison = cellsOf(page, 'comparison').first();
    await comparison.locator('[data-part="arrange"]').click();
    await comparison.locator('[data-part="copy"]').click();
    await page.locator('[data-part="banner"]').waitFor();
    expect(await page.evaluate(() => navigator.clipboard.readText())).toMatch(
      /^insulated minus thin, 20 % trimmed means, Yuen\u2013Welch: \d\.\d s, 95 % interval \[\d\.\d, \d\.\d\], t\(\d+\.\d\) = \d\.\d\d, p .*; n = 32\.$/,
    );
    expect(await page.locator('[data-part="banner"] p').textContent()).toMatch(/^Copied: the result as a sentence\.$/);
  });

  test('theory: a table as CSV holds every number of every row in full', async () => {
    const { page } = await harness.open({ path: '#w=demo-glove-peg-test' });
    const table = cellsOf(page, 'comparison').first().locator('[data-part="table"]').first();
    await table.locator('summary').click();
    const { name, bytes } = await downloadOf(page, () => table.getByRole('button', { name: 'CSV' }).click());
    expect(name).toBe('every row.csv');
    const [header = [], ...rows] = valuesOf(bytes.toString('utf8'));
    const findings = await findingsOf(page);
    expect(rows.map((row) => row[0])).toEqual(findings.map(({ label }) => label));
    const column = (title: string): (number | null)[] =>
      rows.map((row) => row[header.indexOf(title)] ?? '').map((text) => (text === '' ? null : Number(text)));
    expect(column('estimate')).toEqual(findings.map(({ estimate }) => estimate));
    expect(column('p')).toEqual(findings.map(({ p }) => p));
    expect(column('lower')).toEqual(findings.map(({ interval }) => interval?.[0] ?? null));
    expect(column('n')).toEqual(findings.map(({ n }) => n));

    await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
    await table.getByRole('button', { name: 'copy' }).click();
    await expect.poll(() => table.locator('[role=status]').textContent()).toBe('copied');
    const lines = (await page.evaluate(() => navigator.clipboard.readText())).split('\n');
    expect(lines).toHaveLength(rows.length + 1);
    expect(lines.every((line) => line.split('\t').length === header.length)).toBe(true);
  });

  test('by hand: figures as SVG and PNG, with their labels', async () => {
    const { page } = await harness.open({ scheme: 'dark' });
    const figures = [
      ['comparison', ['voice minus tone (ms)', 'mean of differences, paired t', '20 % trimmed mean of differences']],
      ['score', ['ack_ms (ms)', 'tone', 'voice', 'seat pulse']],
      ['exclusion', ['ack_ms (ms)', 'one row per officer, in shuffled order']],
    ] as const;
    for (const [kind, labels] of figures) {
      const cell = kind === 'exclusion' ? cellsOf(page, kind).last() : cellsOf(page, kind).first();
      const figure = cell.locator('sf-chart, sf-points').first();
      await figure.hover();
      const svg = await downloadOf(page, () => figure.getByRole('button', { name: /SVG/ }).click());
      expect(svg.name).toMatch(/\.svg$/);
      const read = await page.evaluate((text) => {
        const made = new DOMParser().parseFromString(text, 'image/svg+xml');
        const words = [...made.querySelectorAll('text')].map((each) => each.textContent ?? '');
        return {
          root: made.documentElement.tagName,
          words,
          fault: made.querySelector('parsererror')?.textContent ?? '',
        };
      }, svg.bytes.toString('utf8'));
      expect({ root: read.root, fault: read.fault }).toEqual({ root: 'svg', fault: '' });
      for (const label of labels) expect(read.words.join('\n')).toContain(label);
      // for paper: the light colours, whatever the page shows
      expect(svg.bytes.toString('utf8')).not.toMatch(/#1a1d21|var\(--/i);

      const png = await downloadOf(page, () => figure.getByRole('button', { name: /PNG/ }).click());
      expect([...png.bytes.subarray(0, 8)]).toEqual([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);
      // width and height stand in the first chunk (PNG specification, 11.2.2)
      expect(png.bytes.readUInt32BE(16)).toBeGreaterThan(800);
      expect(await inksOf(page, png.bytes)).toBeGreaterThan(3);
    }
  });
});

/** How many colours a picture has, up to 16: one only would be an empty picture. */
async function inksOf(page: Page, bytes: Buffer): Promise<number> {
  return page.evaluate(async (base64) => {
    const data = Uint8Array.from(atob(base64), (letter) => letter.charCodeAt(0));
    const picture = await createImageBitmap(new Blob([data], { type: 'image/png' }));
    const canvas = new OffscreenCanvas(picture.width, picture.height);
    const context = canvas.getContext('2d');
    context?.drawImage(picture, 0, 0);
    const pixels = new Uint32Array(context?.getImageData(0, 0, picture.width, picture.height).data.buffer ?? []);
    const inks = new Set<number>();
    for (const pixel of pixels) if (inks.size < 16) inks.add(pixel);
    return inks.size;
  }, bytes.toString('base64'));
}
