import type { Kind, Registry, ValueType } from '../../cells/kind.ts';
import type { Cell, Worksheet } from '../worksheet/format.ts';
import type { Why } from './cell-state.ts';
import { circlesIn } from './circles.ts';
import { sameValue } from './same-value.ts';
import { cellName, fittingCells, typeInWords } from './sentences.ts';
import { sharedIdsIn } from './shared-references.ts';

/** What can be told about a cell from the worksheet alone, before anything is computed. */
export interface CellPlan {
  readonly cell: Cell;
  /** null = a kind this program does not know. */
  readonly kind: Kind | null;
  /** The ports in the order of `takes`, with the cell each reads; empty where there is a problem. */
  readonly ports: readonly { readonly port: string; readonly from: string }[];
  /** Ids of the shared numbers the settings reference. */
  readonly shared: readonly string[];
  /** Left out, and lets what it reads through. */
  readonly passes: boolean;
  /** Why it cannot be computed whatever the values are. */
  readonly problem: { readonly sentence: string; readonly why: Why } | null;
}

/**
 * The plan of every cell, in worksheet order.
 *
 * @param worksheet any record; ports may be unset, name cells that are not there, or run in a circle
 */
export function planCells(worksheet: Worksheet, registry: Registry): ReadonlyMap<string, CellPlan> {
  const cells = new Map(worksheet.cells.map((cell) => [cell.id, cell]));
  const looped = circlesIn(readsOf(worksheet, registry));
  return new Map(worksheet.cells.map((cell) => [cell.id, planCell(worksheet, registry, cells, looped, cell)]));
}

/** Whether a cell with this plan need not be looked at again. */
export function samePlan(a: CellPlan, b: CellPlan): boolean {
  return a.kind === b.kind && sameValue(a.cell, b.cell) && sameValue(a.problem, b.problem) && a.passes === b.passes;
}

function planCell(
  worksheet: Worksheet,
  registry: Registry,
  cells: ReadonlyMap<string, Cell>,
  looped: ReadonlyMap<string, readonly string[]>,
  cell: Cell,
): CellPlan {
  const kind = kindOf(registry, cell);
  if (kind === null) return { cell, kind, ports: [], shared: [], passes: false, problem: null };
  const sentence =
    circleProblem(worksheet, registry, looped.get(cell.id)) ??
    versionProblem(kind, cell) ??
    sharedProblem(worksheet, cell) ??
    portProblem(worksheet, registry, cells, cell, kind);
  const ports = Object.keys(kind.takes).map((port) => ({ port, from: cell.from[port] ?? '' }));
  if (sentence === null) {
    const passes = cell.leftOut === true && passesThrough(kind);
    return { cell, kind, ports, shared: sharedIdsIn(cell.settings), passes, problem: null };
  }
  const unset = ports.some(({ from }) => from === '');
  return { cell, kind, ports: [], shared: [], passes: false, problem: { sentence, why: unset ? 'unset' : 'failed' } };
}

function kindOf(registry: Registry, cell: Cell): Kind | null {
  return Object.hasOwn(registry, cell.kind) ? (registry[cell.kind] ?? null) : null;
}

/** Whether a cell of this kind that is left out lets what it reads through: one port, of the type it gives. */
function passesThrough(kind: Kind): boolean {
  const types = Object.values(kind.takes);
  return types.length === 1 && types[0] === kind.gives;
}

function circleProblem(worksheet: Worksheet, registry: Registry, circle: readonly string[] | undefined): string | null {
  if (circle === undefined) return null;
  if (circle.length < 2) return 'This cell reads its own result: let it read another cell above.';
  const names = circle.slice(1).map((id) => cellName(worksheet, registry, id));
  return `This cell reads its own result by way of ${names.join(', ')}: let one of them read another cell above.`;
}

function versionProblem(kind: Kind, cell: Cell): string | null {
  if (cell.version === kind.version) return null;
  const written = `This cell was written by ${cell.version > kind.version ? 'a newer' : 'an older'} Standfast`;
  return `${written} (its settings have version ${cell.version}, this program knows version ${kind.version}): fill it in again here, or open the worksheet there.`;
}

function sharedProblem(worksheet: Worksheet, cell: Cell): string | null {
  const gone = sharedIdsIn(cell.settings).find((id) => !worksheet.shared.some((each) => each.id === id));
  return gone === undefined
    ? null
    : `There is no shared number called "${gone}" in this worksheet: fill in its blank again.`;
}

function portProblem(
  worksheet: Worksheet,
  registry: Registry,
  cells: ReadonlyMap<string, Cell>,
  cell: Cell,
  kind: Kind,
): string | null {
  for (const [port, type] of Object.entries(kind.takes) as [string, ValueType][]) {
    const from = cell.from[port];
    const fits = () => fittingCells(worksheet, registry, cell.id, type);
    if (from === undefined || from === '')
      return `This cell does not yet say where it reads ${typeInWords(type)}. ${fits()}`;
    const above = cells.get(from);
    if (above === undefined) {
      return `This cell reads ${typeInWords(type)} from "${from}", but there is no cell called "${from}". ${fits()}`;
    }
    const aboveKind = kindOf(registry, above);
    if (aboveKind !== null && aboveKind.gives !== type) {
      const gives = aboveKind.gives === null ? 'gives nothing to read' : `gives ${typeInWords(aboveKind.gives)}`;
      return `This cell reads ${typeInWords(type)}, but ${cellName(worksheet, registry, from)} ${gives}. ${fits()}`;
    }
  }
  return null;
}

/** Cell id -> ids of the cells it would read: none where the kind is unknown or the cell is left out and lets nothing through. */
function readsOf(worksheet: Worksheet, registry: Registry): ReadonlyMap<string, readonly string[]> {
  const ids = new Set(worksheet.cells.map((cell) => cell.id));
  const reads = new Map<string, readonly string[]>();
  for (const cell of worksheet.cells) {
    const kind = kindOf(registry, cell);
    const stops = kind === null || (cell.leftOut === true && !passesThrough(kind));
    const above = stops ? [] : Object.keys(kind.takes).map((port) => cell.from[port] ?? '');
    reads.set(
      cell.id,
      above.filter((id) => ids.has(id)),
    );
  }
  return reads;
}
