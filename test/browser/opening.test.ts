import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { describe, expect, test } from 'vitest';
import { findWorksheetBlock } from '../../src/worksheet/html.ts';
import { accessibilityProblems } from '../support/axe.ts';
import { usePage } from '../support/page.ts';

// Every page a test opens fails it where the console had an error, the policy was broken or anything was fetched.
const harness = usePage();

const single = pathToFileURL(resolve('dist/standfast.html')).href;

describe('the built page', () => {
  test('by hand: opens served on the first demo, every cell with its result', async () => {
    const { page } = await harness.open();
    expect(await page.locator('main [data-cell]').count()).toBe(10);
    expect(await page.locator('[data-part="failed"], [data-part="unknown"]').count()).toBe(0);
    expect(await page.locator('[data-part="strip-counts"]').textContent()).toMatch(
      /^\s*supported in \d+ of \d+ analyses/,
    );
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

  test.each(['light', 'dark'] as const)(
    'by hand: breaks nothing of WCAG 2.2 AA that a checker sees, %s',
    async (scheme) => {
      const { page } = await harness.open({ scheme });
      expect(await accessibilityProblems(page)).toEqual([]);
    },
  );
});
