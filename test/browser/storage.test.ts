import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { usePage } from '../support/page.ts';
import { waitForIdle } from '../support/wait-for-idle.ts';
import {
  cellsOf,
  chooseIn,
  decidedOf,
  downloadOf,
  openOther,
  recordOf,
  statusesOf,
  stripOf,
} from '../support/worksheet-page.ts';

const harness = usePage();
const demo = { path: '#w=demo-glove-peg-test' };

/** The record of the open worksheet as the browser's own database has it, without its data. */
async function storedOf(page: Page): Promise<{ readonly shared?: unknown; readonly title?: string } | null> {
  return page.evaluate(async () => {
    const { id } = (globalThis as unknown as { standfast: { document: { record: { id: string } } } }).standfast.document
      .record;
    const db = await new Promise<IDBDatabase>((resolve, reject) => {
      const asked = indexedDB.open('standfast');
      asked.onsuccess = () => resolve(asked.result);
      asked.onerror = () => reject(asked.error);
    });
    const kept = await new Promise<{ record: { title: string } } | undefined>((resolve) => {
      const asked = db.transaction('worksheets').objectStore('worksheets').get(id);
      asked.onsuccess = () => resolve(asked.result);
    });
    db.close();
    return kept?.record ?? null;
  });
}

async function turn(page: Page, key: string): Promise<void> {
  await page.locator('[data-part="shared-number"] [role=slider]').focus();
  await page.keyboard.press(key);
}

describe('what the browser keeps', () => {
  test('theory: edits in quick succession are kept, the last one last, and a reload brings them back', async () => {
    const { page, idle } = await harness.open(demo);
    await page.locator('[data-part="title"]').fill('First title');
    await page.keyboard.press('Enter');
    await turn(page, 'ArrowLeft');
    await page.locator('[data-part="title"]').fill('Second title');
    await page.keyboard.press('Enter');
    await turn(page, 'ArrowLeft');
    await expect.poll(async () => (await storedOf(page))?.shared, { timeout: 5000 }).toMatchObject([{ value: 18 }]);
    const decided = await decidedOf(page);
    await page.reload();
    await idle();
    expect(await decidedOf(page)).toEqual(decided);
    expect(decided.title).toBe('Second title');
    await page.locator('[data-part="worksheets"]').click();
    await expect.poll(() => page.locator('[data-part="saved-list"] li').allTextContents()).toHaveLength(1);
  });

  test('theory: an edit right before leaving is kept', async () => {
    const { page, idle } = await harness.open(demo);
    await chooseIn(page, cellsOf(page, 'score'), 'statistic', 'median');
    const decided = await decidedOf(page);
    await page.reload();
    await idle();
    expect((await decidedOf(page)).cells).toEqual(decided.cells);
  });

  test('theory: a page that dies without a word has lost nothing that was kept', async () => {
    const { page, problems } = await harness.open(demo);
    await turn(page, 'ArrowLeft');
    await expect.poll(async () => (await storedOf(page))?.shared, { timeout: 5000 }).toMatchObject([{ value: 19 }]);
    const decided = await decidedOf(page);
    const died = new Promise((resolve) => page.once('crash', resolve));
    const session = await page.context().newCDPSession(page);
    session.send('Page.crash').catch(() => undefined);
    await died;
    expect(problems.splice(0)).toEqual(['the page crashed']);
    const next = await page.context().newPage();
    await next.goto(`${harness.address}${demo.path}`);
    await waitForIdle(next);
    expect(await decidedOf(next)).toEqual(decided);
    await next.close();
  });

  test('theory: two worksheets are kept side by side', async () => {
    const { page } = await harness.open(demo);
    await turn(page, 'ArrowLeft');
    await page.locator('[data-part="worksheets"]').click();
    await openOther(page, () => page.locator('[data-demo^="hearing"]').click());
    await turn(page, 'ArrowRight');
    expect((await recordOf(page)).shared[0]?.value).toBe(21);
    await page.locator('[data-part="worksheets"]').click();
    await openOther(page, () => page.locator('[data-saved="demo-glove-peg-test"] .title-word').click());
    expect((await recordOf(page)).shared[0]?.value).toBe(19);
    expect(page.url()).toContain('#w=demo-glove-peg-test');
    await openOther(page, () => page.goBack());
    expect((await recordOf(page)).id).toBe('demo-hearing-words');
    expect((await recordOf(page)).shared[0]?.value).toBe(21);
  });
});

describe('a browser that keeps nothing', () => {
  /** Opens again with a store that behaves as `spoil` makes it. */
  async function openSpoilt(spoil: () => void) {
    const opened = await harness.open(demo);
    await opened.page.addInitScript(spoil);
    await opened.page.reload();
    await opened.idle();
    return opened;
  }

  async function staysUsable(page: Page, words: RegExp): Promise<void> {
    await turn(page, 'ArrowLeft');
    await expect.poll(() => page.locator('.not-saved').textContent(), { timeout: 5000 }).toMatch(words);
    await waitForIdle(page);
    expect(Object.values(await statusesOf(page)).every((status) => status === 'fresh')).toBe(true);
    expect(await stripOf(page)).toMatch(/supported|undecided|contradicted/);
    await page.locator('[data-part="save"]').click();
    const saved = await downloadOf(page, () => page.locator('[data-part="save-json"]').click());
    expect(JSON.parse(saved.bytes.toString('utf8'))).toMatchObject({ shared: [{ value: 19 }] });
    await page.locator('[data-part="worksheets"]').click();
    await page.locator('[data-demo^="hearing"]').click();
    await expect.poll(async () => (await recordOf(page)).id).toBe('demo-hearing-words');
  }

  test('refuses in words where the store may not be opened, and stays usable', async () => {
    const { page } = await openSpoilt(() => {
      IDBFactory.prototype.open = () => {
        throw new DOMException('denied', 'SecurityError');
      };
      Object.defineProperty(globalThis, 'localStorage', {
        get: () => {
          throw new DOMException('denied', 'SecurityError');
        },
      });
    });
    await staysUsable(
      page,
      /^Not saved here: the browser does not let this page keep anything\. Save a copy to a file/,
    );
  });

  test('refuses in words where there is no store at all, and stays usable', async () => {
    const { page } = await openSpoilt(() => {
      Object.defineProperty(globalThis, 'indexedDB', { value: undefined });
    });
    await staysUsable(
      page,
      /^Not saved here: the browser does not let this page keep anything\. Save a copy to a file/,
    );
  });

  test('refuses in words where the store is full, and saves once there is room', async () => {
    const { page } = await openSpoilt(() => {
      const put = IDBObjectStore.prototype.put;
      IDBObjectStore.prototype.put = function full() {
        throw new DOMException('full', 'QuotaExceededError');
      };
      Object.assign(globalThis, {
        makeRoom: () => {
          IDBObjectStore.prototype.put = put;
        },
      });
    });
    await turn(page, 'ArrowLeft');
    const told = page.locator('.not-saved');
    await expect
      .poll(() => told.textContent(), { timeout: 5000 })
      .toMatch(/^Not saved here: the browser.s store is full\./);
    await page.evaluate(() => (globalThis as unknown as { makeRoom(): void }).makeRoom());
    await turn(page, 'ArrowLeft');
    await expect.poll(() => told.count(), { timeout: 10_000 }).toBe(0);
    expect(await storedOf(page)).toMatchObject({ shared: [{ value: 18 }] });
  });
});
