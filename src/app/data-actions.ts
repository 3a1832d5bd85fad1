import type { Editor, Settings } from '../../cells/kind.ts';
import { count } from '../../cells/numbers.ts';
import type { DataBlock } from '../worksheet/format.ts';
import { demoFile } from './demos.ts';
import { setData } from './edits.ts';
import type { FileActions } from './file-editor.ts';
import { looksLikeWorksheet, openWorksheetText } from './open-worksheet.ts';
import type { Page } from './page.ts';
import { readBlock } from './read-block.ts';
import { visibleCells } from './wiring.ts';

type FileBlank = Extract<Editor, { type: 'file' }>;

function fillFile(page: Page, cellId: string, block: DataBlock, settings: Settings): void {
  const known = page.worksheet.data.find((each) => each.fingerprint.bytes === block.fingerprint.bytes);
  const taken = known === undefined || known.name !== block.name ? block : known;
  page.parts.document.edit(`data ${block.name} read: ${count(block.rows)} rows`, (worksheet) =>
    setData(worksheet, cellId, taken, settings),
  );
}

/** What the file blank of a cell can be filled with. */
export function fileActions(
  page: Page,
  cellId: string,
  key: string,
  editor: FileBlank,
  close: () => void,
): FileActions {
  const take = (bytes: Uint8Array, name: string): void => {
    const block = readBlock(page, bytes, name);
    if (block === null) return;
    fillFile(page, cellId, block, editor.set(block.id));
    close();
  };
  return {
    file: async (file) => take(new Uint8Array(await file.arrayBuffer()), file.name),
    text: (text) => take(new TextEncoder().encode(text), 'pasted rows'),
    block: (id) => {
      page.fill(cellId, key, editor.set(id));
      close();
    },
    demo: (name) => {
      const text = demoFile(name);
      if (text !== undefined) take(new TextEncoder().encode(text), name);
    },
  };
}

/** The file blanks of the worksheet: where data that arrive may go. */
export function fileBlanks(page: Page): readonly { cellId: string; title: string; editor: FileBlank }[] {
  return visibleCells(page.worksheet).flatMap((cell) => {
    const kind = page.parts.registry[cell.kind];
    if (kind === undefined) return [];
    for (const part of kind.sentence(cell.settings, page.parts.engine.context(cell.id))) {
      if (typeof part !== 'string' && part.editor.type === 'file') {
        return [{ cellId: cell.id, title: part.shown, editor: part.editor }];
      }
    }
    return [];
  });
}

/** Fills a file blank with data that arrived by drop or paste. */
export function giveTo(page: Page, cellId: string, block: DataBlock): void {
  const blank = fileBlanks(page).find((each) => each.cellId === cellId);
  if (blank !== undefined) fillFile(page, cellId, block, blank.editor.set(block.id));
  page.show({ incoming: null, sheet: null });
}

/** A file dropped on the page: a worksheet opens; data go to the open data blank, or are asked about. */
export async function fileArrived(page: Page, file: File, cellId: string | null): Promise<void> {
  const bytes = new Uint8Array(await file.arrayBuffer());
  if (looksLikeWorksheet(bytes, file.name)) {
    await openWorksheetText(page, new TextDecoder().decode(bytes), file.name);
    return;
  }
  dataArrived(page, bytes, file.name, cellId);
}

export function dataArrived(page: Page, bytes: Uint8Array, name: string, cellId: string | null): void {
  const block = readBlock(page, bytes, name);
  if (block === null) return;
  const blanks = fileBlanks(page);
  const open = blanks.filter((blank) => blank.editor.value === null);
  const target = cellId !== null && blanks.some((blank) => blank.cellId === cellId) ? cellId : null;
  const only = open.length === 1 ? (open[0]?.cellId ?? null) : null;
  const to = target ?? only;
  if (to !== null) giveTo(page, to, block);
  else page.show({ incoming: block, sheet: 'incoming' });
}

/** Whether pasted text looks like rows with several values. */
export function looksLikeRows(text: string): boolean {
  const lines = text.split(/\r\n|\r|\n/).filter((line) => line.trim() !== '');
  return lines.length >= 2 && lines.slice(0, 5).every((line) => /[,;\t|]/.test(line));
}
