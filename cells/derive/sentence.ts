import { shownLevels } from '../../src/analysis/hidden-design.ts';
import { columnOf, type Table } from '../../src/data/table.ts';
import { choiceBlank, columnOptions, numbersOnly, textBlank, words } from '../blanks.ts';
import type { Computed, Context, Part } from '../kind.ts';
import { count } from '../numbers.ts';
import type { DeriveDetail } from './kind.ts';

export type DeriveSettings = {
  readonly make: 'function' | 'formula' | 'recode' | 'filter';
  /** Name of the new column. */
  readonly name: string;
  readonly fn: string;
  /** Column read by a function, a recoding or a filter. */
  readonly of: string;
  readonly formula: string;
  /** "old = new; old = new". */
  readonly map: string;
  readonly op: string;
  /** What a filter holds a value against; several separated by commas for "is one of". */
  readonly value: string;
};

export const FUNCTIONS = [
  'natural log',
  'log10',
  'square root',
  'reciprocal',
  'absolute value',
  'rank',
  'z score pooled',
  'Box-Cox power',
  'Yeo-Johnson power',
] as const;
export const OPERATIONS = [
  'is at least',
  'is at most',
  'is above',
  'is below',
  'is',
  'is not',
  'is one of',
  'is missing',
  'is not missing',
] as const;

/** "Let [log_ms] be the [natural log] of [ack_ms]." / "Keep rows where [age] [is at least] [18] (says how many)." */
export function deriveSentence(settings: DeriveSettings, context: Context): Part[] {
  const table = context.given.table as Table | undefined;
  const lead = choiceBlank(
    { key: 'make', label: 'what is done' },
    settings.make === 'filter' ? 'filter' : 'let',
    [
      { value: 'let', label: 'Let', hint: 'a new column' },
      { value: 'filter', label: 'Keep rows where', hint: 'the others are dropped' },
    ],
    'Let',
    (make) => ({ ...settings, make: make === 'filter' ? 'filter' : 'function' }),
  );
  return settings.make === 'filter'
    ? [lead, ' ', ...filterParts(settings, table, context.blind), dropped(context), '.']
    : [lead, ' ', ...letParts(settings, table, context.blind), '.'];
}

function letParts(settings: DeriveSettings, table: Table | undefined, blind?: boolean): Part[] {
  const name = textBlank({ key: 'name', label: 'name of the new column' }, settings.name, 'which name', (value) => ({
    ...settings,
    name: value,
  }));
  const how = choiceBlank(
    { key: 'how', label: 'how it is made' },
    settings.make === 'function' ? settings.fn : settings.make,
    [
      ...FUNCTIONS.map((fn) => ({
        value: fn,
        label: `the ${fn === 'z score pooled' ? 'pooled z score' : fn}`,
        hint: fn.endsWith('power') ? 'of one column; the exponent from all its values together' : 'of one column',
      })),
      { value: 'formula', label: 'the formula', hint: 'arithmetic on columns' },
      { value: 'recode', label: 'a recoding', hint: 'of the values of one column' },
    ],
    'what',
    (value) =>
      value === 'formula' || value === 'recode'
        ? { ...settings, make: value }
        : { ...settings, make: 'function', fn: value },
  );
  const of = choiceBlank(
    { key: 'of', label: 'column read' },
    settings.of || null,
    columnOptions(table, settings.make === 'function' ? numbersOnly : undefined, blind),
    'which column',
    (value) => ({ ...settings, of: value }),
  );
  if (settings.make === 'formula') {
    const formula = textBlank(
      { key: 'formula', label: 'formula' },
      settings.formula,
      'for example 1000 / ack_ms',
      (value) => ({ ...settings, formula: value }),
    );
    return [name, ' be ', how, ' ', formula];
  }
  if (settings.make === 'recode') {
    const example = recodeExample(settings, table, blind === true);
    const map = textBlank(
      { key: 'map', label: 'recoding' },
      settings.map,
      example,
      (value) => ({ ...settings, map: value }),
      checkMap,
    );
    return [name, ' be ', how, ' of ', of, ' with ', map];
  }
  return [name, ' be ', how, ' of ', of];
}

function filterParts(settings: DeriveSettings, table: Table | undefined, blind?: boolean): Part[] {
  const column = choiceBlank(
    { key: 'of', label: 'column judged' },
    settings.of || null,
    columnOptions(table, undefined, blind),
    'which column',
    (of) => ({ ...settings, of }),
  );
  const op = choiceBlank(
    { key: 'op', label: 'how it is judged' },
    settings.op,
    words(...OPERATIONS),
    'is',
    (value) => ({ ...settings, op: value }),
  );
  if (settings.op === 'is missing' || settings.op === 'is not missing') return [column, ' ', op];
  const value = textBlank({ key: 'value', label: 'value' }, settings.value, 'which value', (next) => ({
    ...settings,
    value: next,
  }));
  return [column, ' ', op, ' ', value];
}

function dropped(context: Context): string {
  const detail = (context.own as Computed<Table, DeriveDetail> | undefined)?.detail;
  if (!detail || detail.dropped === null) return '';
  return ` (${count(detail.dropped)} of ${count(detail.rowsBefore)} rows dropped)`;
}

function recodeExample(settings: DeriveSettings, table: Table | undefined, blind: boolean): string {
  const column = table && settings.of !== '' ? columnOf(table, settings.of) : undefined;
  const levels = column ? shownLevels(column, blind).slice(0, 2) : ['old'];
  return levels.map((level) => `${level} = \u2026`).join('; ');
}

/** "old = new; old = new" as pairs; null where it cannot be read. */
export function readMap(text: string): [string, string][] | null {
  const pairs: [string, string][] = [];
  for (const part of text.split(';')) {
    if (part.trim() === '') continue;
    const at = part.indexOf('=');
    if (at < 1) return null;
    pairs.push([part.slice(0, at).trim(), part.slice(at + 1).trim()]);
  }
  return pairs.length > 0 ? pairs : null;
}

function checkMap(text: string): string | null {
  return text.trim() === '' || readMap(text) ? null : 'Write each value as old = new, separated by semicolons.';
}
