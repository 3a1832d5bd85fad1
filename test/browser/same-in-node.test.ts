import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, describe, expect, test, vi } from 'vitest';
import { main } from '../../src/replay/replay.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { usePage } from '../support/page.ts';
import { downloadOf } from '../support/worksheet-page.ts';

const harness = usePage();
const folder = mkdtempSync(join(tmpdir(), 'standfast-same-'));
afterAll(() => rmSync(folder, { recursive: true }));

describe('the same answer in the browser and in Node', () => {
  test('agrees with Node: results recorded by the page come out again there, to 1e-9', {
    timeout: 120_000,
  }, async () => {
    const { page, idle } = await harness.open();
    // another trim and cutoff than the file came with, so that nothing recorded before can stand in
    await page.locator('[data-part="shared-number"][data-shared="trim"] [role=slider]').focus();
    await page.keyboard.press('PageDown');
    await page.locator('[data-part="shared-number"][data-shared="cutoff"] [role=slider]').focus();
    await page.keyboard.press('PageDown');
    await idle();
    await page.locator('[data-part="save"]').click();
    const { name, bytes } = await downloadOf(page, () => page.locator('[data-part="save-json"]').click());
    const saved = JSON.parse(bytes.toString('utf8')) as Worksheet;
    expect(saved.shared.find(({ id }) => id === 'cutoff')?.value).not.toBeNull();
    const values = Object.values(saved.results).filter(({ status }) => status === 'value');
    expect(values).toHaveLength(saved.cells.length);
    const file = join(folder, name);
    writeFileSync(file, bytes);
    let told = '';
    const out = vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
      told += String(text);
      return true;
    });
    const exit = await main([file]);
    out.mockRestore();
    expect(told).toMatch(/Everything came out again/);
    expect(exit).toBe(0);
  });
});
