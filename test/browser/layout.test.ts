import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, describe, expect, test } from 'vitest';
import { usePage } from '../support/page.ts';
import { blankIn, cellsOf } from '../support/worksheet-page.ts';

const harness = usePage();
/** STANDFAST_PICTURES names a folder to keep the pictures in; the README's own is then made anew as well. */
const kept = process.env.STANDFAST_PICTURES;
const folder = kept ?? mkdtempSync(join(tmpdir(), 'standfast-pictures-'));
afterAll(() => {
  if (kept === undefined) rmSync(folder, { recursive: true });
});

async function picture(page: Page, name: string): Promise<void> {
  const bytes = await page.screenshot({ path: join(folder, `${name}.png`) });
  // width in the first chunk: a picture was made, of the page's own size
  expect(bytes.readUInt32BE(16)).toBe(page.viewportSize()?.width);
}

/** Blocks of the page that lie over each other, as "one over another"; each block is a text of its own. */
async function overlaps(page: Page): Promise<string[]> {
  return page.evaluate(() => {
    const blocks = [
      '[data-part="name"]',
      '[data-part="sentence"]',
      '.tally > div',
      'summary',
      '.side > p',
      '.chart',
      '.strip-of-points',
      '.others dl > div',
      '[data-part="failed"]',
      '.flow',
    ];
    const found = [...document.querySelectorAll<HTMLElement>(blocks.map((each) => `main ${each}`).join(','))];
    const boxes = found
      .map((each) => ({ each, box: each.getBoundingClientRect() }))
      .filter(({ box }) => box.height > 0);
    const over: string[] = [];
    const words = (each: HTMLElement): string =>
      (each.textContent ?? each.className).trim().replace(/\s+/g, ' ').slice(0, 40);
    for (const [i, a] of boxes.entries()) {
      for (const b of boxes.slice(i + 1)) {
        if (a.each.contains(b.each) || b.each.contains(a.each)) continue;
        const width = Math.min(a.box.right, b.box.right) - Math.max(a.box.left, b.box.left);
        const height = Math.min(a.box.bottom, b.box.bottom) - Math.max(a.box.top, b.box.top);
        if (width > 1 && height > 1) over.push(`${words(a.each)} over ${words(b.each)}`);
      }
    }
    return over;
  });
}

/** Lines of blanks that lie over each other, and blanks that reach out of their sentence. */
async function blankFaults(page: Page): Promise<string[]> {
  return page.locator('[data-part="sentence"]').evaluateAll((sentences) =>
    sentences.flatMap((sentence) => {
      const room = sentence.getBoundingClientRect();
      const blanks = [...sentence.querySelectorAll('[data-blank]')];
      const lines = blanks.flatMap((blank) => [...blank.getClientRects()].map((box) => ({ blank, box })));
      const out = lines.filter(({ box }) => box.right > room.right + 2 || box.left < room.left - 2);
      const over = lines.filter(({ blank, box }) =>
        lines.some(
          (other) =>
            other.blank !== blank &&
            Math.min(box.right, other.box.right) - Math.max(box.left, other.box.left) > 1 &&
            Math.min(box.bottom, other.box.bottom) - Math.max(box.top, other.box.top) > 2,
        ),
      );
      return [...out, ...over].map(({ blank }) => blank.textContent ?? '');
    }),
  );
}

/** Texts that are cut off by their own box, in head, cells and foot. */
async function cutOff(page: Page): Promise<string[]> {
  return page
    .locator('main p, main h2, main dt, main dd, main summary, .tally div, .count, .claim p, .dial-value, header .word')
    .evaluateAll((all) =>
      all
        .filter((each) => each.clientWidth > 0 && each.scrollWidth > each.clientWidth + 1)
        .filter((each) => getComputedStyle(each).display !== 'inline')
        .map((each) => (each.textContent ?? '').trim().slice(0, 60)),
    );
}

async function sideways(page: Page): Promise<number> {
  return page.evaluate(() => document.documentElement.scrollWidth - document.documentElement.clientWidth);
}

const pages = [
  ['wide', 1440, 900, 'light'],
  ['wide', 1440, 900, 'dark'],
  ['narrow', 390, 844, 'light'],
  ['narrow', 390, 844, 'dark'],
] as const;

describe('the page as it lies', () => {
  test.each(pages)(
    'by hand: nothing overlaps, is cut off or scrolls sideways, %s at %i by %i, %s',
    async (...[size, width, height, scheme]) => {
      const { page, idle } = await harness.open({ width, height, scheme, reducedMotion: true });
      await picture(page, `${size}-${scheme}`);
      if (kept !== undefined && size === 'wide' && scheme === 'light') {
        await page.screenshot({ path: 'test/browser/worksheet.png' });
      }
      expect(await sideways(page)).toBe(0);
      expect(await overlaps(page)).toEqual([]);
      expect(await blankFaults(page)).toEqual([]);
      expect(await cutOff(page)).toEqual([]);

      const foot = page.locator('footer');
      const tall = async (): Promise<number> => (await foot.boundingBox())?.height ?? 0;
      const open = size === 'wide';
      const before = await tall();
      await page.locator('[data-part="fold"]').click();
      await idle();
      expect((await tall()) < before).toBe(open);
      expect(Math.min(before, await tall())).toBeLessThan(60);
      expect(Math.max(before, await tall())).toBeLessThan(height / 2);
      expect(await sideways(page)).toBe(0);
      await picture(page, `${size}-${scheme}-foot`);

      const last = page.locator('.end [data-part="then"]');
      await last.scrollIntoViewIfNeeded();
      await page.keyboard.press('End');
      await picture(page, `${size}-${scheme}-end`);
      const end = await last.boundingBox();
      const top = (await foot.boundingBox())?.y ?? 0;
      expect((end?.y ?? 0) + (end?.height ?? 0)).toBeLessThanOrEqual(top);

      const comparison = cellsOf(page, 'comparison').first();
      await comparison.locator('[data-part="table"] summary').first().click();
      await blankIn(comparison, 'estimator').click();
      await page.locator('[data-part="editor"]').waitFor();
      await picture(page, `${size}-${scheme}-editor`);
      expect(await sideways(page)).toBe(0);
      const panel = await page.locator('[data-part="editor"]').boundingBox();
      expect(panel?.x ?? -1).toBeGreaterThanOrEqual(0);
      expect((panel?.x ?? 0) + (panel?.width ?? 0)).toBeLessThanOrEqual(width);
    },
  );

  test('by hand: no sideways scrolling and no overlap at other widths, down to 320 px', async () => {
    const { page, idle } = await harness.open({ path: '#w=demo-hearing-words', width: 1280, height: 800 });
    for (const width of [1280, 1024, 768, 320]) {
      await page.setViewportSize({ width, height: 800 });
      await idle();
      // figures are drawn anew a moment after the width has come to rest
      await expect.poll(() => sideways(page), { timeout: 10_000 }).toBe(0);
      await picture(page, `at-${width}`);
      expect(await overlaps(page)).toEqual([]);
      expect(await blankFaults(page)).toEqual([]);
    }
  });
});
