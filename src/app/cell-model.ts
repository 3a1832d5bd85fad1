import type { Computed, Context, Kind, Registry, Settings, ViewContext } from '../../cells/kind.ts';
import type { CellState } from '../engine/cell-state.ts';
import type { Cell, Opening, SharedNumber } from '../worksheet/format.ts';
import { sharedIn } from './wiring.ts';

/** Everything a cell on the page is drawn from; the same object as long as nothing of it changes. */
export interface CellModel {
  readonly cell: Cell;
  readonly kind: Kind | undefined;
  readonly state: CellState;
  readonly context: Context;
  /** Settings with every shared number replaced by its value. */
  readonly resolved: Settings;
  /** Which computation is marked as recomputed; 0 = none. */
  readonly recomputed: number;
  readonly theme: 'light' | 'dark';
  readonly width: number;
  readonly reference: ViewContext['reference'];
  readonly sweep: ViewContext['sweep'];
  readonly opening: Opening['state'];
  readonly openBlank: string | null;
  readonly openPanel: string | null;
  /** Words for the cells it waits for. */
  readonly waitingFor: string;
}

/** What a cell came to, now or last. */
export function computedOf(state: CellState): Computed<unknown> | undefined {
  if (state.status === 'fresh') return state.computed;
  return 'last' in state ? state.last : undefined;
}

function sameShared(a: readonly SharedNumber[], b: readonly SharedNumber[], settings: unknown): boolean {
  if (a === b) return true;
  for (const id of sharedIn(settings)) {
    if (a.find((each) => each.id === id) !== b.find((each) => each.id === id)) return false;
  }
  return true;
}

function sameAbove(a: Context['above'], b: Context['above']): boolean {
  const ports = Object.keys(b ?? {});
  return ports.length === Object.keys(a ?? {}).length && ports.every((port) => a?.[port] === b?.[port]);
}

function sameContext(a: Context, b: Context, settings: unknown): boolean {
  const ports = Object.keys(b.given);
  return (
    a.own === b.own &&
    a.blind === b.blind &&
    a.design === b.design &&
    sameAbove(a.above, b.above) &&
    a.data.length === b.data.length &&
    a.data.every((block, i) => block.id === b.data[i]?.id && block.name === b.data[i]?.name) &&
    ports.length === Object.keys(a.given).length &&
    ports.every((port) => a.given[port] === b.given[port]) &&
    sameShared(a.shared, b.shared, settings)
  );
}

/** The model to draw from: the one before where nothing that the cell shows has changed. */
export function keepModel(before: CellModel | undefined, next: CellModel): CellModel {
  if (before === undefined) return next;
  const context = sameContext(before.context, next.context, next.cell.settings) ? before.context : next.context;
  const unchanged = before.cell === next.cell && context === before.context;
  const settled = { ...next, context, resolved: unchanged ? before.resolved : next.resolved };
  const keys = Object.keys(settled) as (keyof CellModel)[];
  return keys.every((key) => before[key] === settled[key]) ? before : settled;
}

/** "exclusion rule": the quiet word over a cell, also of a kind this program does not know. */
export function titleOf(registry: Registry, cell: Cell): string {
  return registry[cell.kind]?.title(cell.settings) ?? cell.kind;
}

/** The words after "waiting for": what is missing above, and why. */
export function waitingWords(state: CellState, name: (cellId: string) => string): string {
  if (state.status !== 'waiting') return '';
  const words = {
    failed: 'which could not be worked out',
    missing: 'which is not there',
    unset: 'which has open blanks',
    veiled: 'which is hidden while the conditions are hidden',
    'left-out': 'which is left out for now',
  };
  return state.for.map((each) => `${name(each.cellId)}, ${words[each.why]}`).join('; and ');
}
