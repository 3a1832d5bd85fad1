import { type Context, type Kind, plainSentence, type Registry, type SharedNumber } from '../../cells/kind.ts';
import type { Cell } from '../worksheet/format.ts';
import { titleOf } from './cell-model.ts';
import { sharedSentence } from './change-sentence.ts';
import * as edits from './edits.ts';
import { move, moveBy } from './move.ts';
import type { Page } from './page.ts';
import { cellOf } from './wiring.ts';

/** What the reader does to cells and shared numbers: each one edit with its sentence in the log. */

function titled(page: Page, id: string): string {
  const cell = cellOf(page.worksheet, id);
  return cell === undefined ? 'cell' : titleOf(page.parts.registry, cell);
}

/** Puts the focus on a part of the page once it is drawn: on the first selector that finds one. */
export function focusOn(...selectors: readonly string[]): void {
  const look = (left: number): void => {
    const all = selectors.map((selector) => document.querySelector<HTMLElement>(selector));
    const found = all.find((each) => each !== null);
    if (found !== undefined && found !== null) found.focus();
    else if (left > 0) requestAnimationFrame(() => look(left - 1));
  };
  requestAnimationFrame(() => requestAnimationFrame(() => look(3)));
}

export function focusCell(id: string): void {
  focusOn(`[data-cell="${id}"]`);
}

export function addCell(page: Page, after: string | null, kind: Kind): void {
  const { document: open, registry } = page.parts;
  const over = (from: Cell['from']): Context => page.parts.engine.contextOver(from);
  const added = edits.addAfter(page.worksheet, registry, after, kind, over);
  if (added === null) return;
  open.edit(`${titleOf(registry, cellOf(added.worksheet, added.id) as Cell)} added`, () => added.worksheet);
  page.show({ panel: null });
  focusOn(`[data-cell="${added.id}"] [data-blank]`, `[data-cell="${added.id}"]`);
}

export function duplicateCell(page: Page, id: string): void {
  const copy = edits.duplicate(page.worksheet, page.parts.registry, id);
  if (copy === null) return;
  page.parts.document.edit(`${titled(page, id)} duplicated`, () => copy.worksheet);
  page.show({ panel: null });
  focusCell(copy.id);
}

export function moveCell(page: Page, id: string, places: number): void {
  const { document: open, registry } = page.parts;
  const moved = moveBy(page.worksheet, registry, id, places);
  if (moved === null) {
    page.say(
      `The ${titled(page, id)} cannot move ${places < 0 ? 'up' : 'down'}: it would stand apart from what it reads.`,
    );
    return;
  }
  open.edit(`${titled(page, id)} moved ${places < 0 ? 'up' : 'down'}`, () => moved);
  focusCell(id);
}

export function mayMove(page: Page, id: string, by: -1 | 1): boolean {
  return move(page.worksheet, page.parts.registry, id, by) !== null;
}

export function leaveOutCell(page: Page, id: string): void {
  const out = cellOf(page.worksheet, id)?.leftOut !== true;
  const label = `${titled(page, id)} ${out ? 'left out for now' : 'put back'}`;
  page.parts.document.edit(label, (worksheet) => edits.leaveOut(worksheet, id, out));
  page.show({ panel: null });
  focusCell(id);
}

export function removeCell(page: Page, id: string): void {
  const { document: open, registry } = page.parts;
  const visible = page.worksheet.cells.map((cell) => cell.id);
  const at = visible.indexOf(id);
  open.edit(`${titled(page, id)} removed`, (worksheet) => edits.remove(worksheet, registry, id));
  page.show({ panel: null, blank: null });
  const next = visible[at - 1] ?? visible[at + 1];
  if (next !== undefined) focusCell(next);
}

export function readFrom(page: Page, id: string, port: string, source: string): void {
  const label = `${titled(page, id)} reads another ${titled(page, source)}`;
  page.parts.document.edit(label, (worksheet) => edits.setFrom(worksheet, id, port, source));
}

export function setShared(page: Page, id: string, value: number | null): void {
  page.parts.document.edit(
    (before, after) => sharedSentence(before, after, id),
    (worksheet) => edits.setShared(worksheet, id, value),
    { merge: `shared.${id}` },
  );
}

export function renameShared(page: Page, id: string, name: string): void {
  const was = page.worksheet.shared.find((each) => each.id === id)?.name;
  if (was === undefined || was === name || name.trim() === '') return;
  page.parts.document.edit(`shared number ${was} renamed ${name.trim()}`, (worksheet) =>
    edits.renameShared(worksheet, id, name.trim()),
  );
}

export function dropShared(page: Page, shared: SharedNumber): void {
  page.parts.document.edit(`shared number ${shared.name} removed`, (worksheet) =>
    edits.dropShared(worksheet, shared.id),
  );
}

/** Copies text; says so, or says that the browser refused. */
export async function copyText(page: Page, text: string, what: string): Promise<void> {
  try {
    await navigator.clipboard.writeText(text);
    page.say(`Copied: ${what}.`);
  } catch {
    page.say('The browser did not let this page copy. Select the text and copy it by hand.', true);
  }
}

/** A cell in a list: its quiet word and the beginning of its sentence. */
export function cellWords(registry: Registry, cell: Cell, context: Context): string {
  const kind = registry[cell.kind];
  if (kind === undefined) return cell.kind;
  const sentence = plainSentence(kind.sentence(cell.settings, context));
  return sentence.length > 60 ? `${sentence.slice(0, 58)} \u2026` : sentence;
}
