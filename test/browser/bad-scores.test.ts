import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { replaceData } from '../support/arrive.ts';
import { usePage } from '../support/page.ts';
import { cellsOf, chooseIn, decidedOf, statusesOf, tickIn, typeIn } from '../support/worksheet-page.ts';

const harness = usePage();
const demo = { path: '#w=demo-glove-peg-test' };
const rows = readFileSync('demo-data/glove-peg-test.csv', 'utf8');

async function failureOf(page: Page, kind: string): Promise<string> {
  return ((await cellsOf(page, kind).locator('[data-part="failed"]').textContent()) ?? '').trim();
}

/** Statuses by kind, the hidden cell too. */
async function kindStatuses(page: Page): Promise<Record<string, string>> {
  const { cells } = await decidedOf(page);
  const statuses = await statusesOf(page);
  return Object.fromEntries(cells.map(({ id, kind }) => [kind, statuses[id] ?? '']));
}

/** Statuses of the cells that are not `fresh`, by kind. */
async function notFresh(page: Page): Promise<Record<string, string>> {
  const all = Object.entries(await kindStatuses(page));
  return Object.fromEntries(all.filter(([, status]) => status !== 'fresh'));
}

describe('scores that an analysis cannot use say so in their cell, and only there', () => {
  test('refuses an outcome without numbers; taking it back brings every result back', async () => {
    const { page, idle } = await harness.open(demo);
    const before = await decidedOf(page);
    await replaceData(page, { name: 'words.csv', text: rows.replace(/,[\d.]+$/gm, ',slow') });
    expect(await failureOf(page, 'design')).toMatch(
      /^The outcome has to be numbers, but column "seconds" holds text, such as "slow" in row 1\./,
    );
    const { data, design, ...below } = await kindStatuses(page);
    expect([data, design]).toEqual(['fresh', 'failed']);
    expect(Object.keys(below)).toEqual(expect.arrayContaining(['score', 'comparison', 'claim', 'standing']));
    expect(new Set(Object.values(below))).toEqual(new Set(['waiting']));
    expect(await cellsOf(page, 'comparison').locator('[data-part="waiting"]').textContent()).toMatch(/Waiting for/);
    await page.locator('[data-part="undo"]').click();
    await idle();
    expect(await decidedOf(page)).toEqual(before);
    expect(await notFresh(page)).toEqual({});
  });

  test('refuses a participant in two groups, naming who', async () => {
    const { page } = await harness.open(demo);
    await replaceData(page, { name: 'twice.csv', text: `${rows}1,insulated,44\n` });
    expect(await failureOf(page, 'design')).toMatch(/wearer.*1.*(two|both|more than one).*glove|glove.*wearer.*1/i);
    expect((await kindStatuses(page)).data).toBe('fresh');
  });

  test('degenerate: equal scores everywhere give an estimate of 0 or a reason, never a broken number', async () => {
    const { page } = await harness.open(demo);
    await replaceData(page, { name: 'equal.csv', text: rows.replace(/,[\d.]+$/gm, ',40') });
    const cell = cellsOf(page, 'comparison');
    await cell.locator('[data-part="table"] summary').first().click();
    const shown = `${await page.locator('main').textContent()}${await page.locator('footer').textContent()}`;
    expect(shown).not.toMatch(/NaN|Infinity|undefined|null/);
    const planned = await cell.locator('tbody tr', { hasText: 'planned' }).textContent();
    expect(planned).toMatch(/spread|equal|same|vary|differ/i);
    const statuses = await kindStatuses(page);
    expect([statuses.data, statuses.design, statuses.score]).toEqual(['fresh', 'fresh', 'fresh']);
  });

  test('degenerate: one participant left in a group is said where the comparison stands', async () => {
    const { page } = await harness.open(demo);
    const lines = rows.trim().split('\n');
    const one = lines.filter(
      (line, i) => i === 0 || line.includes('thin') || line === lines.find((l) => l.includes('insulated')),
    );
    await replaceData(page, { name: 'one.csv', text: `${one.join('\n')}\n` });
    const shown = await cellsOf(page, 'comparison').textContent();
    expect(shown).not.toMatch(/NaN|Infinity|undefined/);
    expect(shown).toMatch(/(one|1|2|two|few)/i);
    expect((await kindStatuses(page)).score).toBe('fresh');
    await page.locator('[data-part="undo"]').click();
    await replaceData(page, { name: 'single.csv', text: `${lines[0]}\n${lines[1]}\n` });
    expect((await kindStatuses(page)).data).toBe('fresh');
    expect(await page.locator('main').textContent()).not.toMatch(/NaN|Infinity|undefined/);
  });

  test('degenerate: everybody set aside but one', async () => {
    const { page } = await harness.open(demo);
    await page.locator('[data-part="then"][data-after="c2"]').click();
    await page.locator('.offer[data-kind="exclusion"]').click();
    const cell = cellsOf(page, 'exclusion');
    await chooseIn(page, cell, 'what', 'named');
    const everyone = rows
      .trim()
      .split('\n')
      .slice(2)
      .map((line) => line.split(',')[0] ?? '');
    await tickIn(page, cell, 'participants', everyone);
    await typeIn(page, cell, 'reason', 'only one may stay');
    expect((await kindStatuses(page)).exclusion).toBe('fresh');
    expect(await failureOf(page, 'comparison')).toMatch(/Nobody is left with a score under insulated/);
    expect(await kindStatuses(page)).toMatchObject({
      data: 'fresh',
      design: 'fresh',
      score: 'fresh',
      claim: 'waiting',
    });
    expect(await page.locator('[data-part="strip-counts"]').textContent()).toMatch(/Waiting for/);
  });

  test('refuses the log of zero in the cell that takes it, naming the row', async () => {
    const { page, idle } = await harness.open(demo);
    await page.locator('[data-part="then"][data-after="c1"]').click();
    await page.locator('.offer[data-kind="derive"]').click();
    await replaceData(page, { name: 'zero.csv', text: `${rows}99,thin,0\n` });
    expect(await failureOf(page, 'derive')).toMatch(/(log|logarithm).*(0|zero)/i);
    expect((await kindStatuses(page)).data).toBe('fresh');
    await cellsOf(page, 'derive').locator('[data-part="arrange"]').click();
    await cellsOf(page, 'derive').locator('[data-part="remove"]').click();
    await idle();
    expect(await notFresh(page)).toEqual({});
  });
});
