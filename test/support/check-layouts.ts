import { type CheckLayout, type CheckTarget, takeCheckLayout } from '../../src/analysis/checks-layout.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { scoresOf } from './designs.ts';
import { sleep } from './samples.ts';

/** A layout from plain rows: one row a participant, one number a column. */
export function layoutOf(
  rows: readonly (readonly number[])[],
  more: { readonly columns?: readonly string[]; readonly groups?: readonly string[]; readonly group?: number[] } = {},
): CheckLayout {
  return {
    target: { factor: 'f', levels: [], by: '' },
    outcome: 'y',
    unit: '',
    noun: 'participant',
    participants: rows.map((_, who) => `p${who + 1}`),
    columns: more.columns ?? (rows[0] ?? []).map((_, column) => `c${column + 1}`),
    groups: more.groups ?? [''],
    group: Int32Array.from(more.group ?? rows.map(() => 0)),
    values: Float64Array.from(rows.flat()),
    left: [],
  };
}

const target: CheckTarget = { factor: '', levels: [], by: '' };

/** Cushny & Peebles 1905 (reference case sleep): differences drug1 minus drug2. */
export const sleepScores = scoreDesign(sleep, { statistic: 'mean', trim: 0 });
export const sleepLayout = takeCheckLayout(sleepScores, { ...target, factor: 'drug', levels: ['drug1', 'drug2'] });

/** Three groups of ten plants (reference case plant_growth). */
export const plantScores = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
export const plantLayout = takeCheckLayout(plantScores, { ...target, factor: 'group' });

/** Four visits of 59 patients under two treatments (reference case epilepsy_visits). */
export const visitScores = scoresOf('epilepsy_visits', {
  participant: 'id',
  within: ['visit'],
  between: ['treatment'],
  outcome: 'seizures',
});
export const visitLayout = takeCheckLayout(visitScores, { ...target, factor: 'visit' });
export const mixedLayout = takeCheckLayout(visitScores, { ...target, factor: 'visit', by: 'treatment' });
