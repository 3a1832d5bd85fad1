import type { DataBlock, Worksheet } from '../worksheet/format.ts';
import { findWorksheetBlock } from '../worksheet/html.ts';
import { parseWorksheet } from '../worksheet/parse.ts';
import type { Demo } from './demos.ts';
import { brokenIn } from './log-check.ts';
import { newWorksheet } from './new-worksheet.ts';
import type { Page } from './page.ts';
import { PROGRAM_VERSION } from './program-version.ts';
import { readBlock } from './read-block.ts';

const LAST = 'standfast.last';

/** Whether a file is a worksheet rather than rows of data: told by its name or its first letters. */
export function looksLikeWorksheet(bytes: Uint8Array, name: string): boolean {
  if (/\.(json|html?)$/i.test(name)) return true;
  const start = new TextDecoder()
    .decode(bytes.subarray(0, 200))
    .replace(/^\ufeff/, '')
    .trimStart();
  return start.startsWith('{') || /^<!doctype html/i.test(start);
}

export type Opened = { readonly worksheet: Worksheet } | { readonly problem: string };

/** A worksheet from the text of a file; a sentence where it is none. */
export function worksheetFrom(text: string, name: string): Opened {
  let json = text;
  if (/^\s*</.test(text) || /\.html?$/i.test(name)) {
    const found = findWorksheetBlock(text);
    if (!found.ok) return { problem: `${name}: ${found.sentence}` };
    json = found.text;
  }
  const parsed = parseWorksheet(json);
  return parsed.ok ? { worksheet: parsed.worksheet } : { problem: `${name}: ${parsed.sentence}` };
}

/** Puts a worksheet on the page; its id stands in the address, so that a reload opens it again. */
export async function openWorksheet(page: Page, worksheet: Worksheet, keep: boolean): Promise<void> {
  await page.parts.autosave.flush();
  page.view = { ...page.view, blank: null, panel: null, sheet: null, incoming: null, banner: null, pointed: null };
  page.parts.document.replace(worksheet);
  remember(worksheet.id);
  if (keep) page.parts.autosave.changed(worksheet);
  void sayBroken(page);
  window.scrollTo(0, 0);
}

/** Checks the decision log and the data of the worksheet that was opened, once its results are there. */
export async function sayBroken(page: Page): Promise<void> {
  const { worksheet } = page;
  await page.parts.engine.idle();
  const broken = brokenIn(worksheet);
  if (broken.length > 0) page.say(`${broken.join(' ')} The worksheet is open all the same.`, true);
}

/** Puts the id of the open worksheet into the address, and remembers it for the next visit. */
export function remember(id: string): void {
  const hash = `#w=${encodeURIComponent(id)}`;
  if (location.hash !== hash) location.hash = hash;
  try {
    localStorage.setItem(LAST, id);
  } catch {
    // the address alone then says which one is open
  }
}

/** The worksheet named in the address; a name cut off in the middle of a letter is none. */
export function namedId(): string | null {
  const named = /^#w=(.+)$/.exec(location.hash)?.[1];
  try {
    return named === undefined ? null : decodeURIComponent(named);
  } catch {
    return null;
  }
}

/** The worksheet named in the address, or the one open last. */
export function wantedId(): string | null {
  const named = namedId();
  if (named !== null) return named;
  try {
    return localStorage.getItem(LAST);
  } catch {
    return null;
  }
}

/** An id that is not taken by a worksheet kept in this browser. */
async function freeId(page: Page, id: string): Promise<string> {
  try {
    return (await page.parts.store.get(id)) === null && page.worksheet.id !== id ? id : crypto.randomUUID();
  } catch {
    return id;
  }
}

export async function openWorksheetText(page: Page, text: string, name: string): Promise<void> {
  const opened = worksheetFrom(text, name);
  if ('problem' in opened) {
    page.show({ sheet: null });
    page.say(opened.problem, true);
    return;
  }
  const id = await freeId(page, opened.worksheet.id);
  await openWorksheet(page, { ...opened.worksheet, id }, true);
}

export async function openDemo(page: Page, demo: Demo): Promise<void> {
  const opened = worksheetFrom(demo.text, demo.name);
  if ('problem' in opened) {
    page.say(opened.problem, true);
    return;
  }
  const id = await freeId(page, opened.worksheet.id);
  await openWorksheet(page, { ...opened.worksheet, id }, false);
}

export async function openSaved(page: Page, id: string): Promise<void> {
  try {
    const worksheet = await page.parts.store.get(id);
    if (worksheet !== null) await openWorksheet(page, worksheet, false);
    else page.say('That worksheet is not kept in this browser any more.', true);
  } catch {
    page.say('The browser does not let this page read what it kept.', true);
  }
}

/** A fresh worksheet, with data where there are some. */
export function openNew(page: Page, block: DataBlock | null): void {
  const seed = crypto.getRandomValues(new Uint32Array(1))[0] as number;
  const { registry } = page.parts;
  const worksheet = newWorksheet({ id: crypto.randomUUID(), seed, program: PROGRAM_VERSION, registry, block });
  void openWorksheet(page, worksheet, block !== null);
}

/** A file chosen in the list of worksheets: a worksheet opens; rows of data begin a new one. */
export async function openFile(page: Page, file: File): Promise<void> {
  const bytes = new Uint8Array(await file.arrayBuffer());
  if (looksLikeWorksheet(bytes, file.name)) {
    await openWorksheetText(page, new TextDecoder().decode(bytes), file.name);
    return;
  }
  const block = readBlock(page, bytes, file.name);
  if (block === null) page.show({ sheet: null });
  else openNew(page, { ...block, id: 'd1' });
}
