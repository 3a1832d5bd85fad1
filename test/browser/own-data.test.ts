import { writeFileSync } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { main as replay } from '../../src/replay/replay.ts';
import { addByKeys, chooseByKeys, tabBackTo, tabTo, tickByKeys, typeByKeys } from '../support/keys.ts';
import { ownEstimate, ownRows } from '../support/own-experiment.ts';
import { usePage } from '../support/page.ts';
import {
  addLast,
  cellsOf,
  chooseIn,
  decidedOf,
  downloadOf,
  openOther,
  recordOf,
  sentenceOf,
  statusesOf,
  stripOf,
  tickIn,
  typeIn,
} from '../support/worksheet-page.ts';

const harness = usePage();
let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'standfast-own-'));
});
afterAll(() => rm(folder, { recursive: true }));

const sentences = [
  'Read load.csv: 13 rows, one per trial, from 13 persons.',
  'Turn load_tone, load_voice into rows of load by signal.',
  'Each person met every signal (tone, voice); nothing differs between persons; the outcome is load in points, with one score each, where lower is better.',
  'Set aside person p13 because the headset was off.',
  'Set aside a score when its load is further than 3 MAD from the median of all scores, whatever the signal.',
  'Score each person under each signal by the mean of the kept scores.',
  'Compare voice with tone on the 20 % trimmed mean of differences, two-sided, at \u03b1 = .05.',
  'The claim: voice is lower than tone on load by more than 0 points; in own words: Voice loads less.',
];

/** What the page says of the finding: every sentence, the figure's words, the strip, and every number of every row. */
async function findingOf(page: Page) {
  const cells = await page.locator('[data-cell]').all();
  const comparison = cellsOf(page, 'comparison');
  const table = comparison.locator('[data-part="table"]').first();
  if ((await table.getAttribute('open')) === null) await table.locator('summary').click();
  return {
    sentences: await Promise.all(cells.map(sentenceOf)),
    planned: await comparison.locator('[data-part="chart"]').getAttribute('aria-label'),
    strip: await stripOf(page),
    rows: await table.locator('tbody tr').allTextContents(),
  };
}

/** What was found must be there, come back after a reload, from the list of worksheets and from the saved file. */
async function keptEverywhere(page: Page, idle: () => Promise<void>): Promise<void> {
  const found = await findingOf(page);
  expect(found.sentences).toEqual(sentences);
  expect(found.planned).toMatch(ownEstimate);
  expect(found.strip).toMatch(/^supported in \d+ of \d+ analyses/);
  expect(Object.values(await statusesOf(page)).every((status) => status === 'fresh')).toBe(true);
  const decided = await decidedOf(page);

  await page.locator('[data-part="save"]').click();
  const saved = await downloadOf(page, () => page.locator('[data-part="save-json"]').click());
  expect(saved.name).toBe('Load under two signals.standfast.json');
  const file = join(folder, saved.name);
  writeFileSync(file, saved.bytes);
  const out = vi.spyOn(process.stdout, 'write').mockImplementation(() => true);
  expect(await replay([file])).toBe(0);
  out.mockRestore();

  await page.reload();
  await idle();
  expect(await decidedOf(page)).toEqual(decided);
  expect(await findingOf(page)).toEqual(found);

  await page.locator('[data-part="worksheets"]').click();
  await openOther(page, () => page.locator('[data-demo^="glove"]').click());
  expect((await recordOf(page)).title).toBe('Peg test: insulated against thin gloves');
  await page.locator('[data-part="worksheets"]').click();
  await openOther(page, () => page.locator(`[data-saved="${decided.id}"] .title-word`).click());
  expect(await findingOf(page)).toEqual(found);

  await page.locator('[data-part="worksheets"]').click();
  await openOther(page, () => page.locator('[data-part="open-file"]').setInputFiles(file));
  const reopened = await decidedOf(page);
  expect({ ...reopened, id: '' }).toEqual({ ...decided, id: '' });
  expect(await findingOf(page)).toEqual(found);
}

