import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { openFile } from '../support/arrive.ts';
import { usePage } from '../support/page.ts';
import { addLast, cellsOf, recordOf, typeIn } from '../support/worksheet-page.ts';

const harness = usePage();

// Invented: ten people sort beads with and without music, two trials each; one trial is far too quick.
const TIMES = Array.from({ length: 10 }, (_, who) => [31 + who, 34 + ((who * 3) % 7), 29 + ((who * 5) % 9), 33 + who]);

/** The rows of the file; for some people the two labels change places. */
function rowsWith(swapped: (who: number) => boolean): string {
  const lines = TIMES.flatMap((times, who) =>
    times.map((time, trial) => {
      const label = trial < 2 !== swapped(who) ? 'music' : 'quiet';
      return `q${String.fromCharCode(106 - who)},${label},${(trial % 2) + 1},${who === 4 && trial === 1 ? 2 : time}`;
    }),
  );
  return `person,sound,trial,seconds\n${lines.join('\n')}\n`;
}

/** From the file to a claim, the conditions hidden all the way. */
async function claimBlind(page: Page, rows: string): Promise<void> {
  await openFile(page, { name: 'beads.csv', text: rows });
  await addLast(page, 'design');
  // The guess fills the other blanks.
  await typeIn(page, cellsOf(page, 'design'), 'unit', 's');
  await addLast(page, 'exclusion');
  await typeIn(page, cellsOf(page, 'exclusion'), 'cutoff', '3');
  await addLast(page, 'score');
  await addLast(page, 'comparison');
  await addLast(page, 'claim');
}

/** Everything that stands on the page, and what a reader who does not see hears of it. */
function pageText(page: Page): Promise<string> {
  return page.evaluate(() => {
    for (const folded of document.querySelectorAll('details')) folded.open = true;
    const words = [...document.querySelectorAll('main [aria-label], footer [aria-label]')];
    const said = [
      document.querySelector('#page')?.textContent ?? '',
      ...words.map((each) => each.getAttribute('aria-label')),
    ];
    return said.join('\n').replace(/\s+/g, ' ');
  });
}

describe('an own file with its conditions hidden', () => {
  test('invariance: the page says the same when labels change places', { timeout: 150_000 }, async () => {
    const texts: string[] = [];
    for (const swapped of [() => false, (who: number) => who % 3 === 0]) {
      const { page, idle } = await harness.open();
      await claimBlind(page, rowsWith(swapped));
      await idle();
      expect((await recordOf(page)).opening.state).toBe('blind');
      texts.push(await pageText(page));
    }
    expect(texts[0]).toBe(texts[1]);
    expect(texts[0]).toMatch(/reach at most about \u00b1[\d.]+ s to either side/);
    expect(texts[0]).toMatch(/\d+ analyses are planned\. None has looked at the sounds yet\./);
    expect(texts[0]).toContain('Compare quiet with music on the');
    expect(texts[0]).not.toContain('qa');
  });

  test('by hand: removing the design asks for a reason, and undo does not cross it', { timeout: 100_000 }, async () => {
    const { page, idle } = await harness.open();
    await claimBlind(
      page,
      rowsWith(() => false),
    );
    await cellsOf(page, 'design').focus();
    await page.keyboard.press('Alt+Delete');
    expect(await page.locator('[data-part="opens-why"]').textContent()).toContain('sound would be hidden no longer');
    await page.locator('[data-part="leave-hidden"]').click();
    expect(await cellsOf(page, 'design').count()).toBe(1);
    await cellsOf(page, 'design').focus();
    await page.keyboard.press('Alt+Delete');
    await page.locator('[data-part="reason"]').fill('only trying it');
    await page.locator('[data-part="open-now"]').click();
    await idle();
    expect((await recordOf(page)).opening).toMatchObject({ state: 'opened-early', reason: 'only trying it' });
    expect(await page.locator('[data-part="undo"]').isDisabled()).toBe(true);
  });

  test('by hand: data without a condition are opened with that reason', async () => {
    const { page, idle } = await harness.open();
    await openFile(page, { name: 'beads.csv', text: rowsWith(() => false) });
    await page.locator('[data-part="no-condition"] button').click();
    await page.locator('[data-part="open-now"]').click();
    await idle();
    expect((await recordOf(page)).opening).toMatchObject({ reason: 'there is no condition to hide' });
  });
});
