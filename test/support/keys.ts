import type { Page } from 'playwright-core';
import { waitForIdle } from './wait-for-idle.ts';

/** Whether what has the focus, or what it stands in, matches a selector. */
async function focusIsOn(page: Page, selector: string): Promise<boolean> {
  return page.evaluate((wanted) => document.activeElement?.matches(wanted) === true, selector);
}

async function pressUntil(page: Page, key: string, selector: string, most: number): Promise<void> {
  for (let presses = 0; presses <= most; presses++) {
    if (await focusIsOn(page, selector)) return;
    await page.keyboard.press(key);
  }
  throw new Error(`${key} pressed ${most} times did not reach ${selector}`);
}

/** Goes on with Tab until the focus is on it. */
export function tabTo(page: Page, selector: string): Promise<void> {
  return pressUntil(page, 'Tab', selector, 150);
}

/** Goes back with Shift+Tab until the focus is on it. */
export function tabBackTo(page: Page, selector: string): Promise<void> {
  return pressUntil(page, 'Shift+Tab', selector, 150);
}

/** Opens the blank of a cell, by keys alone. */
async function openBlank(page: Page, cell: string, key: string): Promise<void> {
  await tabTo(page, `[data-cell="${cell}"] [data-blank="${key}"]`);
  await page.keyboard.press('Enter');
  await page.waitForFunction(() => document.activeElement?.closest('[data-part="editor"]') !== null);
}

/** Takes one option of a blank, by keys alone. */
export async function chooseByKeys(page: Page, cell: string, key: string, value: string): Promise<void> {
  await openBlank(page, cell, key);
  await page.keyboard.press('Home');
  await pressUntil(page, 'ArrowDown', `[role=option][data-value="${value}"]`, 30);
  await page.keyboard.press('Enter');
  await waitForIdle(page);
}

/** Ticks the named boxes of a blank that are not ticked, and the other way round; by keys alone. */
export async function tickByKeys(page: Page, cell: string, key: string, values: readonly string[]): Promise<void> {
  await openBlank(page, cell, key);
  await page.locator('[data-part="editor"] input[type=checkbox]').first().waitFor();
  const boxes = await page.locator('[data-part="editor"] input[type=checkbox]:enabled').evaluateAll((all) =>
    all.map((each) => ({
      value: (each as HTMLInputElement).dataset.value ?? '',
      on: (each as HTMLInputElement).checked,
    })),
  );
  for (const { value, on } of boxes) {
    if (values.includes(value) === on) continue;
    await pressUntil(page, 'Tab', `[data-part="editor"] input[data-value="${value}"]`, 30);
    await page.keyboard.press('Space');
  }
  await page.keyboard.press('Escape');
  await waitForIdle(page);
}

/** Types into a blank and takes it, by keys alone. */
export async function typeByKeys(page: Page, cell: string, key: string, text: string): Promise<void> {
  await openBlank(page, cell, key);
  await page.keyboard.press('ControlOrMeta+a');
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
  await waitForIdle(page);
}

/** Adds a cell of a kind below the last, by keys alone; the focus is then in its first blank. */
export async function addByKeys(page: Page, kind: string): Promise<void> {
  await tabTo(page, '.end [data-part="then"]');
  await page.keyboard.press('Enter');
  await page.locator('.end .offer').first().waitFor();
  await tabTo(page, '.end .offer');
  await pressUntil(page, 'ArrowDown', `.offer[data-kind="${kind}"]`, 20);
  await page.keyboard.press('Enter');
  await waitForIdle(page);
}
