import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { usePage } from '../support/page.ts';
import { blankIn, cellsOf, computedBy, recordOf, typeIn } from '../support/worksheet-page.ts';

const harness = usePage();

/** Ids of the cells that use a shared number, and of those below them: what a change of it may compute, and must. */
async function dependentsOf(page: Page, shared: string): Promise<{ readonly users: string[]; readonly all: string[] }> {
  const { cells } = await recordOf(page);
  const users = cells.filter(({ settings }) => JSON.stringify(settings).includes(`{"shared":"${shared}"}`));
  const found = new Set(users.map(({ id }) => id));
  // cells stand below what they read
  for (const { id, from } of cells) if (Object.values(from).some((above) => found.has(above))) found.add(id);
  return { users: users.map(({ id }) => id), all: [...found] };
}

async function kindsOf(page: Page, ids: readonly string[]): Promise<string[]> {
  const { cells } = await recordOf(page);
  return cells.filter(({ id }) => ids.includes(id)).map(({ kind }) => kind);
}

function once(ids: readonly string[]): Record<string, number> {
  return Object.fromEntries(ids.map((id) => [id, 1]));
}

/** Presses a key on the ruler of a shared number in the foot. */
async function rulerKey(page: Page, shared: string, key: string): Promise<void> {
  const ruler = page.locator(`[data-part="shared-number"][data-shared="${shared}"] [role=slider]`);
  await ruler.focus();
  await page.keyboard.press(key);
}

/** Types a number into the blank of a cell that shows a shared number. */
async function typeShared(page: Page, shared: string, text: string): Promise<void> {
  const blank = page.locator(`main [data-shared="${shared}"]`).first();
  const key = (await blank.getAttribute('data-blank')) ?? '';
  const cell = (await blank.locator('xpath=ancestor::*[@data-cell]').getAttribute('data-cell')) ?? '';
  await typeIn(page, page.locator(`[data-cell="${cell}"]`), key, text);
}

describe('a change recomputes what depends on it and nothing else', () => {
  test('theory: the shared trim, by its ruler and by typing', async () => {
    const { page } = await harness.open();
    const { all } = await dependentsOf(page, 'trim');
    expect(await kindsOf(page, all)).toEqual(['comparison', 'claim', 'standing', 'joint']);
    const planned = once(all);
    expect(await computedBy(page, () => rulerKey(page, 'trim', 'ArrowLeft'))).toEqual(planned);
    expect(await page.locator('[data-shared="trim"] [data-part="shared-value"]').textContent()).toBe('19 %');
    expect(await blankIn(cellsOf(page, 'comparison').first(), 'trim').textContent()).toBe('19 %');
    expect(await computedBy(page, () => typeShared(page, 'trim', '10'))).toEqual(planned);
    expect((await recordOf(page)).shared.find(({ id }) => id === 'trim')?.value).toBe(10);
    expect(await page.locator('.recomputed').count()).toBe(2);
  });

  test('theory: the shared cutoff, and one that sets the same rows aside', async () => {
    const { page } = await harness.open();
    const { users, all: below } = await dependentsOf(page, 'cutoff');
    const kinds = ['exclusion', 'score', 'comparison', 'claim', 'comparison', 'comparison', 'standing', 'joint'];
    expect(await kindsOf(page, below)).toEqual(kinds);
    const all = once(below);
    // below "none" lies the largest cutoff of the ruler
    expect(await computedBy(page, () => rulerKey(page, 'cutoff', 'ArrowLeft'))).toEqual(all);
    expect(await computedBy(page, () => typeShared(page, 'cutoff', '3'))).toEqual(all);
    const setAside = await asideOf(page);
    expect(await computedBy(page, () => typeShared(page, 'cutoff', '3.01'))).toEqual(once(users));
    expect(await asideOf(page)).toBe(setAside);
    expect(await computedBy(page, () => typeShared(page, 'cutoff', '2.5'))).toEqual(all);
    expect(await asideOf(page)).not.toBe(setAside);
  });

  test('theory: the title, a note and what is pointed at recompute nothing', async () => {
    const { page } = await harness.open();
    const done = await computedBy(page, async () => {
      await page.locator('[data-part="title"]').fill('Another title');
      await page.keyboard.press('Enter');
      await cellsOf(page, 'score').hover();
      await page.locator('[data-part="theme"]').click();
      await page.locator('[data-part="hold"]').click();
    });
    expect(done).toEqual({});
  });
});

/** How many the rule with the cutoff sets aside, as its cell says. */
async function asideOf(page: Page): Promise<string> {
  return (await cellsOf(page, 'exclusion').nth(2).locator('.tally').textContent()) ?? '';
}
