import type { Registry } from '../../cells/kind.ts';
import type { Cell, Worksheet } from '../worksheet/format.ts';
import { isHidden, passPort, readersOf, rewired } from './wiring.ts';

function sourceOf(registry: Registry, cell: Cell): string | undefined {
  const port = passPort(registry[cell.kind]);
  return port === null ? undefined : cell.from[port];
}

function place(cells: Cell[], cell: Cell): void {
  cells[cells.findIndex((each) => each.id === cell.id)] = cell;
}

/** Rewiring when `lower`, which reads `upper`, comes to stand above it; null where the ports would no longer fit. */
function passedOver(worksheet: Worksheet, registry: Registry, upper: Cell, lower: Cell): Cell[] | null {
  const source = sourceOf(registry, upper);
  if (source === undefined) return null;
  const cells = [...worksheet.cells];
  const through = sourceOf(registry, lower) === upper.id;
  if (through) {
    // both hand on what they read: the two change places in the flow, and what read the lower one reads the upper
    for (const reader of readersOf(worksheet, lower.id)) place(cells, rewired(reader, lower.id, upper.id));
    place(cells, rewired(upper, source, lower.id));
  }
  place(cells, rewired(lower, upper.id, source));
  return cells;
}

/** `lower` does not read `upper`: a kind that hands on what it reads steps into the flow of the cell it passes. */
function steppedOver(worksheet: Worksheet, registry: Registry, upper: Cell, lower: Cell): Cell[] {
  const cells = [...worksheet.cells];
  const source = sourceOf(registry, lower);
  const steps = source !== undefined && Object.values(upper.from).includes(source);
  if (steps && sourceOf(registry, upper) === undefined && readersOf(worksheet, lower.id).length === 0) {
    place(cells, rewired(upper, source, lower.id));
  }
  return cells;
}

/**
 * Moves a cell one place up (-1) or down (1) among the cells a reader sees; kinds that give what they take are
 * rewired so that the flow follows the order on the page. Null where it cannot move there.
 */
export function move(worksheet: Worksheet, registry: Registry, id: string, by: -1 | 1): Worksheet | null {
  const visible = worksheet.cells.filter((cell) => !isHidden(cell.kind));
  const at = visible.findIndex((cell) => cell.id === id);
  const other = visible[at + by];
  const cell = visible[at];
  if (cell === undefined || other === undefined) return null;
  const upper = by < 0 ? other : cell;
  const lower = by < 0 ? cell : other;
  const reads = Object.values(lower.from).includes(upper.id);
  const cells = reads ? passedOver(worksheet, registry, upper, lower) : steppedOver(worksheet, registry, upper, lower);
  if (cells === null) return null;
  const from = cells.findIndex((each) => each.id === upper.id);
  const to = cells.findIndex((each) => each.id === lower.id);
  const first = cells[from] as Cell;
  cells[from] = cells[to] as Cell;
  cells[to] = first;
  return { ...worksheet, cells };
}

/** Moves a cell by several places, as far as its ports allow; null where it cannot move at all. */
export function moveBy(worksheet: Worksheet, registry: Registry, id: string, places: number): Worksheet | null {
  let moved: Worksheet | null = null;
  for (let n = 0; n < Math.abs(places); n++) {
    const next = move(moved ?? worksheet, registry, id, places < 0 ? -1 : 1);
    if (next === null) return moved;
    moved = next;
  }
  return moved;
}
