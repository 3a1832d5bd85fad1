import { rng } from '../../src/numerics/rng.ts';
import type { DataBlock } from '../../src/worksheet/format.ts';

type DataColumn = DataBlock['columns'][number];

/** How the labels of a file may change places without changing the experiment. */
export interface Randomised {
  readonly participant: string;
  /** Long file: the column whose levels change places within a participant, all rows of a level together. */
  readonly within?: string;
  /** Wide file: the columns whose values change places within a row. */
  readonly wide?: readonly string[];
  /** The column of groups that change places over participants. */
  readonly between?: string;
}

/** The data with their labels dealt anew as the design randomised them, and read as a file with them would be. */
export function relabelled(block: DataBlock, how: Randomised, seed: number): DataBlock {
  const draw = rng(seed);
  const values = new Map(block.columns.map((column) => [column.name, valuesOf(column)]));
  const who = values.get(how.participant) ?? [];
  const people = [...new Set(who)];
  if (how.within !== undefined) dealWithin(values.get(how.within) ?? [], who, people, draw);
  if (how.wide !== undefined) {
    const columns = how.wide.map((name) => values.get(name) ?? []);
    for (let row = 0; row < block.rows; row++) {
      const dealt = shuffled(
        columns.map((column) => column[row] ?? null),
        draw,
      );
      columns.forEach((column, i) => {
        column[row] = dealt[i] ?? null;
      });
    }
  }
  if (how.between !== undefined) {
    const group = values.get(how.between) ?? [];
    const dealt = shuffled(
      people.map((one) => group[who.indexOf(one)] ?? null),
      draw,
    );
    who.forEach((one, row) => {
      group[row] = dealt[people.indexOf(one)] ?? null;
    });
  }
  return { ...block, columns: block.columns.map((column) => columnOf(column, values.get(column.name) ?? [])) };
}

type Value = string | number | null;

function dealWithin(labels: Value[], who: readonly Value[], people: readonly Value[], draw: ReturnType<typeof rng>) {
  const levels = [...new Set(labels.filter((label) => label !== null))];
  for (const one of people) {
    const dealt = shuffled(levels, draw);
    who.forEach((each, row) => {
      const label = labels[row];
      if (each === one && label !== null && label !== undefined) labels[row] = dealt[levels.indexOf(label)] ?? null;
    });
  }
}

function shuffled<T>(values: readonly T[], draw: ReturnType<typeof rng>): T[] {
  const order = [...values];
  for (let i = order.length - 1; i > 0; i--) {
    const j = draw.below(i + 1);
    [order[i], order[j]] = [order[j] as T, order[i] as T];
  }
  return order;
}

function valuesOf(column: DataColumn): Value[] {
  if (column.type === 'number') return [...column.values];
  return column.codes.map((code) => column.levels[code] ?? null);
}

/** Levels by first appearance, as reading a file gives them. */
function columnOf(column: DataColumn, values: readonly Value[]): DataColumn {
  if (column.type === 'number') return { ...column, values: values as (number | null)[] };
  const levels = [...new Set(values.filter((value) => value !== null))] as string[];
  return { ...column, levels, codes: values.map((value) => levels.indexOf(value as string)) };
}
