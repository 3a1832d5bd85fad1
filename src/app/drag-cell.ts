import { moveCell } from './cell-actions.ts';
import type { Page } from './page.ts';

/** Places by which a cell moves when it is let go at height `y`; `middles` are the cells' middles in order. */
export function placesMoved(at: number, y: number, middles: readonly number[]): number {
  let to = 0;
  for (const [i, middle] of middles.entries()) if (i !== at && y > middle) to++;
  return to - at;
}

/** Least way of the pointer, px, that is a drag and not a press. */
const LEAST = 6;

/** Follows the pointer from a cell's handle and moves the cell to where it is let go; Escape gives up. */
export function startDrag(page: Page, id: string, event: PointerEvent): void {
  const cells = [...document.querySelectorAll<HTMLElement>('[data-cell]')];
  const at = cells.findIndex((cell) => cell.dataset.cell === id);
  if (event.button !== 0 || at < 0) return;
  const handle = event.currentTarget as HTMLElement;
  event.preventDefault();
  handle.setPointerCapture(event.pointerId);
  const stop = new AbortController();
  const { signal } = stop;
  const end = (places: number): void => {
    stop.abort();
    for (const cell of cells) cell.classList.remove('dragged', 'drop-before', 'drop-after');
    if (places !== 0) moveCell(page, id, places);
  };
  const drop = ({ clientY }: PointerEvent): void =>
    end(Math.abs(clientY - event.clientY) < LEAST ? 0 : placesMoved(at, clientY, middlesOf(cells)));
  handle.addEventListener('pointermove', ({ clientY }) => mark(cells, at, clientY), { signal });
  handle.addEventListener('pointerup', drop, { signal });
  handle.addEventListener('pointercancel', () => end(0), { signal });
  document.addEventListener('keydown', ({ key }) => key === 'Escape' && end(0), { capture: true, signal });
}

function middlesOf(cells: readonly HTMLElement[]): readonly number[] {
  return cells.map((cell) => {
    const box = cell.getBoundingClientRect();
    return box.top + box.height / 2;
  });
}

/** A line where the cell would come to stand. */
function mark(cells: readonly HTMLElement[], at: number, y: number): void {
  const to = at + placesMoved(at, y, middlesOf(cells));
  for (const [i, cell] of cells.entries()) {
    cell.classList.toggle('dragged', i === at);
    cell.classList.toggle('drop-before', i === to && to < at);
    cell.classList.toggle('drop-after', i === to && to > at);
  }
}
