import type { Context, Kind, Registry, Settings, ValueType } from '../../cells/kind.ts';
import type { Cell, DataBlock, SharedNumber, Worksheet } from '../worksheet/format.ts';
import { cellOf, fittingAbove, isHidden, JOINT, nearestFrom, passPort, rewired, STANDING, sharedIn } from './wiring.ts';

/** Every edit is pure: it gives the record the worksheet would become; the same record where nothing changes. */

export interface Added {
  readonly worksheet: Worksheet;
  readonly id: string;
}

function nextId(worksheet: Worksheet): string {
  const used = new Set(worksheet.cells.map((cell) => cell.id));
  let n = worksheet.cells.length + 1;
  while (used.has(`c${n}`)) n++;
  return `c${n}`;
}

function withCells(worksheet: Worksheet, cells: readonly Cell[]): Worksheet {
  return { ...worksheet, cells };
}

function changeCell(worksheet: Worksheet, id: string, change: (cell: Cell) => Cell): Worksheet {
  return withCells(
    worksheet,
    worksheet.cells.map((cell) => (cell.id === id ? change(cell) : cell)),
  );
}

/** The cells after `position` that find no cell on a port read `cell` there, where its type fits. */
function fillOpenPorts(cells: readonly Cell[], registry: Registry, position: number): readonly Cell[] {
  const given = cells[position] as Cell;
  const type = registry[given.kind]?.gives ?? null;
  if (type === null) return cells;
  const ids = new Set(cells.map((cell) => cell.id));
  return cells.map((cell, at) => {
    if (at <= position) return cell;
    const open = Object.entries(registry[cell.kind]?.takes ?? {}).filter(
      ([port, wanted]) => wanted === type && !ids.has(cell.from[port] ?? ''),
    );
    if (open.length === 0) return cell;
    return { ...cell, from: { ...cell.from, ...Object.fromEntries(open.map(([port]) => [port, given.id])) } };
  });
}

/** Puts a new cell in at `position`; a kind that gives what it takes goes INTO the flow. */
function insert(worksheet: Worksheet, registry: Registry, position: number, cell: Cell): Worksheet {
  const port = passPort(registry[cell.kind]);
  const source = port === null ? undefined : cell.from[port];
  const cells = worksheet.cells.map((each, at) => {
    if (source === undefined || at < position || !Object.values(each.from).includes(source)) return each;
    return rewired(each, source, cell.id);
  });
  cells.splice(position, 0, cell);
  return withStanding(withCells(worksheet, fillOpenPorts(cells, registry, position)), registry);
}

/** Keeps the hidden cells last, the standing one reading a claim that is there; adds them with the first claim. */
export function withStanding(worksheet: Worksheet, registry: Registry): Worksheet {
  const kind = registry[STANDING];
  if (kind === undefined) return worksheet;
  const others = worksheet.cells.filter((cell) => !isHidden(cell.kind));
  const was = worksheet.cells.find((cell) => cell.kind === STANDING);
  const from = nearestFrom(withCells(worksheet, others), registry, others.length, kind);
  if (was === undefined && from === null) return worksheet;
  if (was === undefined) {
    const settings = kind.defaults({ shared: worksheet.shared, given: {}, data: worksheet.data });
    const cell = { id: nextId(worksheet), kind: STANDING, version: kind.version, settings, from: from ?? {} };
    return withJoint(worksheet, registry, others, cell);
  }
  const reads = Object.values(was.from).every((id) => others.some((cell) => cell.id === id));
  const whole = reads && Object.keys(kind.takes).every((port) => was.from[port] !== undefined);
  return withJoint(worksheet, registry, others, whole ? was : { ...was, from: from ?? {} });
}

/** The cells with the standing one after them, and last the joint inference over what that one gives. */
function withJoint(worksheet: Worksheet, registry: Registry, others: readonly Cell[], standing: Cell): Worksheet {
  const kind = registry[JOINT];
  const was = worksheet.cells.find((cell) => cell.kind === JOINT);
  const cells = [...others, standing];
  if (kind !== undefined) {
    const from = { ...standing.from, sweep: standing.id };
    const settings = () => kind.defaults({ shared: worksheet.shared, given: {}, data: worksheet.data });
    const made = () => ({
      id: nextId(withCells(worksheet, cells)),
      kind: JOINT,
      version: kind.version,
      settings: settings(),
      from,
    });
    const same = was !== undefined && Object.entries(from).every(([port, id]) => was.from[port] === id);
    cells.push(was === undefined ? made() : same ? was : { ...was, from });
  } else if (was !== undefined) cells.push(was);
  const unchanged = cells.length === worksheet.cells.length && cells.every((cell, i) => cell === worksheet.cells[i]);
  return unchanged ? worksheet : withCells(worksheet, cells);
}

function positionAfter(worksheet: Worksheet, after: string | null): number {
  const visible = worksheet.cells.filter((cell) => !isHidden(cell.kind)).length;
  if (after === null) return visible;
  const at = worksheet.cells.findIndex((cell) => cell.id === after);
  return at < 0 ? visible : Math.min(at + 1, visible);
}

