import { isoMoment } from '../iso-date.ts';
import { needColumn, needFreeName, withColumn } from '../need-column.ts';
import { plainNumber } from '../plain-number.ts';
import { Refusal } from '../refusal.ts';
import { relabel } from '../relabel.ts';
import { asLevels, type Column, type Table } from '../table.ts';
import { listed, quoted } from '../words.ts';
import type { Derived } from './derive-column.ts';

export interface RecodeOptions {
  /** Name of the new column. */
  readonly name: string;
  /** The column that is recoded. */
  readonly of: string;
  /** Old value -> new one; an empty text or null = missing. */
  readonly map: { readonly [old: string]: string | number | null };
  /** What becomes of values that are not in the map: they are kept, or made missing. */
  readonly otherwise: 'keep' | 'missing';
}

/**
 * Adds a column in which values of another are replaced. It holds numbers where all its values are numbers, else text.
 *
 * @param table any table
 * @param options see RecodeOptions; the values of a number column are told by what they are, not by how they are
 *   written (1.0 is 1)
 * @returns the table with the column at its end; a warning for old values that do not occur
 * @throws Refusal for a taken name, and an old value that is named twice
 */
export function recode(table: Table, options: RecodeOptions): Derived {
  const source = needColumn(table, options.of);
  needFreeName(table, options.name);
  const map = readMap(options.map, source);
  const { codes, levels } = asLevels(source);
  const renamed = relabel(codes, levels, (level) => {
    const next = map.get(level);
    return next === undefined ? (options.otherwise === 'keep' ? level : null) : next;
  });
  const absent = [...map.keys()].filter((old) => !levels.includes(old));
  const warnings =
    absent.length === 0
      ? []
      : [`${listed(absent.map(quoted))} ${absent.length === 1 ? 'does' : 'do'} not occur in column ${options.of}.`];
  return { table: withColumn(table, typed(options.name, renamed, source)), warnings };
}

/** The map by the levels' own spelling. */
function readMap(map: RecodeOptions['map'], source: Column): Map<string, string | null> {
  const out = new Map<string, string | null>();
  for (const [old, next] of Object.entries(map)) {
    const number = source.type === 'number' ? plainNumber(old) : null;
    const level = number === null ? old : String(number);
    if (out.has(level)) throw new Refusal(`The recoding names ${quoted(level)} twice: say once what becomes of it.`);
    const text = next === null ? '' : String(next).trim();
    out.set(level, text === '' ? null : text);
  }
  return out;
}

function typed(name: string, { codes, levels }: { codes: Int32Array; levels: string[] }, source: Column): Column {
  const numbers = levels.map(plainNumber);
  if (numbers.every((number) => number !== null) && (levels.length > 0 || source.type === 'number')) {
    const values = Float64Array.from(codes, (code) => (code < 0 ? Number.NaN : (numbers[code] as number)));
    return { name, type: 'number', values };
  }
  const isDate = source.type === 'date' && levels.every((level) => isoMoment(level) !== null);
  return { name, type: isDate ? 'date' : 'text', codes, levels };
}
