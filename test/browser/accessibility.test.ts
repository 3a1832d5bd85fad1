import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { accessibilityProblems } from '../support/axe.ts';
import { usePage } from '../support/page.ts';
import { blankIn, cellsOf } from '../support/worksheet-page.ts';

const harness = usePage();

/** Shows what a narrow page keeps behind "More". */
async function actionsShown(page: Page): Promise<void> {
  const more = page.locator('.page-head .more');
  if (await more.isVisible()) await more.click();
}

async function openSheet(page: Page, part: string): Promise<void> {
  await actionsShown(page);
  await page.locator(`[data-part="${part}"]`).first().click();
  await page.locator('dialog').waitFor();
}

async function closeSheet(page: Page): Promise<void> {
  await page.keyboard.press('Escape');
  await page.locator('dialog').waitFor({ state: 'detached' });
}

const pages = [
  ['wide', 1440, 900, 'light'],
  ['wide', 1440, 900, 'dark'],
  ['narrow', 390, 844, 'light'],
  ['narrow', 390, 844, 'dark'],
] as const;

describe('what a checker sees of WCAG 2.2 AA', () => {
  test.each(pages)(
    'by hand: nothing broken, %s at %i by %i, %s',
    { timeout: 180_000 },
    async (_size, width, height, scheme) => {
      // motion off: a tint that fades would be measured half way
      const { page, idle } = await harness.open({ width, height, scheme, reducedMotion: true });
      expect(await accessibilityProblems(page)).toEqual([]);
      for (const [kind, key] of [
        ['comparison', 'trim'],
        ['design', 'within'],
        ['exclusion', 'reason'],
      ] as const) {
        await blankIn(
          cellsOf(page, kind)
            .filter({ has: page.locator(`[data-blank="${key}"]`) })
            .first(),
          key,
        ).click();
        await page.locator('[data-part="editor"]').waitFor();
        await idle();
        expect(await accessibilityProblems(page, '[data-part="editor"]')).toEqual([]);
        await page.keyboard.press('Escape');
      }
      for (const part of ['worksheets', 'log', 'save']) {
        await openSheet(page, part);
        expect(await accessibilityProblems(page, 'dialog')).toEqual([]);
        await closeSheet(page);
      }
    },
  );

  test('by hand: nothing broken while the conditions are hidden, with open blanks, failures and an open list', async () => {
    const { page, idle } = await harness.open({ path: '#w=demo-glove-peg-test', reducedMotion: true });
    await page.locator('[data-part="then"][data-after="c1"]').click();
    await page.locator('.offer[data-kind="reshape"]').click();
    await idle();
    await page.locator('.end [data-part="then"]').click();
    expect(await page.locator('[data-part="failed"]').count()).toBeGreaterThan(0);
    expect(await accessibilityProblems(page)).toEqual([]);
    await openSheet(page, 'worksheets');
    await page.locator('[data-part="new-empty"]').click();
    await idle();
    expect(await accessibilityProblems(page)).toEqual([]);
  });
});

interface Named {
  readonly role: string;
  readonly name: string;
  readonly tab: number;
}

