import { deriveColumn } from '../../src/data/derive/derive-column.ts';
import { filterRows } from '../../src/data/derive/filter-rows.ts';
import { applyFunction, type NamedFunction } from '../../src/data/derive/named-functions.ts';
import { applyPower, type PowerEstimate, type PowerTransform } from '../../src/data/derive/power-transform.ts';
import { recode } from '../../src/data/derive/recode.ts';
import type { Table } from '../../src/data/table.ts';
import { type Context, defineKind, type Note } from '../kind.ts';
import { count, counted } from '../numbers.ts';
import { scaleNotes } from './notes.ts';
import { type DeriveSettings, deriveSentence, type OPERATIONS, readMap } from './sentence.ts';

export interface DeriveDetail {
  readonly rowsBefore: number;
  /** Rows a filter dropped; null where a column was made. */
  readonly dropped: number | null;
  readonly warnings: readonly string[];
  /** Whether the conditions are hidden: nothing is told of single values then. */
  readonly hidden?: boolean;
  /** Box-Cox and Yeo-Johnson: the exponent, and from how many values. Not there while the conditions are hidden. */
  readonly power?: PowerEstimate;
}

const QUIET: Note = {
  type: 'note',
  text: 'What this does to single values is told once the conditions are open.',
};

/** Makes a column, or keeps some of the rows. */
export const deriveKind = defineKind<DeriveSettings, { readonly table: 'table' }, 'table', DeriveDetail>({
  name: 'derive',
  version: 1,
  title: (settings) => (settings.make === 'filter' ? 'rows kept' : 'new column'),
  offer: 'Let a new column be made, or keep some rows only',
  takes: { table: 'table' },
  gives: 'table',
  // In a wide file a column is a condition, and so would its exponent be.
  blind: ({ value, detail: { power: _, ...detail } }) => ({ value, detail: { ...detail, warnings: [], hidden: true } }),
  defaults: (context) => defaultSettings(context),
  check: checkSettings,
  compute(settings, { table }) {
    if (settings.make === 'filter') return keepRows(settings, table);
    const { power, ...made } = makeColumn(settings, table);
    const detail = { rowsBefore: table.rows, dropped: null, warnings: made.warnings };
    return { value: made.table, detail: power === undefined ? detail : { ...detail, power } };
  },
  sentence: deriveSentence,
  say: ({ value, detail }) =>
    detail.dropped === null
      ? `Column ${value.columns.at(-1)?.name} made.`
      : `${counted(detail.dropped, 'row')} of ${count(detail.rowsBefore)} dropped, ${count(value.rows)} kept.`,
  flow: ({ value, detail }) =>
    detail.dropped === null || detail.dropped === 0
      ? {}
      : { count: value.rows, label: 'rows', setAside: detail.dropped },
  notes: ({ detail }, settings) => [
    ...(detail.hidden === true ? [QUIET] : detail.warnings.map((text): Note => ({ type: 'caution', text }))),
    ...scaleNotes(settings, detail),
  ],
  record: ({ value, detail }) => ({
    rows: value.rows,
    dropped: detail.dropped,
    columns: value.columns.map((each) => each.name),
    ...(detail.power === undefined ? {} : { lambda: detail.power.lambda, values: detail.power.n }),
  }),
});

interface Made {
  readonly table: Table;
  readonly warnings: readonly string[];
  readonly power?: PowerEstimate;
}

function makeColumn(settings: DeriveSettings, table: Table): Made {
  const name = settings.name.trim();
  if (settings.make === 'formula') return deriveColumn(table, { name, formula: settings.formula });
  if (settings.make === 'recode') {
    return recode(table, {
      name,
      of: settings.of,
      map: Object.fromEntries(readMap(settings.map) ?? []),
      otherwise: 'keep',
    });
  }
  if (isPower(settings.fn)) return applyPower(table, { name, fn: settings.fn, of: settings.of });
  return applyFunction(table, { name, fn: settings.fn as NamedFunction, of: settings.of });
}

function isPower(fn: string): fn is PowerTransform {
  return fn === 'Box-Cox power' || fn === 'Yeo-Johnson power';
}

function keepRows(settings: DeriveSettings, table: Table) {
  const kept = filterRows(table, {
    column: settings.of,
    op: settings.op as (typeof OPERATIONS)[number],
    value: settings.value,
  });
  const missing =
    kept.droppedMissing > 0
      ? [`${counted(kept.droppedMissing, 'row')} without a value in ${settings.of} are among the dropped.`]
      : [];
  return { value: kept.table, detail: { rowsBefore: table.rows, dropped: kept.dropped, warnings: missing } };
}

function checkSettings(settings: DeriveSettings, context: Context): string[] {
  if (settings.make === 'filter') {
    if (settings.of === '') return ['Say which column rows are kept by.'];
    const needsValue = settings.op !== 'is missing' && settings.op !== 'is not missing';
    return needsValue && settings.value.trim() === '' ? ['Say which value rows are kept by.'] : [];
  }
  if (settings.name.trim() === '') return ['Give the new column a name.'];
  const table = context.given.table as Table | undefined;
  if (table?.columns.some((column) => column.name === settings.name.trim())) {
    return [`There is a column called "${settings.name.trim()}" already. Give the new one another name.`];
  }
  if (settings.make === 'formula')
    return settings.formula.trim() === '' ? ['Write the formula, for example 1000 / ack_ms.'] : [];
  if (settings.of === '') return ['Say which column it is made from.'];
  if (settings.make === 'recode' && !readMap(settings.map))
    return ['Write the recoding as old = new, separated by semicolons.'];
  return [];
}

function defaultSettings(context: Context): DeriveSettings {
  const table = context.given.table as Table | undefined;
  const last = table?.columns.filter((column) => column.type === 'number').at(-1)?.name ?? '';
  return {
    make: 'function',
    name: last === '' ? '' : `log_${last}`,
    fn: 'natural log',
    of: last,
    formula: '',
    map: '',
    op: 'is at least',
    value: '',
  };
}
