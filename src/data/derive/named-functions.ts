import { needFreeName, needNumbers, withColumn } from '../need-column.ts';
import { Refusal } from '../refusal.ts';
import type { Table } from '../table.ts';
import { counted, grouped } from '../words.ts';
import type { Derived } from './derive-column.ts';
import { midranks } from './midranks.ts';
import { zScores } from './z-scores.ts';

export type NamedFunction =
  | 'natural log'
  | 'log10'
  | 'square root'
  | 'reciprocal'
  | 'absolute value'
  | 'rank'
  | 'z score pooled';

interface Rowwise {
  readonly of: (x: number) => number;
  readonly isDefined: (x: number) => boolean;
  /** Where it is not defined, and what to do about it. */
  readonly where: string;
  readonly offer: (name: string) => string;
}

const anywhere = { isDefined: () => true, where: '', offer: () => '' };
const belowOne = (name: string) =>
  `Add a constant c that you declare, as in log(${name} + c), or keep only the rows above zero first.`;

const ROWWISE: { readonly [name: string]: Rowwise } = {
  'natural log': { of: Math.log, isDefined: (x) => x > 0, where: 'zero or negative', offer: belowOne },
  log10: { of: Math.log10, isDefined: (x) => x > 0, where: 'zero or negative', offer: belowOne },
  'square root': {
    of: Math.sqrt,
    isDefined: (x) => x >= 0,
    where: 'negative',
    offer: () => 'Add a constant that you declare, or keep only the rows from zero on first.',
  },
  reciprocal: {
    of: (x) => 1 / x,
    // Below this the reciprocal is beyond the largest number.
    isDefined: (x) => Number.isFinite(1 / x),
    where: 'zero',
    offer: () => 'Keep only the rows where it is not zero first.',
  },
  'absolute value': { of: Math.abs, ...anywhere },
};

/**
 * Adds a column that is a function of one other.
 *
 * @param table any table
 * @param options.name name of the new column
 * @param options.fn which function; ranks give ties their mean rank, the z score uses the mean and SD (n - 1) of all
 *   rows together
 * @param options.of the column it is taken of
 * @param options.plus a declared constant added first (for the logarithms), 0 by default
 * @returns the table with the column at its end; missing stays missing
 * @throws Refusal where the function is not defined, naming the column, the number of rows and the first
 */
export function applyFunction(
  table: Table,
  options: { name: string; fn: NamedFunction; of: string; plus?: number },
): Derived {
  const { name, fn, of, plus = 0 } = options;
  needFreeName(table, name);
  const source = needNumbers(table, of, `the ${fn}`);
  const values = plus === 0 ? source.values : source.values.map((value) => value + plus);
  return { table: withColumn(table, { name, type: 'number', values: valuesOf(table, values, options) }), warnings: [] };
}

function valuesOf(
  table: Table,
  values: Float64Array,
  { fn, of, plus = 0 }: { fn: NamedFunction; of: string; plus?: number },
): Float64Array {
  if (fn === 'rank') return midranks(values);
  if (fn === 'z score pooled') {
    const scores = zScores(values);
    if (typeof scores !== 'string') return scores;
    throw new Refusal(`The z score of ${of} is not defined, because ${scores}: choose another column or function.`);
  }
  const rule = ROWWISE[fn];
  if (rule === undefined) throw new RangeError(`*fn* must be the name of a function; got ${String(fn)}`);
  const bad: number[] = [];
  const out = values.map((value, row) => {
    if (Number.isNaN(value)) return value;
    if (!rule.isDefined(value)) bad.push(row);
    return rule.of(value);
  });
  if (bad.length === 0) return out;
  const shown = plus === 0 ? `column ${of}` : `column ${of} + ${grouped(plus)}`;
  throw new Refusal(
    `The ${fn} is not defined in ${counted(bad.length, 'row')} (first: row ${grouped(table.origin[bad[0] as number] as number)}), where ${shown} is ${rule.where}. ${rule.offer(of)}`,
  );
}
