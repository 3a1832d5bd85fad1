import type { Kind, Registry, ValueType } from '../../cells/kind.ts';
import type { Cell, Worksheet } from '../worksheet/format.ts';

/** The kinds of the hidden cells behind the standing strip: its analyses, and the joint inference over them. */
export const STANDING = 'standing';
export const JOINT = 'joint';

/** Whether a cell of this kind is never shown among the cells. */
export function isHidden(kind: string): boolean {
  return kind === STANDING || kind === JOINT;
}

/** The port through which a kind hands on what it reads (its only port, of the type it gives), or null. */
export function passPort(kind: Kind | undefined): string | null {
  if (kind === undefined || kind.gives === null) return null;
  const ports = Object.entries(kind.takes);
  const only = ports.length === 1 ? ports[0] : undefined;
  return only !== undefined && only[1] === kind.gives ? only[0] : null;
}

/** The cells a reader sees, in order. */
export function visibleCells(worksheet: Worksheet): readonly Cell[] {
  return worksheet.cells.filter((cell) => !isHidden(cell.kind));
}

export function cellOf(worksheet: Worksheet, id: string): Cell | undefined {
  return worksheet.cells.find((cell) => cell.id === id);
}

/** What a cell gives, or null where it gives nothing or its kind is unknown. */
export function givesOf(registry: Registry, cell: Cell): ValueType | null {
  return registry[cell.kind]?.gives ?? null;
}

/** Cells before `position` that give `type`, nearest first; the left-out ones last. */
export function fittingAbove(
  worksheet: Worksheet,
  registry: Registry,
  position: number,
  type: ValueType,
): readonly Cell[] {
  const fitting: Cell[] = [];
  const leftOut: Cell[] = [];
  for (let at = Math.min(position, worksheet.cells.length) - 1; at >= 0; at--) {
    const cell = worksheet.cells[at] as Cell;
    if (givesOf(registry, cell) !== type) continue;
    (cell.leftOut === true ? leftOut : fitting).push(cell);
  }
  return [...fitting, ...leftOut];
}

/** Port -> nearest fitting cell before `position`; null where some port finds none. */
export function nearestFrom(
  worksheet: Worksheet,
  registry: Registry,
  position: number,
  kind: Kind,
): { readonly [port: string]: string } | null {
  const from: { [port: string]: string } = {};
  for (const [port, type] of Object.entries(kind.takes)) {
    const nearest = fittingAbove(worksheet, registry, position, type)[0];
    if (nearest === undefined) return null;
    from[port] = nearest.id;
  }
  return from;
}

/** Cells that read `id` directly. */
export function readersOf(worksheet: Worksheet, id: string): readonly Cell[] {
  return worksheet.cells.filter((cell) => Object.values(cell.from).includes(id));
}

/** The cell whose ports that read `source` now read `target`. */
export function rewired(cell: Cell, source: string, target: string): Cell {
  const from = Object.entries(cell.from).map(([port, id]) => [port, id === source ? target : id]);
  return { ...cell, from: Object.fromEntries(from) };
}

/** Ids of all cells that depend on `id`, however far below. */
export function dependentsOf(worksheet: Worksheet, id: string): ReadonlySet<string> {
  const found = new Set<string>();
  const queue = [id];
  for (let next = queue.pop(); next !== undefined; next = queue.pop()) {
    for (const reader of readersOf(worksheet, next)) {
      if (found.has(reader.id)) continue;
      found.add(reader.id);
      queue.push(reader.id);
    }
  }
  return found;
}

/** Kinds whose sentence may follow after `position` cells, in registry order. */
export function offersAt(worksheet: Worksheet, registry: Registry, position: number): readonly Kind[] {
  return Object.values(registry).filter(
    (kind) => kind.offer !== null && nearestFrom(worksheet, registry, position, kind) !== null,
  );
}

/** Ids of the shared numbers that settings refer to, anywhere inside. */
export function sharedIn(settings: unknown, found: Set<string> = new Set()): ReadonlySet<string> {
  if (settings === null || typeof settings !== 'object') return found;
  const values = Object.values(settings);
  const shared = (settings as { shared?: unknown }).shared;
  if (typeof shared === 'string' && values.length === 1) found.add(shared);
  else for (const value of values) sharedIn(value, found);
  return found;
}
