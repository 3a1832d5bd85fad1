import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { type Scores, scoreDesign } from '../../src/analysis/score.ts';
import { csv } from './samples.ts';
import { tableOf } from './tables.ts';

const base: Roles = {
  participant: '',
  within: [],
  between: [],
  outcome: '',
  unit: '',
  direction: 'neither',
  rows: 'one score',
};

/** Scores of a reference data set under a design; rows get a participant of their own where the set names none. */
export function scoresOf(name: string, roles: Partial<Roles>, keep: (row: number) => boolean = () => true): Scores {
  const columns = csv(name);
  const rows = Object.values(columns)[0]?.map((_, row) => row) ?? [];
  const kept = rows.filter(keep);
  const chosen = Object.fromEntries(
    Object.entries({ ...columns, unit_of_row: rows.map((row) => `u${row}`) }).map(([key, values]) => [
      key,
      kept.map((row) => values[row] ?? ''),
    ]),
  );
  const design = declareDesign(tableOf(chosen), { ...base, participant: 'unit_of_row', ...roles });
  return scoreDesign(design, { statistic: 'mean', trim: 0 });
}
