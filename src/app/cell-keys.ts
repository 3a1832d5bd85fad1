import { duplicateCell, focusOn, leaveOutCell, moveCell, removeCell } from './cell-actions.ts';
import type { Page } from './page.ts';

/** The keys that work while the focus is in a cell; `code` is the key's place, whatever letter it makes. */
export const CELL_KEYS: readonly {
  readonly code: string;
  readonly shift: boolean;
  readonly shown: string;
  readonly does: string;
  readonly run: (page: Page, id: string) => void;
}[] = [
  {
    code: 'ArrowUp',
    shift: false,
    shown: 'Alt + Up',
    does: 'move the cell up',
    run: (page, id) => moveCell(page, id, -1),
  },
  {
    code: 'ArrowDown',
    shift: false,
    shown: 'Alt + Down',
    does: 'move the cell down',
    run: (page, id) => moveCell(page, id, 1),
  },
  {
    code: 'ArrowDown',
    shift: true,
    shown: 'Alt + Shift + Down',
    does: 'duplicate the cell',
    run: duplicateCell,
  },
  {
    code: 'KeyO',
    shift: true,
    shown: 'Alt + Shift + O',
    does: 'leave the cell out, or put it back',
    run: leaveOutCell,
  },
  { code: 'Delete', shift: false, shown: 'Alt + Delete', does: 'remove the cell', run: removeCell },
  {
    code: 'Enter',
    shift: false,
    shown: 'Alt + Enter',
    does: 'Then \u2026: add a cell below',
    run: (page, id) => {
      page.show({ panel: { cellId: id, part: 'then' }, blank: null });
      focusOn('.offers button');
    },
  },
];

/** Runs what a key does in a cell. */
export function cellKey(page: Page, id: string, event: KeyboardEvent): void {
  if (!event.altKey || event.ctrlKey || event.metaKey) return;
  const entry = CELL_KEYS.find((each) => each.code === event.code && each.shift === event.shiftKey);
  if (entry === undefined) return;
  event.preventDefault();
  event.stopPropagation();
  entry.run(page, id);
}
