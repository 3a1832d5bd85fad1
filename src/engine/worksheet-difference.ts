import type { Cell, Worksheet } from '../worksheet/format.ts';
import { sameValue } from './same-value.ts';

/**
 * Whether two records differ at most in numbers: values of shared numbers and settings of cells. The same cells read
 * the same cells, so that what is being computed of the one is a step on the way to the other.
 */
export function onlyNumbersDiffer(a: Worksheet, b: Worksheet): boolean {
  return (
    a.id === b.id &&
    a.seed === b.seed &&
    a.data === b.data &&
    a.opening.state === b.opening.state &&
    a.shared.length === b.shared.length &&
    a.shared.every((number, i) => number.id === b.shared[i]?.id) &&
    a.cells.length === b.cells.length &&
    a.cells.every((cell, i) => cell === b.cells[i] || sameButSettings(cell, b.cells[i]))
  );
}

function sameButSettings(a: Cell, b: Cell | undefined): boolean {
  if (b === undefined || a.id !== b.id || a.kind !== b.kind || a.version !== b.version || a.leftOut !== b.leftOut) {
    return false;
  }
  const ports = Object.keys(a.from);
  return ports.length === Object.keys(b.from).length && ports.every((port) => a.from[port] === b.from[port]);
}

/** What cells depend on beside their settings and what they read. */
export interface Changed {
  /** Something every cell depends on. */
  readonly all: boolean;
  /** The conditions are hidden again: no value of before may stay. */
  readonly hides: boolean;
  /** Ids of the data blocks that came, went or changed. */
  readonly data: ReadonlySet<string>;
}

/** @param before null = nothing was computed before */
export function changeOf(before: Worksheet | null, next: Worksheet): Changed {
  if (before === null) return { all: true, hides: false, data: new Set() };
  const wasBlind = before.opening.state === 'blind';
  const isBlind = next.opening.state === 'blind';
  const data = new Set<string>();
  if (before.data !== next.data) {
    const old = new Map(before.data.map((block) => [block.id, block]));
    for (const block of next.data) {
      if (!sameValue(old.get(block.id), block)) data.add(block.id);
      old.delete(block.id);
    }
    for (const id of old.keys()) data.add(id);
  }
  return { all: wasBlind !== isBlind || before.seed !== next.seed, hides: isBlind && !wasBlind, data };
}
