import { mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Page } from 'playwright-core';
import { afterAll, describe, expect, test, vi } from 'vitest';
import { compareRecords } from '../../src/replay/compare-records.ts';
import { main as replay } from '../../src/replay/replay.ts';
import { findWorksheetBlock } from '../../src/worksheet/html.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { accessibilityProblems } from '../support/axe.ts';
import { usePage } from '../support/page.ts';

const harness = usePage();
const folder = mkdtempSync(join(tmpdir(), 'standfast-one-file-'));
afterAll(() => rmSync(folder, { recursive: true }));

const first = resolve('dist/standfast.html');

/** Opens a saved page as a person does who has only this file, and no network; a request to anywhere fails the test. */
async function openAlone(file: string) {
  const opened = await harness.openAddress(pathToFileURL(file).href);
  await opened.page.context().setOffline(true);
  return opened;
}

async function openSheet(page: Page, part: string): Promise<void> {
  await page.locator(`[data-part="${part}"]`).click();
}

/** Saves the open worksheet as one file. */
async function saveAs(page: Page, name: string, part = 'save-html'): Promise<string> {
  await openSheet(page, 'save');
  const [download] = await Promise.all([page.waitForEvent('download'), page.locator(`[data-part="${part}"]`).click()]);
  expect(download.suggestedFilename()).toMatch(/\.standfast\.(html|json)$/);
  const path = join(folder, name);
  await download.saveAs(path);
  return path;
}

async function changeTrim(page: Page): Promise<void> {
  await page.locator('[data-part="shared-number"][data-shared="trim"] [role=slider]').focus();
  await page.keyboard.press('ArrowLeft');
}

function worksheetIn(file: string) {
  const found = findWorksheetBlock(readFileSync(file, 'utf8'));
  const parsed = parseWorksheet(found.ok ? found.text : '');
  if (!parsed.ok) throw new Error(parsed.sentence);
  return parsed.worksheet;
}

/** "7" -> "P07", within JSON text. */
function codeOf(_text: string, code: string): string {
  return `"P${code.padStart(2, '0')}"`;
}

/** Everything of a saved page but its worksheet and the readable part. */
function shellOf(file: string): string {
  const text = readFileSync(file, 'utf8');
  return text.slice(0, text.indexOf('<noscript id="standfast-readable">'));
}

/** Exit code and words of the command line. */
async function replayed(file: string): Promise<{ code: number; said: string }> {
  let said = '';
  const spy = vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    said += String(text);
    return true;
  });
  try {
    return { code: await replay([file]), said };
  } finally {
    spy.mockRestore();
  }
}

