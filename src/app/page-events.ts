import { adoptFrom } from './adopt.ts';
import { dataArrived, fileArrived, looksLikeRows } from './data-actions.ts';
import { openSaved, openWorksheetText, wantedId } from './open-worksheet.ts';
import type { Page } from './page.ts';

/** What the whole page listens to: undo keys, paste, drop, a state chosen in a figure, leaving, and the address. */
export function listenToPage(page: Page): void {
  document.addEventListener('keydown', (event) => undoKey(page, event));
  document.addEventListener('pointerdown', (event) => pressedOutside(page, event));
  document.addEventListener('paste', (event) => pasted(page, event));
  document.addEventListener('dragover', (event) => dragged(event));
  document.addEventListener('dragleave', (event) => event.relatedTarget === null && showDrop(false));
  document.addEventListener('drop', (event) => dropped(page, event));
  document.addEventListener('sf-adopt', (event) => adoptFrom(page, event));
  window.addEventListener('pagehide', () => void page.parts.autosave.flush());
  document.addEventListener('visibilitychange', () => {
    if (document.visibilityState === 'hidden') void page.parts.autosave.flush();
  });
  window.addEventListener('hashchange', () => {
    const id = wantedId();
    if (id !== null && id !== page.worksheet.id) void openSaved(page, id);
  });
}

/** The quiet disclosures of a cell close when something else is pressed. */
function pressedOutside(page: Page, event: PointerEvent): void {
  if (page.view.panel === null || !(event.target instanceof Element)) return;
  if (event.target.closest('.panel, .offers, [data-part=arrange], [data-part=then]') === null)
    page.show({ panel: null });
}

/** Whether the keys belong to a field in which one types. */
function typing(event: Event): boolean {
  const [target] = event.composedPath();
  if (target instanceof HTMLTextAreaElement || target instanceof HTMLSelectElement) return true;
  return target instanceof HTMLInputElement && !['checkbox', 'radio', 'file', 'button'].includes(target.type);
}

function undoKey(page: Page, event: KeyboardEvent): void {
  if (!(event.ctrlKey || event.metaKey) || event.altKey || typing(event)) return;
  const key = event.key.toLowerCase();
  const redo = (key === 'z' && event.shiftKey) || key === 'y';
  if (key !== 'z' && !redo) return;
  event.preventDefault();
  if (redo) page.parts.document.redo();
  else page.parts.document.undo();
}

function pasted(page: Page, event: ClipboardEvent): void {
  if (typing(event)) return;
  const [file] = event.clipboardData?.files ?? [];
  const text = event.clipboardData?.getData('text/plain') ?? '';
  if (file !== undefined) void fileArrived(page, file, cellAt(event.target));
  else if (text.trimStart().startsWith('{')) void openWorksheetText(page, text, 'pasted text');
  else if (looksLikeRows(text)) dataArrived(page, new TextEncoder().encode(text), 'pasted rows', cellAt(event.target));
  else return;
  event.preventDefault();
}

function carriesFile(event: DragEvent): boolean {
  return event.dataTransfer?.types.includes('Files') === true;
}

function dragged(event: DragEvent): void {
  if (!carriesFile(event)) return;
  event.preventDefault();
  showDrop(true);
}

function showDrop(on: boolean): void {
  document.documentElement.classList.toggle('dropping', on);
}

function dropped(page: Page, event: DragEvent): void {
  showDrop(false);
  if (!carriesFile(event)) return;
  event.preventDefault();
  const [file] = event.dataTransfer?.files ?? [];
  if (file !== undefined) void fileArrived(page, file, cellAt(event.target));
}

function cellAt(target: EventTarget | null): string | null {
  return target instanceof Element ? (target.closest<HTMLElement>('[data-cell]')?.dataset.cell ?? null) : null;
}
