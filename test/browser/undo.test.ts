import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { usePage } from '../support/page.ts';
import {
  addLast,
  blankIn,
  cellsOf,
  chooseIn,
  computedBy,
  decidedOf,
  openOther,
  recordOf,
  stripOf,
  typeIn,
} from '../support/worksheet-page.ts';

const harness = usePage();
const demo = { path: '#w=demo-hearing-words' };

async function arrange(page: Page, kind: string, part: string): Promise<void> {
  await cellsOf(page, kind).first().locator('[data-part="arrange"]').click();
  await cellsOf(page, kind).first().locator(`[data-part="${part}"]`).click();
}

async function press(page: Page, kind: string, keys: string): Promise<void> {
  await cellsOf(page, kind).first().focus();
  await page.keyboard.press(keys);
}

/** Every kind of edit, by pointer or by keys. */
const edits: Record<string, (page: Page) => Promise<void>> = {
  'a blank with a choice': (page) => chooseIn(page, cellsOf(page, 'score'), 'statistic', 'median'),
  'a blank with a text': (page) => typeIn(page, cellsOf(page, 'exclusion'), 'reason', 'another reason'),
  'a number of its own, by keys': async (page) => {
    await blankIn(cellsOf(page, 'claim'), 'margin').focus();
    await page.keyboard.press('ArrowUp');
  },
  'a shared number': async (page) => {
    await page.locator('[data-part="shared-number"] [role=slider]').focus();
    await page.keyboard.press('PageDown');
  },
  'a cell added': (page) => addLast(page, 'note'),
  'a cell moved down, by its word': (page) => arrange(page, 'note', 'down'),
  'a cell moved down, by keys': (page) => press(page, 'note', 'Alt+ArrowDown'),
  'a cell duplicated, by its word': (page) => arrange(page, 'exclusion', 'duplicate'),
  'a cell duplicated, by keys': (page) => press(page, 'score', 'Alt+Shift+ArrowDown'),
  'a cell left out, by its word': (page) => arrange(page, 'exclusion', 'leave-out'),
  'a cell left out, by keys': (page) => press(page, 'exclusion', 'Alt+Shift+KeyO'),
  'a cell removed, by its word': (page) => arrange(page, 'derive', 'remove'),
  'a cell removed, by keys': (page) => press(page, 'exclusion', 'Alt+Delete'),
  'the title': async (page) => {
    await page.locator('[data-part="title"]').fill('Another title');
    await page.keyboard.press('Enter');
  },
};

/** What is decided, and what is found, in one look. */
async function lookAt(page: Page) {
  const finding = await cellsOf(page, 'comparison').locator('[data-part="chart"]').getAttribute('aria-label');
  return { decided: await decidedOf(page), finding, strip: await stripOf(page) };
}

describe('undo and redo', () => {
  test('theory: every kind of edit is taken back and done again exactly, by words and by keys', async () => {
    const { page, idle } = await harness.open(demo);
    const first = await lookAt(page);
    const { log } = await recordOf(page);
    for (const [name, edit] of Object.entries(edits)) {
      await edit(page);
      await idle();
      const after = await decidedOf(page);
      expect(after, name).not.toEqual(first.decided);
      await page.locator('[data-part="undo"]').click();
      await idle();
      expect(await lookAt(page), name).toEqual(first);
      await page.locator('main').focus();
      await page.keyboard.press('ControlOrMeta+Shift+z');
      await idle();
      expect(await decidedOf(page), name).toEqual(after);
      await page.keyboard.press('ControlOrMeta+z');
      await idle();
      expect(await lookAt(page), name).toEqual(first);
    }
    expect(await page.locator('[data-part="undo"]').isDisabled()).toBe(true);
    const added = (await recordOf(page)).log.slice(log.length).map(({ what }) => what);
    expect(added).toHaveLength(4 * Object.keys(edits).length);
    expect(added.slice(0, 4)).toEqual([
      'score: statistic of the kept trials mean \u2192 median',
      'taken back: score: statistic of the kept trials mean \u2192 median',
      'done again: score: statistic of the kept trials mean \u2192 median',
      'taken back: score: statistic of the kept trials mean \u2192 median',
    ]);
  }, 120_000);

  test('theory: ten edits are taken back one by one and done again to the last; a new edit ends redoing', async () => {
    const { page, idle } = await harness.open(demo);
    const states = [await decidedOf(page)];
    for (const [, edit] of Object.entries(edits).slice(0, 10)) {
      await edit(page);
      await idle();
      states.push(await decidedOf(page));
    }
    for (const state of states.slice(0, -1).reverse()) {
      await page.locator('[data-part="undo"]').click();
      expect(await decidedOf(page)).toEqual(state);
    }
    for (const state of states.slice(1)) {
      await page.locator('[data-part="redo"]').click();
      expect(await decidedOf(page)).toEqual(state);
    }
    await page.locator('[data-part="undo"]').click();
    await chooseIn(page, cellsOf(page, 'claim'), 'relation', 'different');
    expect(await page.locator('[data-part="redo"]').isDisabled()).toBe(true);
  }, 120_000);

  test('theory: taking back recomputes what depends on it and nothing else', async () => {
    const { page } = await harness.open(demo);
    const { cells } = await recordOf(page);
    const id = (kind: string): string => cells.find((cell) => cell.kind === kind)?.id ?? '';
    await chooseIn(page, cellsOf(page, 'score'), 'statistic', 'median');
    const done = await computedBy(page, () => page.locator('[data-part="undo"]').click());
    const below = ['score', 'comparison', 'claim', 'standing', 'joint'];
    expect(Object.keys(done).sort()).toEqual(below.map(id).sort());
  });

  test('by hand: keys pressed quickly on one number are one step', async () => {
    const { page, idle } = await harness.open(demo);
    await page.locator('[data-part="shared-number"] [role=slider]').focus();
    await page.evaluate(() => {
      const ruler = document.activeElement;
      for (let i = 0; i < 4; i++)
        ruler?.dispatchEvent(new KeyboardEvent('keydown', { key: 'ArrowLeft', bubbles: true }));
    });
    await idle();
    expect((await recordOf(page)).shared[0]?.value).toBe(16);
    await page.locator('[data-part="undo"]').click();
    expect((await recordOf(page)).shared[0]?.value).toBe(20);
    expect(await page.locator('[data-part="undo"]').isDisabled()).toBe(true);
  });

  test('by hand: what is typed in a field is not taken back by the worksheet, and opening the conditions ends undo', async () => {
    const { page, idle } = await harness.open(demo);
    await chooseIn(page, cellsOf(page, 'score'), 'statistic', 'median');
    const after = await decidedOf(page);
    await page.locator('[data-part="title"]').focus();
    await page.keyboard.type('abc');
    await page.keyboard.press('ControlOrMeta+z');
    await page.keyboard.press('ControlOrMeta+z');
    await idle();
    expect((await decidedOf(page)).cells).toEqual(after.cells);
    await page.locator('[data-part="worksheets"]').click();
    await openOther(page, () => page.locator('[data-part="new-empty"]').click());
    await addLast(page, 'note');
    await page.locator('[data-part="open-conditions"]').click();
    await page.locator('[data-part="reason"]').fill('nothing to hide');
    await page.locator('[data-part="open-now"]').click();
    await idle();
    expect(await page.locator('[data-part="undo"]').isDisabled()).toBe(true);
    expect(await page.locator('.state').textContent()).toMatch(/opened early: nothing to hide/);
  });
});
