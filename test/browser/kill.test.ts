import { expect, test } from 'vitest';
import { usePage } from '../support/page.ts';
import { waitForIdle } from '../support/wait-for-idle.ts';
import { decidedOf, statusesOf, stripOf } from '../support/worksheet-page.ts';

const harness = usePage();

test('invariance: a tab closed during a sweep has lost nothing, and the sweep comes out as ever', async () => {
  const { page } = await harness.open({ path: '#w=demo-glove-peg-test' });
  const ruler = page.locator('[data-part="shared-number"] [role=slider]');
  await ruler.focus();
  await page.keyboard.press('ArrowLeft');
  await waitForIdle(page);
  const [decided, strip] = [await decidedOf(page), await stripOf(page)];
  await page.keyboard.press('ArrowLeft');
  await waitForIdle(page);
  await page.keyboard.press('ArrowRight');
  await expect.poll(async () => Object.values(await statusesOf(page)), { interval: 5 }).toContain('computing');
  // as a reader closes it, so that the page is told that it goes
  await page.close({ runBeforeUnload: true });
  const next = await page.context().newPage();
  await next.goto(`${harness.address}#w=demo-glove-peg-test`);
  await waitForIdle(next);
  expect(await decidedOf(next)).toEqual(decided);
  expect(await stripOf(next)).toBe(strip);
  expect(Object.values(await statusesOf(next)).every((status) => status === 'fresh')).toBe(true);
});
