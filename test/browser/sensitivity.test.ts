import { describe, expect, test } from 'vitest';
import { usePage } from '../support/page.ts';
import { addLast, blankIn, cellsOf, decidedOf, recordOf, statusesOf } from '../support/worksheet-page.ts';

const harness = usePage();

/** The first demo with a sensitivity cell at its end. */
async function opened(width = 1440) {
  const shown = await harness.open({ width });
  await addLast(shown.page, 'sensitivity');
  const cell = cellsOf(shown.page, 'sensitivity');
  await cell.scrollIntoViewIfNeeded();
  await shown.idle();
  const text = async (part: string) =>
    ((await cell.locator(`[data-part="${part}"]`).textContent()) ?? '').replace(/\s+/g, ' ').trim();
  return { ...shown, cell, text };
}

describe('the sensitivity cell on the page', () => {
  test('theory: it counts as the strip does, with the same joint p, and stands there as the worksheet', async () => {
    const { page, cell, text } = await opened();
    expect(Object.values(await statusesOf(page)).every((status) => status === 'fresh')).toBe(true);
    const strip = (await page.locator('[data-part="strip-joint"]').textContent()) ?? '';
    expect(strip).toMatch(/^joint p [=<] \.\d{3} \(average Z, 1,999 relabellings\)$/);
    expect(await text('joint')).toContain(strip);
    expect(await text('walk-sentence')).toMatch(/^\d+ of \d+\. .*These are the worksheet’s own settings\./);
    expect(await cell.locator('[data-part="adopt"]').isDisabled()).toBe(true);
    expect(await blankIn(cell, 'cutoff').textContent()).toBe('none, 2, 2.5, 3');
  });

  test('theory: walked by keyboard, an analysis is taken over as one edit and taken back', async () => {
    const { page, cell, idle, text } = await opened();
    const before = await decidedOf(page);
    const planned = await text('walk-sentence');
    await cell.locator('[data-part="walk"]').focus();
    await page.keyboard.press('End');
    await page.keyboard.press('ArrowUp');
    const read = await text('walk-sentence');
    expect(read).not.toBe(planned);
    await page.keyboard.press('Enter');
    await idle();
    expect(await decidedOf(page)).not.toEqual(before);
    const { log } = await recordOf(page);
    expect(log.at(-1)?.what).toMatch(/^state of an analysis of the grid taken over: /);
    // the same analysis is now the worksheet's own, with the same numbers
    const numbers = (sentence: string) => /minus tone is [^:]*:/.exec(sentence)?.[0];
    expect(numbers(await text('walk-sentence'))).toBe(numbers(read));
    expect(await text('walk-sentence')).toContain('These are the worksheet’s own settings.');
    await page.locator('[data-part="undo"]').click();
    await idle();
    expect(await decidedOf(page)).toEqual(before);
  });

  test('by hand: pointing at a column reads it; nothing runs over the edge of a narrow page', async () => {
    const { page, cell, text } = await opened();
    const box = await cell.locator('.walk-picture canvas').boundingBox();
    if (box === null) throw new Error('the picture is not drawn');
    await page.mouse.move(box.x + box.width - 12, box.y + 60);
    await expect.poll(() => text('walk-sentence')).toMatch(/^(\d+) of \1\. /);
    const narrow = await opened(390);
    expect(await narrow.page.evaluate(() => document.documentElement.scrollWidth)).toBeLessThanOrEqual(390);
  });
});
