import type { Page } from 'playwright-core';
import { waitForIdle } from './wait-for-idle.ts';

export interface Arriving {
  readonly name: string;
  readonly text: string | Uint8Array;
}

/** Drops a file on the page, as from the system's own file list. */
export async function dropFile(page: Page, { name, text }: Arriving): Promise<void> {
  const bytes = [...(typeof text === 'string' ? new TextEncoder().encode(text) : text)];
  await page.evaluate(
    ([fileName, content]) => {
      const dataTransfer = new DataTransfer();
      dataTransfer.items.add(new File([new Uint8Array(content)], fileName));
      for (const type of ['dragover', 'drop']) {
        document.body.dispatchEvent(new DragEvent(type, { dataTransfer, bubbles: true, cancelable: true }));
      }
    },
    [name, bytes] as const,
  );
  await waitForIdle(page);
}

/** Drops a data file and puts it in place of the one that the worksheet reads. */
export async function replaceData(page: Page, arriving: Arriving): Promise<void> {
  await dropFile(page, arriving);
  await page.locator('[data-part="give-to"]').first().click();
  await waitForIdle(page);
}

/** Pastes what is on the clipboard where the focus is. */
export async function pasteText(page: Page, text: string): Promise<void> {
  await page.context().grantPermissions(['clipboard-read', 'clipboard-write']);
  await page.evaluate((words) => navigator.clipboard.writeText(words), text);
  await page.keyboard.press('ControlOrMeta+v');
  await waitForIdle(page);
}

/** Opens a file from the list of worksheets. */
export async function openFile(page: Page, { name, text }: Arriving): Promise<void> {
  await page.locator('[data-part="worksheets"]').click();
  await page
    .locator('[data-part="open-file"]')
    .setInputFiles({ name, mimeType: 'application/octet-stream', buffer: Buffer.from(text) });
  await page.locator('dialog').waitFor({ state: 'detached' });
  await waitForIdle(page);
}