describe('one file', { timeout: 180_000 }, () => {
  test('by hand: the single file of the build is under 2 MB and is replayed with exit 0', async () => {
    expect(statSync(first).size).toBeLessThan(2_000_000);
    expect((await replayed(first)).code).toBe(0);
  });

  test('by hand: a copy opens from disk without a network, is changed, and saves itself again', async () => {
    const author = await openAlone(first);
    await changeTrim(author.page);
    await author.idle();
    const sent = await saveAs(author.page, 'sent.standfast.html');
    expect(worksheetIn(sent).shared.find(({ id }) => id === 'trim')?.value).toBe(19);
    expect(await replayed(sent)).toMatchObject({ code: 0 });

    const reader = await openAlone(sent);
    expect(await reader.page.locator('[data-shared="trim"] [data-part="shared-value"]').textContent()).toBe('19 %');
    await openSheet(reader.page, 'log');
    expect(await reader.page.locator('[data-part="log-entries"] li').count()).toBe(2);
    expect(await reader.page.locator('[data-part="log-entries"]').textContent()).toContain('trim 20 % \u2192 19 %');
    expect(await reader.page.locator('[data-part="log-whole"]').textContent()).toContain('is whole and ends in');
    await reader.page.keyboard.press('Escape');
    await changeTrim(reader.page);
    await reader.idle();
    const again = await saveAs(reader.page, 'again.standfast.html');
    expect(worksheetIn(again).shared.find(({ id }) => id === 'trim')?.value).toBe(18);
    expect(worksheetIn(again).log).toHaveLength(3);
    expect(await replayed(again)).toMatchObject({ code: 0 });
    expect(shellOf(again)).toBe(shellOf(sent));
    // A browser drops the space before <head>.
    expect(shellOf(sent).replace(/\s+/g, '')).toBe(shellOf(first).replace(/\s+/g, ''));
  });

  test('by hand: a copy saved from the served page opens from disk; a reload keeps what was edited', async () => {
    const served = await harness.open();
    await changeTrim(served.page);
    await served.idle();
    const sent = await saveAs(served.page, 'served.standfast.html');
    const reader = await openAlone(sent);
    await changeTrim(reader.page);
    await reader.idle();
    // Kept a moment after the last edit.
    await reader.page.waitForTimeout(1500);
    await reader.page.reload();
    await reader.idle();
    expect(await reader.page.locator('[data-shared="trim"] [data-part="shared-value"]').textContent()).toBe('18 %');
  });

  test('by hand: a copy for sharing has other codes and a column less, the same results, and exit 0', async () => {
    const { page } = await openAlone(first);
    await openSheet(page, 'save');
    await page.locator('[data-part="replace-codes"]').check();
    await page.locator('summary', { hasText: 'other columns' }).click();
    expect(await page.locator('[data-column="ack_ms"]').isDisabled()).toBe(true);
    await page.locator('[data-column="trial"]').check();
    expect(await accessibilityProblems(page)).toEqual([]);
    const [download] = await Promise.all([
      page.waitForEvent('download'),
      page.locator('[data-part="save-html"]').click(),
    ]);
    const shared = join(folder, 'shared.standfast.html');
    await download.saveAs(shared);
    expect(await replayed(shared)).toMatchObject({ code: 0 });
    const [before, after] = [worksheetIn(first), worksheetIn(shared)];
    expect(after.data[0]?.columns.map(({ name }) => name)).toEqual(['officer', 'training', 'alert', 'ack_ms']);
    expect(after.data[0]?.columns[0]).toMatchObject({ type: 'text' });
    const named = after.cells.find(({ settings }) => settings.what === 'named');
    expect(named?.settings.participants).toEqual(['P23']);
    // Officers are numbered in the order of the file, so that officer 23 is P23. The browser's last digits may differ
    // from Node's, as in a replay: 1e-9, relatively.
    for (const cell of before.cells.filter(({ kind }) => ['comparison', 'claim', 'standing'].includes(kind))) {
      const renamed = JSON.stringify(before.results[cell.id]?.value).replace(/"(\d+)"(?!:)/g, codeOf);
      const { differences, compared } = compareRecords(JSON.parse(renamed), after.results[cell.id]?.value ?? null);
      expect({ kind: cell.kind, differences }).toEqual({ kind: cell.kind, differences: [] });
      expect(compared).toBeGreaterThan(0);
    }
    expect(after.log[0]?.what).toContain(`ends in ${before.log[0]?.hash}`);
    expect(after.id).not.toBe(before.id);
  });

  test('by hand: without scripts the results and the data can be read', async () => {
    const context = await harness.browser.newContext({ javaScriptEnabled: false });
    const page = await context.newPage();
    await page.goto(pathToFileURL(first).href);
    const text = await page.locator('noscript').last().textContent();
    await context.close();
    expect(text).toContain('35 officers scored.');
    expect(text).toContain('officer,training,alert,trial,ack_ms\n1,standard,tone,1,422');
  });

  test('refuses: a changed value or number of the file, when opened and when replayed', async () => {
    const text = readFileSync(first, 'utf8');
    const at = text.lastIndexOf('"name": "ack_ms"');
    const data = join(folder, 'data.standfast.html');
    writeFileSync(data, text.slice(0, at) + text.slice(at).replace(/\b422\b/, '423'));
    expect(await replayed(data)).toMatchObject({ code: 4 });
    expect((await replayed(data)).said).toContain('BROKEN  The data of bridge-alerts.csv are not those that were read');
    const opened = await openAlone(data);
    await opened.page.locator('[data-part="banner"]').waitFor();
    expect(await opened.page.locator('[data-part="banner"]').textContent()).toContain('are not those that were read');
    const results = text.lastIndexOf('"results"');
    const number = join(folder, 'number.standfast.html');
    writeFileSync(number, text.slice(0, results) + text.slice(results).replace(/"n": 34\b/, '"n": 35'));
    expect(await replayed(number)).toMatchObject({ code: 3 });
  });
});
