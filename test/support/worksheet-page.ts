import type { Locator, Page } from 'playwright-core';
import { expect } from 'vitest';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { waitForIdle } from './wait-for-idle.ts';

/** What the page shows to tests of its engine and its document. */
interface Exposed {
  readonly standfast: {
    readonly engine: {
      counts(): ReadonlyMap<string, number>;
      state(id: string): { readonly status: string };
      idle(): Promise<void>;
    };
    readonly document: { readonly record: Worksheet };
  };
}

/** The open worksheet as it would be saved, without results. */
export function recordOf(page: Page): Promise<Worksheet> {
  return page.evaluate(() => (globalThis as unknown as Exposed).standfast.document.record);
}

/** Everything of a worksheet that a reader decides on: the log only grows, so it stays out. */
export async function decidedOf(page: Page): Promise<Omit<Worksheet, 'log' | 'results' | 'program'>> {
  const { log: _log, results: _results, program: _program, ...decided } = await recordOf(page);
  return decided;
}

/** Cell id -> completed computations since the page opened. */
export async function countsOf(page: Page): Promise<ReadonlyMap<string, number>> {
  return new Map(await page.evaluate(() => [...(globalThis as unknown as Exposed).standfast.engine.counts()]));
}

/** Cell id -> state in one word. */
export async function statusesOf(page: Page): Promise<Record<string, string>> {
  return page.evaluate(() => {
    const { engine, document: open } = (globalThis as unknown as Exposed).standfast;
    return Object.fromEntries(open.record.cells.map(({ id }) => [id, engine.state(id).status]));
  });
}

/** Does something and says how often each cell was computed by it; a cell that was not is left out. */
export async function computedBy(page: Page, act: () => Promise<void>): Promise<Record<string, number>> {
  await waitForIdle(page);
  const before = await countsOf(page);
  await act();
  await waitForIdle(page);
  const after = await countsOf(page);
  const risen = [...after].map(([id, count]) => [id, count - (before.get(id) ?? 0)] as const);
  return Object.fromEntries(risen.filter(([, count]) => count > 0));
}

/** Does something that opens another worksheet, and waits until it is there and computed. */
export async function openOther(page: Page, act: () => Promise<unknown>): Promise<void> {
  const { id } = await recordOf(page);
  await act();
  await expect.poll(async () => (await recordOf(page)).id, { timeout: 20_000 }).not.toBe(id);
  await waitForIdle(page);
}

/** The cells of a kind, in order. */
export function cellsOf(page: Page, kind: string): Locator {
  return page.locator(`[data-cell][data-kind="${kind}"]`);
}

/** The blank of that key in a cell. */
export function blankIn(cell: Locator, key: string): Locator {
  return cell.locator(`[data-blank="${key}"]`);
}

/** Opens a blank with the pointer and takes one of its options. */
export async function chooseIn(page: Page, cell: Locator, key: string, value: string): Promise<void> {
  await blankIn(cell, key).click();
  await page.locator(`[data-part="editor"] [role=option][data-value="${value}"]`).click();
  await waitForIdle(page);
}

/** Opens a blank with the pointer and ticks those that are not ticked, and the other way round. */
export async function tickIn(page: Page, cell: Locator, key: string, values: readonly string[]): Promise<void> {
  await blankIn(cell, key).click();
  const boxes = page.locator('[data-part="editor"] input[type=checkbox]');
  await boxes.first().waitFor();
  for (const box of await boxes.all()) {
    const wanted = values.includes((await box.getAttribute('data-value')) ?? '');
    if ((await box.isChecked()) === wanted) continue;
    // The foot may stand over the end of a long list: a reader scrolls.
    await box.evaluate((each) => each.scrollIntoView({ block: 'center' }));
    await box.click();
  }
  await page.locator('[data-part="editor"] input[type=checkbox]').first().press('Escape');
  await waitForIdle(page);
}

/** Opens a blank with the pointer, types into it and takes it with Enter. */
export async function typeIn(page: Page, cell: Locator, key: string, text: string): Promise<void> {
  await blankIn(cell, key).click();
  const field = page.locator('[data-part="editor"] input[type=text], [data-part="editor"] textarea').first();
  await field.fill(text);
  await field.press('Enter');
  await waitForIdle(page);
}

/** Adds a cell of a kind at the end, with the pointer. */
export async function addLast(page: Page, kind: string): Promise<void> {
  await page.locator('.end [data-part="then"]').click();
  await page.locator(`.end .offer[data-kind="${kind}"]`).click();
  await waitForIdle(page);
}

/** What a cell's sentence says, as text. */
export async function sentenceOf(cell: Locator): Promise<string> {
  return ((await cell.locator('[data-part="sentence"]').textContent()) ?? '').replace(/\s+/g, ' ').trim();
}

/** What the standing strip counts, as text. */
export async function stripOf(page: Page): Promise<string> {
  return ((await page.locator('[data-part="strip-counts"]').textContent()) ?? '').replace(/\s+/g, ' ').trim();
}

/** The text of a file that the page hands out when something is done. */
export async function downloadOf(page: Page, act: () => Promise<void>): Promise<{ name: string; bytes: Buffer }> {
  const [download] = await Promise.all([page.waitForEvent('download'), act()]);
  const chunks: Buffer[] = [];
  for await (const chunk of await download.createReadStream()) chunks.push(chunk as Buffer);
  return { name: download.suggestedFilename(), bytes: Buffer.concat(chunks) };
}
