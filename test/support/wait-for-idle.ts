import type { Page } from 'playwright-core';

/** What the page exposes for tests. */
export interface Exposed {
  readonly standfast?: { readonly engine: { idle(): Promise<void> } };
}

/** Resolves when the worksheet is there, the engine is idle and two frames have passed since; fails after 30 s. */
export async function waitForIdle(page: Page): Promise<void> {
  const until = Date.now() + 30_000;
  while (!(await page.evaluate(() => (globalThis as Exposed).standfast?.engine !== undefined))) {
    if (Date.now() > until) throw new Error('the page did not come up within 30 s');
    await new Promise((done) => setTimeout(done, 25));
  }
  await page.evaluate(async () => {
    await (globalThis as Exposed).standfast?.engine.idle();
    const frame = () => new Promise((done) => requestAnimationFrame(done));
    await frame();
    await frame();
  });
}