describe('keyboard and screen reader', () => {
  test('by hand: every blank is a named stop of the keyboard, and every focus is seen', {
    timeout: 120_000,
  }, async () => {
    const { page } = await harness.open();
    const blanks = await page.locator('[data-blank]').evaluateAll((all): Named[] =>
      all.map((each) => ({
        role: each.getAttribute('role') ?? each.tagName,
        name: each.getAttribute('aria-label') ?? '',
        tab: (each as HTMLElement).tabIndex,
      })),
    );
    expect(blanks.length).toBeGreaterThan(20);
    for (const { role, name, tab } of blanks) {
      expect([role, tab]).toEqual(['button', 0]);
      expect(name).toMatch(/^[a-z].{3,}: ./);
    }
    const unseen: string[] = [];
    const stops = new Set<string>();
    await page.locator('main').focus();
    for (let at = 0; at < 300; at++) {
      await page.keyboard.press('Tab');
      const stop = await page.evaluate(() => {
        const focused = document.activeElement as HTMLElement;
        const seen = [focused, ...focused.querySelectorAll<HTMLElement>('*')].some((each) => {
          const style = getComputedStyle(each);
          const outline = style.outlineStyle !== 'none' && Number.parseFloat(style.outlineWidth) >= 1;
          return outline || style.boxShadow !== 'none';
        });
        const box = focused.getBoundingClientRect();
        const inView =
          box.bottom > 0 && box.top < window.innerHeight && Number(getComputedStyle(focused).opacity) > 0.5;
        const cell = focused.closest<HTMLElement>('[data-cell]')?.dataset.cell ?? '';
        const name = focused.dataset.blank ?? focused.getAttribute('aria-label') ?? focused.textContent ?? '';
        return { id: `${cell} ${name.trim()}`, seen: seen && inView, body: focused === document.body };
      });
      if (stop.body) break;
      stops.add(stop.id);
      if (!stop.seen) unseen.push(stop.id);
    }
    expect(unseen).toEqual([]);
    const wanted = await page
      .locator('[data-blank]')
      .evaluateAll((all) =>
        all.map(
          (each) => `${each.closest<HTMLElement>('[data-cell]')?.dataset.cell} ${(each as HTMLElement).dataset.blank}`,
        ),
      );
    expect(wanted.filter((id) => !stops.has(id))).toEqual([]);
  });

  test('by hand: sliders say their value with its unit, and the live region what recomputed', async () => {
    const { page, idle } = await harness.open();
    const sliders = await page
      .locator('[role=slider]')
      .evaluateAll((all) =>
        all.map((each) =>
          ['aria-label', 'aria-valuetext', 'aria-valuemin', 'aria-valuemax'].map((name) => each.getAttribute(name)),
        ),
      );
    expect(sliders).toEqual([
      ['trim', '20 %', '0', '25'],
      ['cutoff', 'none', '1.5', '4'],
      ['fastest allowed', '150 ms', '50', '400'],
    ]);
    await page.locator('[data-shared="trim"] [role=slider]').focus();
    await page.keyboard.press('ArrowLeft');
    await idle();
    const live = page.locator('[data-part="live"]');
    expect(await live.getAttribute('aria-live')).toBe('polite');
    await expect.poll(() => live.textContent(), { timeout: 30_000 }).toBe('Recomputed: comparison, claim.');
    expect(await page.locator('[data-shared="trim"] [role=slider]').getAttribute('aria-valuetext')).toBe('19 %');
    await page.locator('[data-part="undo"]').click();
    await expect
      .poll(() => live.textContent(), { timeout: 30_000 })
      .toMatch(/^Taken back: trim 20 % → 19 %\. Recomputed: comparison, claim\.$/);
  });

  test('by hand: an editor takes the focus and gives it back; a sheet holds it', async () => {
    const { page } = await harness.open({ path: '#w=demo-glove-peg-test' });
    const blank = blankIn(cellsOf(page, 'score'), 'statistic');
    await blank.focus();
    await page.keyboard.press('Enter');
    await expect.poll(() => page.evaluate(() => document.activeElement?.getAttribute('role'))).toBe('option');
    await page.keyboard.press('Escape');
    expect(await blank.evaluate((each) => each === document.activeElement)).toBe(true);
    await page.locator('[data-part="log"]').focus();
    await page.keyboard.press('Enter');
    await page.locator('dialog').waitFor();
    for (let at = 0; at < 12; at++) {
      await page.keyboard.press('Tab');
      const inside = await page.evaluate(() => {
        const focused = document.activeElement;
        return focused === document.body || focused?.closest('dialog') !== null;
      });
      expect(inside).toBe(true);
    }
    await page.keyboard.press('Escape');
    await page.locator('dialog').waitFor({ state: 'detached' });
    await expect.poll(() => page.evaluate(() => (document.activeElement as HTMLElement).dataset.part)).toBe('log');
  });
});
