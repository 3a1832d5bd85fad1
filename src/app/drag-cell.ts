import { moveCell } from './cell-actions.ts';
import type { Page } from './page.ts';

/** Places by which a cell moves when it is let go at height `y`; `middles` are the cells' middles in order. */
export function placesMoved(at: number, y: number, middles: readonly number[]): number {
  let to = 0;
  for (const [i, middle] of middles.entries()) if (i !== at && y > middle) to++;
  return to - at;
}

/** Follows the pointer from a cell's handle and moves the cell to where it is let go; Escape gives up. */
export function startDrag(page: Page, id: string, event: PointerEvent): void {
  if (event.button !== 0) return;
  const handle = event.currentTarget as HTMLElement;
  const cells = [...document.querySelectorAll<HTMLElement>('[data-cell]')];
  const at = cells.findIndex((cell) => cell.dataset.cell === id);
  const dragged = cells[at];
  if (dragged === undefined) return;
  event.preventDefault();
  handle.setPointerCapture(event.pointerId);
  const start = event.clientY;
  const middles = (): number[] =>
    cells.map((cell) => {
      const box = cell.getBoundingClientRect();
      return box.top + box.height / 2;
    });
  const mark = (y: number): void => {
    const to = at + placesMoved(at, y, middles());
    for (const [i, cell] of cells.entries()) {
      cell.classList.toggle('drop-before', i === to && to < at);
      cell.classList.toggle('drop-after', i === to && to > at);
    }
  };
  const move = (moved: PointerEvent): void => {
    dragged.classList.add('dragged');
    mark(moved.clientY);
  };
  const end = (y: number | null): void => {
    handle.removeEventListener('pointermove', move);
    handle.removeEventListener('pointerup', up);
    handle.removeEventListener('pointercancel', cancel);
    document.removeEventListener('keydown', key, true);
    for (const cell of cells) cell.classList.remove('dragged', 'drop-before', 'drop-after');
    if (y === null || Math.abs(y - start) < 6) return;
    const places = placesMoved(at, y, middles());
    if (places !== 0) moveCell(page, id, places);
  };
  const up = (released: PointerEvent): void => end(released.clientY);
  const cancel = (): void => end(null);
  const key = (pressed: KeyboardEvent): void => {
    if (pressed.key === 'Escape') end(null);
  };
  handle.addEventListener('pointermove', move);
  handle.addEventListener('pointerup', up);
  handle.addEventListener('pointercancel', cancel);
  document.addEventListener('keydown', key, true);
}
