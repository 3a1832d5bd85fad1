/** Rows of a grid under relabelling: which of them the fast kernels give, and how the others are run as they stand. */
import { type GroupRow, RelabelledGroups } from '../numerics/relabel-groups.ts';
import { type PairRow, RelabelledPairs } from '../numerics/relabel-pairs.ts';
import { normalFromP } from '../numerics/relabel-z.ts';
import type { ComparisonSpec } from './compare.ts';
import { type Estimator, estimatorOf, type RowContext } from './estimators.ts';
import type { Samples } from './samples.ts';

/** One row of the grid. */
export interface GridRow {
  /** Id of the estimator. */
  readonly estimator: string;
  /** Percent at each end; 0 for rows that do not trim. */
  readonly trim: number;
}

/** Estimate of one row (first minus second) and the signed normal deviate of its own two-sided p; 0 = no test given. */
export interface RowValue {
  readonly estimate: number;
  readonly z: number;
}

/** What the rows of one set of kept scores come to under any labels. */
export interface SetRunner {
  /** Writes estimate and Z of each row from place `at` on; label 0 = first condition. */
  run(labels: Uint8Array, estimates: Float64Array, z: Float64Array, at: number): void;
}

const PAIR_ROWS: { readonly [estimator: string]: (trim: number) => PairRow } = {
  'paired-t': () => ({ row: 'paired-t' }),
  'trimmed-differences': (trim) => ({ row: 'trimmed', trim }),
  'winsorized-differences': (trim) => ({ row: 'winsorized', trim }),
  'marginal-trimmed': (trim) => ({ row: 'marginal', trim }),
  'signed-rank': () => ({ row: 'signed-rank' }),
};

const GROUP_ROWS: { readonly [estimator: string]: (trim: number) => GroupRow } = {
  student: () => ({ row: 'student' }),
  welch: () => ({ row: 'yuen', trim: 0 }),
  'yuen-welch': (trim) => ({ row: 'yuen', trim }),
  'rank-sum': () => ({ row: 'rank-sum' }),
};

/** Rows on logs, by the row they are of the logs. */
const LOG_ROWS: { readonly [estimator: string]: string } = { 'paired-ratio': 'paired-t', 'group-ratio': 'welch' };

/** How the samples of a set are put together from its labels. */
export interface SetShape {
  readonly scope: 'within' | 'between';
  readonly first: string;
  readonly second: string;
  readonly factor: string;
  readonly unit: string;
  readonly direction: RowContext['direction'];
}

/**
 * A runner of the rows of one set of scores.
 *
 * @param a within: each unit's score in its earlier block; between: each unit's score; NaN = it does not enter
 * @param b within: the score in the later block; between: not used
 * @param rows of the grid that are asked of these scores
 * @returns a runner; rows without a kernel go the plain way, through the estimator itself
 * @source one row, one result: the very estimators of analysis/estimators.ts, or kernels that agree with them to 1e-9
 */
export function setRunner(a: Float64Array, b: Float64Array, rows: readonly GridRow[], shape: SetShape): SetRunner {
  const parts: { readonly at: readonly number[]; readonly runner: SetRunner }[] = [];
  const table = shape.scope === 'within' ? PAIR_ROWS : GROUP_ROWS;
  const kernels = (wanted: readonly number[], own: (row: GridRow) => string, x: Float64Array, y: Float64Array) => {
    if (wanted.length === 0) return;
    const made = wanted.map((i) => table[own(rows[i] as GridRow)]?.((rows[i] as GridRow).trim));
    const runner =
      shape.scope === 'within'
        ? new RelabelledPairs(x, y, made as PairRow[])
        : new RelabelledGroups(x, made as GroupRow[]);
    parts.push({ at: wanted, runner });
  };
  const where = (wanted: (row: GridRow) => boolean) => rows.flatMap((row, i) => (wanted(row) ? [i] : []));
  kernels(
    where((row) => row.estimator in table),
    (row) => row.estimator,
    a,
    b,
  );
  const onLogs = where((row) => row.estimator in LOG_ROWS);
  const positive = (values: Float64Array) => values.every((value) => Number.isNaN(value) || value > 0);
  if (onLogs.length > 0 && positive(a) && (shape.scope === 'between' || positive(b)))
    kernels(onLogs, (row) => LOG_ROWS[row.estimator] as string, a.map(Math.log), b.map(Math.log));
  else if (onLogs.length > 0) parts.push({ at: onLogs, runner: nothing(onLogs.length) });
  const plain = where((row) => !(row.estimator in table) && !(row.estimator in LOG_ROWS));
  if (plain.length > 0) parts.push({ at: plain, runner: plainRunner(a, b, rowsAt(rows, plain), shape) });
  return joined(parts, rows.length);
}

