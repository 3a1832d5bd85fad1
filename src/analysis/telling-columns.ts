import { asLevels, type Column } from '../data/table.ts';
import { type Design, type Factor, withinCondition } from './design.ts';

/**
 * Names of the columns from which a condition could be read: a factor's level follows from the value (over all rows,
 * or within each participant; over participants for a between factor), or the value follows from the level.
 *
 * A column of nearly all different values "determines" everything and tells nothing, so at least half of the rows (or
 * participants) must share their value with another. The roles themselves are never among the names.
 *
 * @param design as declared, with its codes
 * @returns names in the order of the table
 */
export function columnsThatTell(design: Design): string[] {
  const { roles } = design;
  const played = new Set([roles.participant, roles.outcome, ...roles.within, ...roles.between]);
  return design.table.columns
    .filter((column) => !played.has(column.name) && tells(design, column))
    .map((column) => column.name);
}

function tells(design: Design, column: Column): boolean {
  const { codes, levels } = asLevels(column);
  if (levels.length < 2) return false;
  const within = design.factors.filter((factor) => factor.scope === 'within');
  if (within.length > 0) {
    const together = withinCondition(design);
    const own = codes.map((code, row) => pairOf(design.participant[row] as number, code, levels.length));
    if (follows(own, together)) return true;
  }
  return design.factors.some((factor) =>
    factor.scope === 'within'
      ? follows(codes, factor.codes) || follows(factor.codes, codes)
      : followsOverParticipants(design, codes, factor),
  );
}

function pairOf(who: number, code: number, width: number): number {
  return who < 0 || code < 0 ? -1 : who * width + code;
}

/** Between factors: participants are the units, since the rows of one of them always agree. */
function followsOverParticipants(design: Design, codes: Int32Array, factor: Factor): boolean {
  const value = new Int32Array(design.participants.length).fill(-1);
  const level = value.slice();
  for (let row = 0; row < codes.length; row++) {
    const who = design.participant[row] as number;
    const code = codes[row] as number;
    if (who < 0 || code < 0) continue;
    if ((value[who] as number) >= 0 && value[who] !== code) return false;
    value[who] = code;
    level[who] = factor.codes[row] as number;
  }
  return follows(value, level) || follows(level, value);
}

/** Whether every value of `from` goes with one value of `to`, where at least half of the units share theirs. */
function follows(from: Int32Array, to: Int32Array): boolean {
  const first = new Map<number, number>();
  const count = new Map<number, number>();
  const found = new Set<number>();
  let units = 0;
  for (let i = 0; i < from.length; i++) {
    const [a, b] = [from[i] as number, to[i] as number];
    if (a < 0 || b < 0) continue;
    units++;
    const before = first.get(a);
    if (before !== undefined && before !== b) return false;
    first.set(a, b);
    found.add(b);
    count.set(a, (count.get(a) ?? 0) + 1);
  }
  let shared = 0;
  for (const n of count.values()) if (n > 1) shared += n;
  return found.size > 1 && shared * 2 >= units && units > 0;
}
