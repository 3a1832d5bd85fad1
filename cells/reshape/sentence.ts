import type { Table } from '../../src/data/table.ts';
import { choiceBlank, choicesBlank, columnOptions, textBlank } from '../blanks.ts';
import type { Context, Part } from '../kind.ts';

export type ReshapeSettings = {
  readonly to: 'long' | 'wide';
  /** To long: the columns that become rows. */
  readonly columns: readonly string[];
  /** To long: name of the column of scores; to wide: the column whose values are spread out. */
  readonly value: string;
  /** To long: name of the column of levels; to wide: the column whose levels become columns. */
  readonly by: string;
  /** To wide: columns that tell rows apart. */
  readonly id: readonly string[];
};

/** "Turn [load_tone, load_voice] into rows of [load] by [alert]." / "Give each [alert] its own column of [load] ..." */
export function reshapeSentence(settings: ReshapeSettings, context: Context): Part[] {
  const direction = choiceBlank(
    { key: 'to', label: 'direction' },
    settings.to,
    [
      { value: 'long', label: 'Turn', hint: 'columns into rows' },
      { value: 'wide', label: 'Give each', hint: 'level its own column' },
    ],
    'Turn',
    (to) => ({ ...settings, to }),
  );
  const table = context.given.table as Table | undefined;
  return settings.to === 'long'
    ? [direction, ' ', ...toLongParts(settings, table, context.blind), '.']
    : [direction, ' ', ...toWideParts(settings, table, context.blind), '.'];
}

function toLongParts(settings: ReshapeSettings, table: Table | undefined, blind?: boolean): Part[] {
  return [
    choicesBlank(
      { key: 'columns', label: 'columns that become rows' },
      settings.columns,
      columnOptions(table, undefined, blind),
      { prompt: 'which columns', atLeast: 2 },
      (columns) => ({ ...settings, columns }),
    ),
    ' into rows of ',
    textBlank({ key: 'value', label: 'name of the scores' }, settings.value, 'what', (value) => ({
      ...settings,
      value,
    })),
    ' by ',
    textBlank({ key: 'by', label: 'name of the condition' }, settings.by, 'which condition', (by) => ({
      ...settings,
      by,
    })),
  ];
}

function toWideParts(settings: ReshapeSettings, table: Table | undefined, blind?: boolean): Part[] {
  return [
    choiceBlank(
      { key: 'by', label: 'column whose levels become columns' },
      settings.by,
      columnOptions(table, undefined, blind),
      'which condition',
      (by) => ({ ...settings, by }),
    ),
    ' its own column of ',
    choiceBlank(
      { key: 'value', label: 'column that is spread out' },
      settings.value,
      columnOptions(table, undefined, blind),
      'what',
      (value) => ({ ...settings, value }),
    ),
    ', one row per ',
    choicesBlank(
      { key: 'id', label: 'columns that tell rows apart' },
      settings.id,
      columnOptions(table, undefined, blind),
      { prompt: 'which participant', atLeast: 1 },
      (id) => ({ ...settings, id }),
    ),
  ];
}
