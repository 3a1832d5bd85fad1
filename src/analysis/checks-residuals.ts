import { largestSize, noSpread } from '../numerics/inference.ts';
import { mean } from '../numerics/moments.ts';
import type { CheckLayout } from './checks-layout.ts';

/** Who stands in which group, and how many values each participant has: all that the centring needs to know. */
export interface ResidualShape {
  /** One code a participant, 0 to groups - 1, each group with at least one participant. */
  readonly group: Int32Array;
  readonly groups: number;
  /** Values a participant. */
  readonly columns: number;
}

/** What is left of the scores once the means of the design are taken out. */
export interface Residuals {
  readonly shape: ResidualShape;
  /** Participants x columns, row by row, in the outcome's unit; they add up to 0 in every group and column. */
  readonly values: Float64Array;
  /** Degrees of freedom. */
  readonly df: number;
  /** Root of the sum of squares over df; 0 when nothing but rounding is left. */
  readonly sd: number;
}

/**
 * The quantity the assumptions are about: one value a participant (a score, or the difference of two levels) freed of
 * its group's mean; with three or more levels the scores freed of the participant and of the group's level means.
 *
 * @param layout participants with their columns
 * @returns residuals with their degrees of freedom and SD
 * @source methods 4.1; e_ij = y_ij - m_i - m_gj + m_g, on (n - groups)(columns - 1) df
 * @checked by hand
 */
export function residualsOf(layout: CheckLayout): Residuals {
  const [from, columns] =
    layout.columns.length === 2 ? [differencesOf(layout), 1] : [layout.values.slice(), layout.columns.length];
  const shape = { group: layout.group, groups: layout.groups.length, columns };
  const values = centre(from, shape);
  const df = residualDf(shape);
  let squares = 0;
  for (const value of values) squares += value * value;
  const sd = Math.sqrt(squares / df);
  return { shape, values, df, sd: noSpread(sd, largestSize(layout.values)) ? 0 : sd };
}

/** First minus second column of each participant. */
export function differencesOf(layout: CheckLayout): Float64Array {
  const k = layout.columns.length;
  return Float64Array.from(
    layout.participants,
    (_, who) => (layout.values[who * k] as number) - (layout.values[who * k + 1] as number),
  );
}

/** Each participant's mean over the columns. */
export function participantMeans(layout: CheckLayout): Float64Array {
  const k = layout.columns.length;
  return Float64Array.from(layout.participants, (_, who) => mean(layout.values.subarray(who * k, who * k + k)));
}

/** One column of the layout. */
export function columnOf(layout: CheckLayout, column: number): Float64Array {
  const k = layout.columns.length;
  return Float64Array.from(layout.participants, (_, who) => layout.values[who * k + column] as number);
}

/** One value a participant, by group. */
export function byGroup(values: Float64Array, group: Int32Array, groups: number): Float64Array[] {
  return Array.from({ length: groups }, (_, code) => values.filter((_, who) => group[who] === code));
}

/** Degrees of freedom of residuals of that shape. */
export function residualDf({ group, groups, columns }: ResidualShape): number {
  return (group.length - groups) * Math.max(1, columns - 1);
}

/**
 * Takes the means of the design out of values, in place.
 *
 * @param values participants x columns, row by row; overwritten (the one argument that is)
 * @param shape groups and columns
 * @returns the same vector
 */
export function centre(values: Float64Array, { group, groups, columns }: ResidualShape): Float64Array {
  const n = group.length;
  if (columns > 1) {
    for (let from = 0; from < values.length; from += columns) {
      let sum = 0;
      for (let at = from; at < from + columns; at++) sum += values[at] as number;
      for (let at = from; at < from + columns; at++) values[at] = (values[at] as number) - sum / columns;
    }
  }
  const sums = new Float64Array(groups * columns);
  const sizes = new Int32Array(groups);
  for (let who = 0; who < n; who++) {
    const g = group[who] as number;
    sizes[g] = (sizes[g] as number) + 1;
    for (let j = 0; j < columns; j++) sums[g * columns + j]! += values[who * columns + j] as number;
  }
  for (let who = 0; who < n; who++) {
    const g = group[who] as number;
    for (let j = 0; j < columns; j++)
      values[who * columns + j]! -= (sums[g * columns + j] as number) / (sizes[g] as number);
  }
  return values;
}
