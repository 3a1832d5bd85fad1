import { expect, test } from 'vitest';
import { usePage } from '../support/page.ts';

const harness = usePage();

test('degenerate: the built page opens with a worksheet on it and no console error', async () => {
  const { page, problems } = await harness.open();
  expect(await page.locator('[data-cell]').count()).toBeGreaterThan(3);
  expect(problems).toEqual([]);
});