function rowsAt(rows: readonly GridRow[], at: readonly number[]): GridRow[] {
  return at.map((i) => rows[i] as GridRow);
}

/** Rows that are never given, as those on logs of scores that are not positive. */
function nothing(count: number): SetRunner {
  return {
    run(_, estimates, z, at) {
      estimates.fill(Number.NaN, at, at + count);
      z.fill(0, at, at + count);
    },
  };
}

/** Several runners, each for some of the rows, as one. */
function joined(parts: readonly { at: readonly number[]; runner: SetRunner }[], count: number): SetRunner {
  const [only] = parts;
  if (parts.length === 1 && only && only.at.length === count) return only.runner;
  const ownEstimates = new Float64Array(count);
  const ownZ = new Float64Array(count);
  return {
    run(labels, estimates, z, at) {
      for (const { at: places, runner } of parts) {
        runner.run(labels, ownEstimates, ownZ, 0);
        for (let i = 0; i < places.length; i++) {
          estimates[at + (places[i] as number)] = ownEstimates[i] as number;
          z[at + (places[i] as number)] = ownZ[i] as number;
        }
      }
    },
  };
}

/** Rows run by their estimators, without effect sizes that resample. */
function plainRunner(a: Float64Array, b: Float64Array, rows: readonly GridRow[], shape: SetShape): SetRunner {
  return {
    run(labels, estimates, z, at) {
      const samples = samplesUnder(labels, a, b, shape);
      rows.forEach((row, i) => {
        const value = plainRow(row, samples, shape);
        estimates[at + i] = value.estimate;
        z[at + i] = value.z;
      });
    },
  };
}

function samplesUnder(labels: Uint8Array, a: Float64Array, b: Float64Array, shape: SetShape): Samples {
  const x: number[] = [];
  const y: number[] = [];
  for (let i = 0; i < labels.length; i++) {
    const own = a[i] as number;
    const other = b[i] as number;
    const isFirst = labels[i] === 0;
    if (shape.scope === 'between') {
      if (!Number.isNaN(own)) (isFirst ? x : y).push(own);
    } else if (!Number.isNaN(own) && !Number.isNaN(other)) {
      x.push(isFirst ? own : other);
      y.push(isFirst ? other : own);
    }
  }
  const { scope, factor, first, second } = shape;
  const none = { xParticipants: [], yParticipants: [], left: [] };
  return { scope, factor, first, second, x: Float64Array.from(x), y: Float64Array.from(y), ...none };
}

/**
 * One row by its own estimator, two-sided.
 *
 * @param row of the grid
 * @param samples as samplesFor takes them
 * @returns estimate and signed Z; NaN and 0 where the estimator gives none
 */
export function plainRow(row: GridRow, samples: Samples, shape: Pick<SetShape, 'unit' | 'direction'>): RowValue {
  const estimator = estimatorOf(row.estimator);
  if (estimator === undefined) throw new RangeError(`*estimator* must be a row of the list; got ${row.estimator}`);
  const finding = estimator.run(samples, contextOf(estimator, row, samples, shape));
  if (finding.estimate === null) return { estimate: Number.NaN, z: 0 };
  const away = finding.reversed ? finding.nullValue - finding.estimate : finding.estimate - finding.nullValue;
  return { estimate: finding.estimate, z: finding.p === null ? 0 : normalFromP(finding.p, away) };
}

function contextOf(
  estimator: Estimator,
  row: GridRow,
  samples: Samples,
  { unit, direction }: Pick<SetShape, 'unit' | 'direction'>,
): RowContext {
  const { first, second } = samples;
  const trim = estimator.trims ? row.trim : 0;
  return { trim, alternative: 'two-sided', level: 0.95, resamples: 0, seed: 0, unit, direction, first, second };
}

/** Whether a comparison is of one pair of levels, for which scores can be kept by unit. */
export function isPair({ effect }: Pick<ComparisonSpec, 'effect'>): boolean {
  return effect === undefined;
}
