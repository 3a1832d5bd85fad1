import type { Context, Settings } from '../../cells/kind.ts';
import type { CellState } from '../engine/cell-state.ts';
import type { Worksheet } from '../worksheet/format.ts';

/** What the page asks of the engine. */
export interface PageEngine {
  show(worksheet: Worksheet): void;
  state(cellId: string): CellState;
  context(cellId: string): Context;
  /** What a cell that reads these cells (port -> id) may look at. */
  contextOver(from: { readonly [port: string]: string }): Context;
  /** A cell's settings with every shared number replaced by its value now. */
  settings(cellId: string): Settings;
  counts(): ReadonlyMap<string, number>;
  idle(): Promise<void>;
}
