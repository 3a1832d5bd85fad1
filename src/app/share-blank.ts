import type { Blank } from '../../cells/kind.ts';
import { sharedId, shareNumber } from './edits.ts';
import type { Page } from './page.ts';

/** Makes the number of a blank a shared one under `name`: from now on it stands in the foot for every cell. */
export function shareBlank(page: Page, cellId: string, blank: Blank, name: string): void {
  const editor = blank.editor;
  if (editor.type !== 'number') return;
  const id = sharedId(page.worksheet, name);
  const { min, max, step, unit, value } = editor;
  const own = typeof value === 'number' ? value : null;
  const shared = { id, name, value: own, unit, min, max, step, none: editor.none !== null };
  page.parts.document.edit(`${blank.label} ${blank.shown} shared as ${name}`, (worksheet) =>
    shareNumber(worksheet, cellId, shared, editor.set({ shared: id })),
  );
}