describe('from an own wide file to a claim', () => {
  test('by hand: with the pointer', { timeout: 150_000 }, async () => {
    const { page, idle } = await harness.open();
    const file = join(folder, 'load.csv');
    writeFileSync(file, ownRows());
    await page.locator('[data-part="worksheets"]').click();
    await openOther(page, () => page.locator('[data-part="new-empty"]').click());
    await page.locator('[data-part="title"]').fill('Load under two signals');
    await page.locator('[data-blank="file"]').click();
    await page.locator('[data-part="editor"] input[type=file]').setInputFiles(file);
    await idle();

    await addLast(page, 'reshape');
    await tickIn(page, cellsOf(page, 'reshape'), 'columns', ['load_tone', 'load_voice']);
    await typeIn(page, cellsOf(page, 'reshape'), 'value', 'load');
    await typeIn(page, cellsOf(page, 'reshape'), 'by', 'signal');

    await addLast(page, 'design');
    const design = cellsOf(page, 'design');
    await chooseIn(page, design, 'participant', 'person');
    await tickIn(page, design, 'between', []);
    await tickIn(page, design, 'within', ['signal']);
    await chooseIn(page, design, 'outcome', 'load');
    await typeIn(page, design, 'unit', 'points');
    await chooseIn(page, design, 'rows', 'one score');
    await chooseIn(page, design, 'direction', 'lower');

    await addLast(page, 'exclusion');
    await chooseIn(page, cellsOf(page, 'exclusion'), 'what', 'named');
    await tickIn(page, cellsOf(page, 'exclusion'), 'participants', ['p13']);
    await typeIn(page, cellsOf(page, 'exclusion'), 'reason', 'the headset was off');
    await addLast(page, 'exclusion');
    const rule = cellsOf(page, 'exclusion').nth(1);
    await chooseIn(page, rule, 'what', 'trial');
    await chooseIn(page, rule, 'scope', 'pooled');
    await typeIn(page, rule, 'cutoff', '3');

    await addLast(page, 'score');
    expect(await cellsOf(page, 'score').locator('[data-part="veil"]').count()).toBe(1);
    await page.locator('[data-part="open-conditions"]').click();
    await page.locator('[data-part="reason"]').fill('a small try of our own');
    await page.locator('[data-part="open-now"]').click();
    await idle();

    await addLast(page, 'comparison');
    await addLast(page, 'claim');
    await chooseIn(page, cellsOf(page, 'claim'), 'relation', 'lower');
    await typeIn(page, cellsOf(page, 'claim'), 'title', 'Voice loads less.');
    await keptEverywhere(page, idle);
  });

  test('by hand: with the keyboard alone', { timeout: 150_000 }, async () => {
    const { page, idle } = await harness.open();
    const file = join(folder, 'load.csv');
    writeFileSync(file, ownRows(';'));
    await tabTo(page, '[data-part="worksheets"]');
    await page.keyboard.press('Enter');
    await page.locator('[data-part="new-empty"]').waitFor();
    await tabTo(page, '[data-part="new-empty"]');
    await openOther(page, () => page.keyboard.press('Enter'));
    await tabBackTo(page, '[data-part="title"]');
    await page.keyboard.press('ControlOrMeta+a');
    await page.keyboard.type('Load under two signals');
    await page.keyboard.press('Enter');
    await tabTo(page, '[data-blank="file"]');
    await page.keyboard.press('Enter');
    await page.locator('[data-part="editor"] input[type=file]').waitFor({ state: 'attached' });
    await tabTo(page, '[data-part="editor"] input[type=file]');
    const [chooser] = await Promise.all([page.waitForEvent('filechooser'), page.keyboard.press('Space')]);
    await chooser.setFiles(file);
    await idle();

    await addByKeys(page, 'reshape');
    await tickByKeys(page, 'c2', 'columns', ['load_tone', 'load_voice']);
    await typeByKeys(page, 'c2', 'value', 'load');
    await typeByKeys(page, 'c2', 'by', 'signal');
    await addByKeys(page, 'design');
    await chooseByKeys(page, 'c3', 'participant', 'person');
    await tickByKeys(page, 'c3', 'within', ['signal']);
    await tickByKeys(page, 'c3', 'between', []);
    await chooseByKeys(page, 'c3', 'outcome', 'load');
    await typeByKeys(page, 'c3', 'unit', 'points');
    await chooseByKeys(page, 'c3', 'rows', 'one score');
    await chooseByKeys(page, 'c3', 'direction', 'lower');
    await addByKeys(page, 'exclusion');
    await chooseByKeys(page, 'c4', 'what', 'named');
    await tickByKeys(page, 'c4', 'participants', ['p13']);
    await typeByKeys(page, 'c4', 'reason', 'the headset was off');
    await addByKeys(page, 'exclusion');
    await chooseByKeys(page, 'c5', 'what', 'trial');
    await typeByKeys(page, 'c5', 'cutoff', '3');
    await chooseByKeys(page, 'c5', 'scope', 'pooled');
    await addByKeys(page, 'score');
    await tabTo(page, '[data-cell="c6"] [data-part="veil"] button');
    await page.keyboard.press('Enter');
    await page.locator('[data-part="reason"]').waitFor();
    await tabTo(page, '[data-part="reason"]');
    await page.keyboard.type('a small try of our own');
    await tabTo(page, '[data-part="open-now"]');
    await page.keyboard.press('Enter');
    await idle();
    await addByKeys(page, 'comparison');
    await addByKeys(page, 'claim');
    await chooseByKeys(page, 'c8', 'relation', 'lower');
    await typeByKeys(page, 'c8', 'title', 'Voice loads less.');
    await keptEverywhere(page, idle);
  });
});
