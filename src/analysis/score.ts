import { mean } from '../numerics/moments.ts';
import { median } from '../numerics/order.ts';
import { trimmedMean } from '../numerics/trimmed-mean.ts';
import { type Design, withinCondition, withinConditions } from './design.ts';

export interface ScoreSpec {
  readonly statistic: 'mean' | 'median' | 'trimmed mean';
  /** Trim of trials: integer percentage at each end, 0 to 25; used by the trimmed mean only. */
  readonly trim: number;
}

/** One score for each participant under each combination of the within factors. */
export interface Scores {
  readonly design: Design;
  readonly score: ScoreSpec;
  /** Participants with at least one kept row, by first appearance. */
  readonly participants: readonly string[];
  /** Combinations of the within factors' levels; one with an empty label where there is no within factor. */
  readonly conditions: readonly { readonly label: string; readonly levels: readonly number[] }[];
  /** participants x conditions, row by row, in the outcome's unit; NaN where no row is kept. */
  readonly values: Float64Array;
  /** Kept rows behind each score, same layout. */
  readonly trials: Int32Array;
  /** For each between factor: one level code a participant. */
  readonly groups: readonly {
    readonly factor: string;
    readonly levels: readonly string[];
    readonly codes: Int32Array;
  }[];
}

/**
 * Scores every participant under every combination of conditions by one statistic of the kept rows.
 *
 * @param design with its rules applied
 * @param spec the statistic, and the trim of trials (integer percentage at each end)
 * @returns participants x conditions in the outcome's unit; NaN where a participant has no kept row
 * @source trials are aggregated to the participant before any test: methods R10
 */
export function scoreDesign(design: Design, spec: ScoreSpec): Scores {
  const conditions = withinConditions(design);
  const everyone = design.participants.length;
  const { gathered, start } = gatherCells(design, conditions.length);
  const present: number[] = [];
  for (let who = 0; who < everyone; who++) {
    const from = start[who * conditions.length] as number;
    const to = start[(who + 1) * conditions.length] as number;
    if (to > from) present.push(who);
  }
  const values = new Float64Array(present.length * conditions.length);
  const trials = new Int32Array(values.length);
  present.forEach((who, index) => {
    for (let where = 0; where < conditions.length; where++) {
      const cell = who * conditions.length + where;
      const rows = gathered.subarray(start[cell] as number, start[cell + 1] as number);
      values[index * conditions.length + where] = rows.length === 0 ? NaN : statisticOf(rows, spec);
      trials[index * conditions.length + where] = rows.length;
    }
  });
  return {
    design,
    score: spec,
    participants: present.map((who) => design.participants[who] as string),
    conditions,
    values,
    trials,
    groups: groupsOf(design, present),
  };
}

function statisticOf(rows: Float64Array, spec: ScoreSpec): number {
  if (spec.statistic === 'median') return median(rows);
  if (spec.statistic === 'trimmed mean') return trimmedMean(rows, spec.trim);
  return mean(rows);
}

/** Kept outcomes sorted into participant x condition cells: cell c is gathered[start[c] .. start[c + 1]). */
function gatherCells(design: Design, conditions: number) {
  const condition = withinCondition(design);
  const cells = design.participants.length * conditions;
  const start = new Int32Array(cells + 1);
  const cellOf = (row: number) => (design.participant[row] as number) * conditions + (condition[row] as number);
  for (let row = 0; row < condition.length; row++) {
    if (design.kept[row] === 1) start[cellOf(row) + 1] = (start[cellOf(row) + 1] as number) + 1;
  }
  for (let cell = 0; cell < cells; cell++) start[cell + 1] = (start[cell + 1] as number) + (start[cell] as number);
  const next = start.slice();
  const gathered = new Float64Array(start[cells] as number);
  for (let row = 0; row < condition.length; row++) {
    if (design.kept[row] !== 1) continue;
    const cell = cellOf(row);
    gathered[next[cell] as number] = design.outcome[row] as number;
    next[cell] = (next[cell] as number) + 1;
  }
  return { gathered, start };
}

function groupsOf(design: Design, present: readonly number[]): Scores['groups'] {
  return design.factors
    .filter((factor) => factor.scope === 'between')
    .map((factor) => {
      const level = new Int32Array(design.participants.length).fill(-1);
      for (let row = 0; row < factor.codes.length; row++) {
        const who = design.participant[row] as number;
        if (who >= 0 && (factor.codes[row] as number) >= 0) level[who] = factor.codes[row] as number;
      }
      return {
        factor: factor.name,
        levels: factor.levels,
        codes: Int32Array.from(present, (who) => level[who] as number),
      };
    });
}
