import { Refusal } from '../data/refusal.ts';
import { asLevels, columnOf, type Table } from '../data/table.ts';
import { linearRegression } from '../numerics/regression/linear-regression.ts';
import { theilSen } from '../numerics/regression/theil-sen.ts';
import { type Diagnostics, diagnosePairs } from './association-diagnostics.ts';
import { type AssociationEstimator, correlationRows } from './association-rows.ts';
import { slopeRows } from './association-slopes.ts';
import type { Finding } from './finding.ts';

/** What is related to what, and how. */
export interface AssociationSpec {
  /** Column along the line, and the column taken as the outcome of the slopes. */
  readonly x: string;
  readonly y: string;
  /** Column that tells participants apart; null = every row is a participant. */
  readonly participant: string | null;
  /** Id of the row the plan names. */
  readonly estimator: string;
  /** Integer percentage winsorized at each end, 0 to 25. */
  readonly trim: number;
  readonly alternative: Finding['alternative'];
  readonly alpha: number;
  /** Resamples of the bootstrap. */
  readonly resamples: number;
  readonly seed: number;
}

/** The two scores of every participant who has both. */
export interface Pairs {
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** Who each pair is from: the participant's code, or "row 7" where rows are participants. */
  readonly participants: readonly string[];
  /** Row of the file each pair is from. */
  readonly rows: Int32Array;
  /** Participants who lack one of the scores. */
  readonly left: readonly { readonly participant: string; readonly why: string }[];
}

export interface Line {
  readonly slope: number;
  readonly intercept: number;
}

/** An association with every row that describes it, side by side. */
export interface Association {
  readonly spec: AssociationSpec;
  readonly pairs: Pairs;
  /** Correlations first, then slopes. */
  readonly findings: readonly Finding[];
  /** Index of the planned row, -1 where the plan names none. */
  readonly planned: number;
  readonly lines: { readonly ols: Line | null; readonly theilSen: Line | null };
  readonly diagnostics: Diagnostics;
}

/** THE LIST of rows: correlations, then slopes. */
export const ASSOCIATIONS: readonly AssociationEstimator[] = [...correlationRows, ...slopeRows];

/** Scores beyond this cannot be squared and summed in double precision. */
const LARGEST_SCORE = 1e150;

/**
 * Takes the pairs out of a table of one row per participant.
 *
 * @param table rows as read, derived or reshaped
 * @param spec the two columns and the participant column
 * @returns pairs in the order of the rows; who lacks a score is listed
 * @throws Refusal where a column is missing or no numbers, or a participant has more than one row
 * @source trials are not participants: methods R10; complete cases and their listing: methods 3.8
 */
export function takePairs(table: Table, spec: Pick<AssociationSpec, 'x' | 'y' | 'participant'>): Pairs {
  const x = numbersOf(table, spec.x);
  const y = numbersOf(table, spec.y);
  const names = namesOf(table, spec.participant);
  const entered: number[] = [];
  const left: { participant: string; why: string }[] = [];
  for (let row = 0; row < table.rows; row++) {
    const lacking = [spec.x, spec.y].filter((_, i) => Number.isNaN((i === 0 ? x : y)[row]));
    if (names[row] === '') left.push({ participant: `row ${table.origin[row]}`, why: `no ${spec.participant}` });
    else if (lacking.length > 0)
      left.push({ participant: names[row] as string, why: `no ${lacking.join(' and no ')}` });
    else entered.push(row);
  }
  return {
    x: Float64Array.from(entered, (row) => x[row] as number),
    y: Float64Array.from(entered, (row) => y[row] as number),
    participants: entered.map((row) => names[row] as string),
    rows: Int32Array.from(entered, (row) => table.origin[row] as number),
    left,
  };
}

/**
 * Some rows of an association.
 *
 * @param args the pairs, the spec, and the ids of the rows wanted
 * @returns one finding for each id that stands in the list, in the order of the list
 */
export function associateRows(args: {
  readonly pairs: Pairs;
  readonly spec: AssociationSpec;
  readonly rows: readonly string[];
}): Finding[] {
  return ASSOCIATIONS.filter((each) => args.rows.includes(each.id)).map((each) => each.run(args.pairs, args.spec));
}

/**
 * Puts an association together from its findings.
 *
 * @param pairs the pairs
 * @param spec what is related to what
 * @param findings every row, in any order
 * @returns the association with its lines and the diagnostics of the least-squares line
 */
export function associationOf(pairs: Pairs, spec: AssociationSpec, findings: readonly Finding[]): Association {
  const place = (finding: Finding) => ASSOCIATIONS.findIndex((each) => each.id === finding.estimator);
  const ordered = [...findings].sort((a, b) => place(a) - place(b));
  return {
    spec,
    pairs,
    findings: ordered,
    planned: ordered.findIndex((finding) => finding.estimator === spec.estimator),
    lines: linesOf(pairs),
    diagnostics: diagnosePairs(pairs.x, pairs.y),
  };
}

function linesOf({ x, y }: Pairs): Association['lines'] {
  if (x.length < 3) return { ols: null, theilSen: null };
  const [intercept, slope] = linearRegression(y, [x]).coefficients ?? [];
  const robust = theilSen(x, y);
  return {
    ols: intercept === undefined || slope === undefined ? null : { slope, intercept },
    theilSen:
      robust.slope === null || robust.intercept === null ? null : { slope: robust.slope, intercept: robust.intercept },
  };
}

function numbersOf(table: Table, name: string): Float64Array {
  const column = columnOf(table, name);
  if (!column) {
    throw new Refusal(
      `There is no column called "${name}" in the rows above. Choose one of: ${table.columns.map((each) => each.name).join(', ')}.`,
    );
  }
  if (column.type !== 'number') {
    throw new Refusal(
      `Column "${name}" holds ${column.type}, and an association needs numbers. Choose another column.`,
    );
  }
  const large = column.values.findIndex((value) => Math.abs(value) > LARGEST_SCORE);
  if (large >= 0) {
    throw new Refusal(
      `Row ${table.origin[large]} of column "${name}" holds ${column.values[large]}, too large to compute with. Correct the file, or derive the column in a larger unit.`,
    );
  }
  return column.values;
}

/** Who each row is; an empty text where it is not said. */
function namesOf(table: Table, name: string | null): string[] {
  if (name === null) return Array.from(table.origin, (row) => `row ${row}`);
  const column = columnOf(table, name);
  if (!column)
    throw new Refusal(`There is no column called "${name}" that would tell participants apart. Choose another.`);
  const { codes, levels } = asLevels(column);
  const names = Array.from(codes, (code) => levels[code] ?? '');
  const rows = new Map<string, number[]>();
  names.forEach((each, row) => {
    if (each !== '') rows.set(each, [...(rows.get(each) ?? []), table.origin[row] as number]);
  });
  const repeated = [...rows].find(([, own]) => own.length > 1);
  if (repeated) refuseRepeats(name, repeated[0], repeated[1]);
  return names;
}

function refuseRepeats(column: string, who: string, rows: readonly number[]): never {
  const shown = rows.slice(0, 3).join(', ') + (rows.length > 3 ? ' and more' : '');
  throw new Refusal(
    `${column} ${who} has ${rows.length} rows (rows ${shown}), and an association needs one row per participant: rows of one person are not independent. Score the trials first, or give each condition its own column in a reshape cell.`,
  );
}
