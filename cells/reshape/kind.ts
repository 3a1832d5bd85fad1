import { sortedLevels } from '../../src/analysis/hidden-design.ts';
import { suggestLong, toLong, toWide } from '../../src/data/reshape.ts';
import { columnOf, type Table } from '../../src/data/table.ts';
import { type Context, defineKind, Refusal } from '../kind.ts';
import { count, counted } from '../numbers.ts';
import { type ReshapeSettings, reshapeSentence } from './sentence.ts';

export interface ReshapeDetail {
  readonly rowsBefore: number;
  /** Whether the conditions are hidden: no row is shown then. */
  readonly hidden?: boolean;
}

/** Turns a wide table long, or a long one wide. */
export const reshapeKind = defineKind<ReshapeSettings, { readonly table: 'table' }, 'table', ReshapeDetail>({
  name: 'reshape',
  version: 1,
  title: () => 'reshape',
  offer: 'Turn columns into rows, or rows into columns',
  takes: { table: 'table' },
  gives: 'table',
  blind: ({ value, detail }) => ({ value, detail: { ...detail, hidden: true } }),
  defaults: (context) => defaultSettings(context),
  check(settings) {
    if (settings.to === 'long') {
      if (settings.columns.length < 2)
        return ['Say which columns become rows: two or more that hold the same measure.'];
      if (settings.value.trim() === '') return ['Give the column of scores a name.'];
      if (settings.by.trim() === '') return ['Give the condition a name.'];
      return settings.value.trim() === settings.by.trim() ? ['The scores and the condition need different names.'] : [];
    }
    if (settings.by === '') return ['Say which column\u2019s levels become columns.'];
    if (settings.value === '') return ['Say which column is spread out.'];
    return settings.id.length === 0 ? ['Say which column tells the rows of one participant from another\u2019s.'] : [];
  },
  compute(settings, { table }, env) {
    const value = quietly(env.blind === true && settings.to === 'wide', () =>
      settings.to === 'long'
        ? toLong(table, { columns: [...settings.columns], name: settings.by.trim(), value: settings.value.trim() })
        : toWide(table, { id: [...settings.id], by: settings.by, value: settings.value }),
    );
    return { value, detail: { rowsBefore: table.rows } };
  },
  sentence: reshapeSentence,
  say: ({ value, detail }) => `${counted(detail.rowsBefore, 'row')} became ${counted(value.rows, 'row')}.`,
  flow: ({ value }) => ({ count: value.rows, label: 'rows', share: 1 }),
  notes: ({ value, detail }) => [
    {
      type: 'note',
      text: `${count(detail.rowsBefore)} rows became ${count(value.rows)}; columns now: ${namesOf(value, detail).join(', ')}.`,
    },
  ],
  tables: ({ value, detail }) => {
    if (detail.hidden === true) return [];
    return [
      {
        title: `first ${Math.min(12, value.rows)} rows`,
        columns: value.columns.map((column) => ({ name: column.name, numeric: column.type === 'number' })),
        rows: Array.from({ length: Math.min(12, value.rows) }, (_, row) => rowTexts(value, row)),
      },
    ];
  },
  record: ({ value, detail }) => ({ rows: value.rows, columns: namesOf(value, detail) }),
});

/** Names of the columns; sorted while the conditions are hidden, since their order may be that of the first rows. */
function namesOf(table: Table, detail: ReshapeDetail): string[] {
  const names = table.columns.map((column) => column.name);
  return detail.hidden === true ? sortedLevels(names) : names;
}

/** A refusal that would name a participant's level is put in general words while the conditions are hidden. */
function quietly(quiet: boolean, make: () => Table): Table {
  try {
    return make();
  } catch (error) {
    if (!quiet || !(error instanceof Refusal)) throw error;
    throw new Refusal(
      'The rows could not be spread out: a row lacks its level, or a participant has several rows under one level. Which ones is told once the conditions are open.',
    );
  }
}

function rowTexts(table: Table, row: number): string[] {
  return table.columns.map((column) => {
    if (column.type !== 'number') return column.levels[column.codes[row] as number] ?? '';
    return Number.isNaN(column.values[row]) ? '' : String(column.values[row]);
  });
}

/** The best guess: number columns that share the start of their name are one measure under several conditions. */
function defaultSettings(context: Context): ReshapeSettings {
  const table = context.given.table as Table | undefined;
  const empty: ReshapeSettings = { to: 'long', columns: [], value: 'score', by: 'condition', id: [] };
  if (!table) return empty;
  const starts = new Map<string, string[]>();
  for (const column of table.columns) {
    const start = /^(.+?)[ _.-][^ _.-]/.exec(column.name)?.[1];
    if (start === undefined || columnOf(table, column.name)?.type !== 'number') continue;
    starts.set(start, [...(starts.get(start) ?? []), column.name]);
  }
  const columns = [...starts.values()].sort((a, b) => b.length - a.length)[0] ?? [];
  if (columns.length < 2) return empty;
  const names = suggestLong(columns);
  return { ...empty, columns, value: names.value, by: names.name };
}
