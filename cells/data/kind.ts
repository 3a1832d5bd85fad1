import { tableFromStored } from '../../src/data/stored.ts';
import { asLevels, missingCount, type Table } from '../../src/data/table.ts';
import { defineKind, type Note, Refusal, type TableOut } from '../kind.ts';
import { count, counted } from '../numbers.ts';
import { hiddenColumns, hiddenNotes } from './hidden.ts';
import { type DataSettings, dataSentence } from './sentence.ts';

/** What the data cell shows beside the table. */
export interface DataDetail {
  readonly name: string;
  readonly warnings: readonly string[];
  /** Whether the conditions are hidden: no value of a row is shown then. */
  readonly hidden?: boolean;
}

/** Reads a data block of the worksheet into a table. */
export const dataKind = defineKind<DataSettings, Record<string, never>, 'table', DataDetail>({
  name: 'data',
  version: 1,
  title: () => 'data',
  offer: 'Read another data file',
  takes: {},
  gives: 'table',
  blind: ({ value, detail }) => ({ value, detail: { name: detail.name, warnings: [], hidden: true } }),
  defaults: (context) => ({ data: context.data.at(-1)?.id ?? null, row: 'trial', participant: null }),
  check: (settings) => (settings.data === null ? ['No data yet: open, paste or drop a file of rows.'] : []),
  compute(settings, _given, env) {
    const block = settings.data === null ? undefined : env.data(settings.data);
    if (!block) throw new Refusal('The data this cell read are not in the worksheet any more. Open the file again.');
    return { value: tableFromStored(block), detail: { name: block.name, warnings: block.warnings } };
  },
  sentence: dataSentence,
  say: ({ value, detail }) =>
    `${detail.name} has ${counted(value.rows, 'row')} and ${counted(value.columns.length, 'column')}.`,
  flow: ({ value }, settings) => ({
    count: value.rows,
    label: `${settings.row === 'trial' ? 'trials' : 'rows'} read`,
    share: 1,
  }),
  notes: ({ value, detail }) => dataNotes(value, detail),
  tables: ({ value, detail }) =>
    detail.hidden === true ? [hiddenColumns(value)] : [columnTable(value), firstRows(value)],
  record: ({ value, detail }) => ({
    rows: value.rows,
    columns:
      detail.hidden === true
        ? value.columns.map((each) => ({ name: each.name, type: each.type }))
        : value.columns.map((each) => ({ name: each.name, type: each.type, missing: missingCount(each) })),
  }),
});

function dataNotes(table: Table, detail: DataDetail): Note[] {
  if (detail.hidden === true) return hiddenNotes(table);
  const notes: Note[] = detail.warnings.map((text) => ({ type: 'caution', text }));
  const missing = table.columns.filter((column) => missingCount(column) > 0);
  if (missing.length > 0) {
    const words = missing.map((column) => `${column.name} ${count(missingCount(column))}`);
    notes.push({ type: 'note', text: `Missing values: ${words.join(', ')}.` });
  }
  return notes;
}

function columnTable(table: Table): TableOut {
  return {
    title: 'columns',
    columns: [
      { name: 'column', numeric: false },
      { name: 'type', numeric: false },
      { name: 'missing', numeric: true },
      { name: 'different values', numeric: true },
    ],
    rows: table.columns.map((column) => [
      column.name,
      column.type,
      count(missingCount(column)),
      count(asLevels(column).levels.length),
    ]),
  };
}

/** The first rows, to see that the file was read as meant. */
function firstRows(table: Table): TableOut {
  const rows = Math.min(table.rows, 12);
  return {
    title: `first ${rows} rows`,
    columns: table.columns.map((column) => ({ name: column.name, numeric: column.type === 'number' })),
    rows: Array.from({ length: rows }, (_, row) =>
      table.columns.map((column) =>
        column.type === 'number'
          ? Number.isNaN(column.values[row])
            ? ''
            : String(column.values[row])
          : (column.levels[column.codes[row] as number] ?? ''),
      ),
    ),
  };
}
