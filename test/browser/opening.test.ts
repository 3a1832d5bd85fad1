import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { findWorksheetBlock } from '../../src/worksheet/html.ts';
import { usePage } from '../support/page.ts';
import { openOther, recordOf, statusesOf, stripOf } from '../support/worksheet-page.ts';

// Every page a test opens fails it where the console had an error, the policy was broken or anything was fetched.
const harness = usePage();

const single = pathToFileURL(resolve('dist/standfast.html')).href;

/** Every cell is worked out, is on the screen, and the head says why the conditions are open. */
async function hasResults(page: Page): Promise<void> {
  const statuses = await statusesOf(page);
  expect(Object.values(statuses).filter((status) => status !== 'fresh')).toEqual([]);
  const shown = (await recordOf(page)).cells.filter(({ kind }) => !['standing', 'joint'].includes(kind));
  expect(await page.locator('main [data-cell]').count()).toBe(shown.length);
  expect(await page.locator('[data-part="failed"], [data-part="waiting"], [data-part="unknown"]').count()).toBe(0);
  expect(await page.locator('.state').textContent()).toMatch(/opened early: invented demo data/);
  expect(await stripOf(page)).toMatch(/^supported in \d+ of \d+ analyses/);
}

describe('the built page', () => {
  test('by hand: opens served on the first demo, every cell with its result', async () => {
    const { page } = await harness.open();
    expect((await recordOf(page)).id).toBe('demo-bridge-alerts');
    await hasResults(page);
  });

  test('by hand: every demo worksheet opens from the list with its results', async () => {
    const { page } = await harness.open({ path: '#w=demo-glove-peg-test' });
    await page.locator('[data-part="worksheets"]').click();
    const names = await page.locator('[data-demo]').evaluateAll((all) => all.map((each) => each.dataset.demo ?? ''));
    expect(names).toHaveLength(4);
    await page.locator('dialog [data-part="close"]').click();
    for (const name of names) {
      await page.locator('[data-part="worksheets"]').click();
      await openOther(page, () => page.locator(`[data-demo="${name}"]`).click());
      await hasResults(page);
    }
  });

  test('degenerate: an address that names no worksheet opens the first demo', async () => {
    for (const path of ['#w=not-there', '#w=%', '#elsewhere']) {
      const { page } = await harness.open({ path, wait: false });
      await page.locator('sf-app [data-cell]').first().waitFor();
      expect((await recordOf(page)).id).toBe('demo-bridge-alerts');
    }
  });

  test('by hand: opens from a file, with its worker', async () => {
    const { page } = await harness.openAddress(single);
    expect(await page.locator('[data-part="strip-counts"]').textContent()).toMatch(
      /^\s*supported in \d+ of \d+ analyses/,
    );
    expect(page.workers().length).toBeGreaterThan(0);
  });

  test('invariance: the single file carries the first demo, ready to be replayed', () => {
    const found = findWorksheetBlock(readFileSync('dist/standfast.html', 'utf8'));
    const demo: unknown = JSON.parse(readFileSync('demo-data/bridge-alerts.standfast.json', 'utf8'));
    expect(found.ok && JSON.parse(found.text)).toEqual(demo);
  });

  test('refuses: a script that is put into the page, and a request to anywhere', async () => {
    const { page, problems } = await harness.open();
    const ran = await page.evaluate(async () => {
      const script = document.createElement('script');
      script.textContent = 'globalThis.planted = true';
      document.body.append(script);
      const fetched = await fetch('/licences.md').then(
        () => true,
        () => false,
      );
      return { planted: 'planted' in globalThis, fetched };
    });
    expect(ran).toEqual({ planted: false, fetched: false });
    // Told by an event that may come a little later.
    await expect.poll(() => problems.filter((each) => each.startsWith('console: policy: ')).length).toBe(2);
    const told = problems.splice(0).filter((each) => each.startsWith('console: policy: '));
    expect(told.map((each) => each.split(' ')[2])).toEqual(['script-src-elem', 'connect-src']);
  });
});
