import { BLOCK_ID, READABLE_ID } from '../worksheet/html.ts';

let kept: string | null = null;

/**
 * Keeps the page as it was built, before anything is drawn into it: a saved page is this with another worksheet. To be
 * called first of all.
 */
export function keepPage(): void {
  const page = document.documentElement.cloneNode(true) as HTMLElement;
  for (const id of [BLOCK_ID, READABLE_ID]) page.querySelector(`#${id}`)?.remove();
  // Under the live-reload server the program is not in the page.
  if (page.querySelector('script[src]') !== null) return;
  kept = `<!doctype html>\n${page.outerHTML}`;
}

/** The page without a worksheet; null where the program is not inside the page. */
export function pageAsBuilt(): string | null {
  return kept;
}

/** The text of the worksheet that this page carries; null where it carries none. */
export function carriedText(): string | null {
  return document.getElementById(BLOCK_ID)?.textContent ?? null;
}