/**
 * Adds a cell of `kind` after the cell `after` (null = last), each port reading the nearest fitting cell above.
 * `contextOf` gives the context the kind's defaults may look at. Null where nothing above fits.
 */
export function addAfter(
  worksheet: Worksheet,
  registry: Registry,
  after: string | null,
  kind: Kind,
  contextOf: (from: Cell['from']) => Context,
): Added | null {
  const position = positionAfter(worksheet, after);
  const from = nearestFrom(worksheet, registry, position, kind);
  if (from === null) return null;
  const id = nextId(worksheet);
  const cell = { id, kind: kind.name, version: kind.version, settings: kind.defaults(contextOf(from)), from };
  return { worksheet: insert(worksheet, registry, position, cell), id };
}

/** A copy of a cell right after it. */
export function duplicate(worksheet: Worksheet, registry: Registry, id: string): Added | null {
  const cell = cellOf(worksheet, id);
  if (cell === undefined) return null;
  const port = passPort(registry[cell.kind]);
  const copy: Cell = {
    ...cell,
    id: nextId(worksheet),
    from: port === null ? cell.from : { ...cell.from, [port]: id },
  };
  return { worksheet: insert(worksheet, registry, positionAfter(worksheet, id), copy), id: copy.id };
}

/** Leaves a cell out for now, or puts it back. */
export function leaveOut(worksheet: Worksheet, id: string, out: boolean): Worksheet {
  return changeCell(worksheet, id, (cell) => {
    const { leftOut: _, ...rest } = cell;
    return out ? { ...rest, leftOut: true } : rest;
  });
}

/** Removes a cell; what read it now reads its source, where the types fit. */
export function remove(worksheet: Worksheet, registry: Registry, id: string): Worksheet {
  const gone = cellOf(worksheet, id);
  if (gone === undefined) return worksheet;
  const port = passPort(registry[gone.kind]);
  const source = port === null ? undefined : gone.from[port];
  const cells = worksheet.cells
    .filter((cell) => cell.id !== id)
    .map((cell) => {
      if (!Object.values(cell.from).includes(id)) return cell;
      if (source !== undefined) return rewired(cell, id, source);
      return { ...cell, from: Object.fromEntries(Object.entries(cell.from).filter(([, from]) => from !== id)) };
    });
  return withStanding(withCells(worksheet, cells), registry);
}

export function setSettings(worksheet: Worksheet, id: string, settings: Settings): Worksheet {
  return changeCell(worksheet, id, (cell) => ({ ...cell, settings }));
}

/** The cell that a port reads. */
export function setFrom(worksheet: Worksheet, id: string, port: string, source: string): Worksheet {
  return changeCell(worksheet, id, (cell) => ({ ...cell, from: { ...cell.from, [port]: source } }));
}

/** Cells that a port of `id` may read: those above it that give the type. */
export function sourcesOf(worksheet: Worksheet, registry: Registry, id: string, type: ValueType): readonly Cell[] {
  const at = worksheet.cells.findIndex((cell) => cell.id === id);
  return at < 0 ? [] : fittingAbove(worksheet, registry, at, type);
}

export function retitle(worksheet: Worksheet, title: string): Worksheet {
  return title === worksheet.title ? worksheet : { ...worksheet, title };
}

export function setShared(worksheet: Worksheet, id: string, value: number | null): Worksheet {
  const shared = worksheet.shared.map((each) => (each.id === id ? { ...each, value } : each));
  return { ...worksheet, shared };
}

export function renameShared(worksheet: Worksheet, id: string, name: string): Worksheet {
  return { ...worksheet, shared: worksheet.shared.map((each) => (each.id === id ? { ...each, name } : each)) };
}

/** An id for a shared number of that name: its letters and digits, not yet taken. */
export function sharedId(worksheet: Worksheet, name: string): string {
  const base =
    name
      .toLowerCase()
      .replace(/[^a-z0-9]+/g, '-')
      .replace(/^-|-$/g, '') || 'number';
  const used = new Set(worksheet.shared.map((each) => each.id));
  let id = base;
  for (let n = 2; used.has(id); n++) id = `${base}-${n}`;
  return id;
}

/** Makes a blank's number a shared one: `settings` are the cell's with the reference in it. */
export function shareNumber(worksheet: Worksheet, id: string, shared: SharedNumber, settings: Settings): Worksheet {
  return setSettings({ ...worksheet, shared: [...worksheet.shared, shared] }, id, settings);
}

/** Ids of the cells that use a shared number. */
export function usersOf(worksheet: Worksheet, sharedNumber: string): readonly Cell[] {
  return worksheet.cells.filter((cell) => sharedIn(cell.settings).has(sharedNumber));
}

/** Takes a shared number out that no cell uses; the same record where one does. */
export function dropShared(worksheet: Worksheet, id: string): Worksheet {
  if (usersOf(worksheet, id).length > 0) return worksheet;
  return { ...worksheet, shared: worksheet.shared.filter((each) => each.id !== id) };
}

/** Adds a data block and fills a cell with it. */
export function setData(worksheet: Worksheet, id: string, block: DataBlock, settings: Settings): Worksheet {
  const used = worksheet.data.filter((each) => each.id !== block.id);
  return setSettings({ ...worksheet, data: [...used, block] }, id, settings);
}
