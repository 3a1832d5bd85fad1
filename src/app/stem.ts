import type { FlowMark } from '../../cells/kind.ts';

/** A cell as the stem sees it: where it stands on the page and what it says of the flow. */
export interface StemCell {
  readonly id: string;
  /** Middle of the quiet word over the cell, px from the top of the page's grid. */
  readonly top: number;
  /** Middle of the sentence's first line. */
  readonly line: number;
  readonly flow: FlowMark | null;
}

export interface StemTick {
  readonly id: string;
  readonly y: number;
  readonly count: number;
  readonly label: string;
}

export interface StemBranch {
  readonly id: string;
  readonly y: number;
  readonly setAside: number;
}

export interface StemPiece {
  readonly from: number;
  readonly to: number;
  readonly width: number;
}

export interface StemShape {
  readonly pieces: readonly StemPiece[];
  readonly ticks: readonly StemTick[];
  readonly branches: readonly StemBranch[];
}

/** Width of the stem in px while every row read is in. */
export const FULL_WIDTH = 9;
const LEAST_WIDTH = 1.5;
/** A count under a branch stands this far below it. */
const UNDER_BRANCH = 52;

/** The stem as drawn: pieces as wide as the share kept, ticks with counts, branches with the number set aside. */
export function stemShape(cells: readonly StemCell[], bottom: number): StemShape {
  const pieces: StemPiece[] = [];
  const ticks: StemTick[] = [];
  const branches: StemBranch[] = [];
  let from = cells[0]?.top ?? 0;
  let width = FULL_WIDTH;
  for (const { id, top, line, flow } of cells) {
    if (flow === null) continue;
    const branch = (flow.setAside ?? 0) > 0;
    if (branch) branches.push({ id, y: line, setAside: flow.setAside ?? 0 });
    if (flow.count !== undefined) {
      ticks.push({ id, y: branch ? line + UNDER_BRANCH : top, count: flow.count, label: flow.label ?? '' });
    }
    const next = flow.share === undefined ? width : Math.max(LEAST_WIDTH, FULL_WIDTH * flow.share);
    const at = branch ? line : top;
    if (next === width || at <= from) {
      width = next;
      continue;
    }
    pieces.push({ from, to: at, width });
    from = at;
    width = next;
  }
  if (bottom > from) pieces.push({ from, to: bottom, width });
  return { pieces, ticks, branches };
}

/** Path of the square bracket from a cell to the cells that depend on it, between two x positions; '' where none do. */
export function bracketPath(at: number, readers: readonly number[], x: number, depth: number): string {
  const below = readers.filter((y) => y > at).sort((a, b) => a - b);
  const last = below.at(-1);
  if (last === undefined) return '';
  const between = below.slice(0, -1).map((y) => ` M${x} ${y}h${depth}`);
  return `M${x} ${at}h${depth}V${last}h${-depth}${between.join('')}`;
}
