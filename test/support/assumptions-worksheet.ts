import { readFileSync } from 'node:fs';
import { blockFromBytes } from '../../src/app/data-block.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { cell, worksheet } from './worksheets.ts';

/** A reference data set, its rows numbered in a first column. */
function numbered(name: string, id: string) {
  const text = readFileSync(new URL(`../reference/cases/${name}.csv`, import.meta.url), 'utf8');
  const rows = text.trim().split(/\r?\n/);
  const lines = rows.map((line, at) => (at === 0 ? `plant,${line}` : `${at},${line}`));
  return blockFromBytes(new TextEncoder().encode(lines.join('\n')), `${name}.csv`, id);
}

const roles = { within: [], between: [], unit: '', direction: 'higher', rows: 'one score' };
const score = { statistic: 'mean', trim: 0 };
const checks = {
  by: '',
  test: 'shapiro-wilk',
  departures: ['exponential', 't3', 'contaminated', 'spread'],
  alpha: 0.05,
};

/** Sleep under two drugs and the growth of plants in three groups, each with what its comparison assumes. */
export function assumptionsWorksheet(): Worksheet {
  const row = { row: 'participant', participant: null };
  return worksheet(
    [
      cell('c1', 'data', { data: 'd1', ...row }, {}),
      cell(
        'c2',
        'design',
        { ...roles, participant: 'subject', within: ['drug'], outcome: 'extra_hours', unit: 'h' },
        { table: 'c1' },
      ),
      cell('c3', 'score', score, { design: 'c2' }),
      cell('c4', 'assumptions', { ...checks, factor: 'drug', first: 'drug2', second: 'drug1' }, { scores: 'c3' }),
      cell('c5', 'data', { data: 'd2', ...row }, {}),
      cell(
        'c6',
        'design',
        { ...roles, participant: 'plant', between: ['group'], outcome: 'weight', unit: 'g' },
        { table: 'c5' },
      ),
      cell('c7', 'score', score, { design: 'c6' }),
      cell('c8', 'assumptions', { ...checks, factor: 'group', first: '', second: '' }, { scores: 'c7' }),
    ],
    { title: 'What two comparisons assume', data: [numbered('sleep', 'd1'), numbered('plant_growth', 'd2')] },
  );
}
