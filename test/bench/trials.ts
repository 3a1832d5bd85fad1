import type { Roles } from '../../src/analysis/design.ts';
import type { Table } from '../../src/data/table.ts';
import { benchScores } from './scores.ts';

/** Row counts of B5 and B6, and how many people they are from. */
export const trialSizes = [
  { rows: 32_000, people: 40 },
  { rows: 1_000_000, people: 1_000 },
];

export const trialRoles: Roles = {
  participant: 'person',
  within: ['condition'],
  between: [],
  outcome: 'ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};

/** Trials of people under four conditions, in file order: the same as `trials` of peers.py. */
export function trialTable(rows: number, people: number): Table {
  const drawn = benchScores(rows);
  const person = Int32Array.from({ length: rows }, (_, i) => Math.floor((i * people) / rows));
  const names = Array.from({ length: people }, (_, i) => String(i));
  return {
    rows,
    origin: Int32Array.from({ length: rows }, (_, i) => i + 1),
    columns: [
      { name: 'person', type: 'text', codes: person, levels: names },
      { name: 'condition', type: 'text', codes: person.map((_, i) => i % 4), levels: ['a', 'b', 'c', 'd'] },
      { name: 'ms', type: 'number', values: drawn.map((each, i) => 400 + 100 * each + ((person[i] ?? 0) % 50)) },
    ],
  };
}
