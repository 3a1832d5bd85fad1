import { ASSOCIATIONS } from '../../src/analysis/association.ts';
import type { AssociationEstimator } from '../../src/analysis/association-rows.ts';
import type { Column, Table } from '../../src/data/table.ts';
import { choiceBlank, columnOptions, numberBlank, numbersOnly } from '../blanks.ts';
import type { Blank, Context, Num, Option, Part } from '../kind.ts';
import { alphaText, levelPercent } from '../numbers.ts';

export type AssociationSettings = {
  readonly x: string;
  readonly y: string;
  /** Column that tells participants apart; null = every row is a participant. */
  readonly participant: string | null;
  /** Id of the planned row. */
  readonly estimator: string;
  /** Percent winsorized at each end. */
  readonly trim: Num;
  readonly alternative: 'two-sided' | 'greater' | 'less';
  readonly alpha: number;
  readonly resamples: number;
};

/** The value of "each row"; no column can be called so. */
const EACH_ROW = '\u0000';

/** "Relate [hearing_level_db] of each [listener] to [words_percent] by [percentage-bend correlation], two-sided, at [alpha .05]." */
export function associationSentence(settings: AssociationSettings, context: Context): Part[] {
  const table = context.given.table as Table | undefined;
  const estimator = estimatorNamed(settings.estimator);
  const column = (key: 'x' | 'y', label: string) =>
    choiceBlank(
      { key, label },
      settings[key] || null,
      columnOptions(table, (each) => fits(each, settings), context.blind),
      'which column',
      (value) => ({ ...settings, [key]: value }),
    );
  return [
    'Relate ',
    column('x', 'first score'),
    ' of each ',
    participantBlank(settings, table, context.blind),
    ' to ',
    column('y', 'second score, the outcome of the slopes'),
    ' by ',
    ...(estimator?.trims ? [trimBlank(settings, context), ' '] : []),
    estimatorBlank(settings),
    ...(estimator?.resamples ? [', with ', resamplesBlank(settings), ' resamples'] : []),
    ', ',
    alternativeBlank(settings),
    ', at ',
    alphaBlank(settings),
    '.',
  ];
}

/** The row of that id. */
export function estimatorNamed(id: string): AssociationEstimator | undefined {
  return ASSOCIATIONS.find((each) => each.id === id);
}

function fits(column: Column, settings: AssociationSettings): string | null {
  return numbersOnly(column) ?? (column.name === settings.participant ? 'tells participants apart' : null);
}

function participantBlank(settings: AssociationSettings, table: Table | undefined, blind?: boolean): Blank {
  const options: Option[] = [
    ...columnOptions(
      table,
      (column) => (column.name === settings.x || column.name === settings.y ? 'is one of the two scores' : null),
      blind,
    ),
    { value: EACH_ROW, label: 'row', hint: 'no column tells participants apart: every row is one' },
  ];
  return choiceBlank(
    { key: 'participant', label: 'column that tells participants apart' },
    settings.participant ?? EACH_ROW,
    options,
    'which participant',
    (value) => ({ ...settings, participant: value === EACH_ROW ? null : value }),
  );
}

function trimBlank(settings: AssociationSettings, context: Context): Blank {
  return numberBlank(
    { key: 'trim', label: 'winsorized at each end' },
    settings.trim,
    context,
    { min: 0, max: 25, step: 1, unit: '%' },
    (trim) => ({ ...settings, trim }),
  );
}

function estimatorBlank(settings: AssociationSettings): Blank {
  const options = ASSOCIATIONS.map((each) => ({
    value: each.id,
    label: each.group === 'slopes' ? `the slope of ${each.name}` : each.name,
    hint: `${each.group === 'slopes' ? 'outcome units per unit' : 'from \u22121 to 1'}${each.resamples ? ', bootstrap' : ''}`,
  }));
  return choiceBlank(
    { key: 'estimator', label: 'planned correlation or slope' },
    settings.estimator,
    options,
    'which correlation',
    (estimator) => ({ ...settings, estimator }),
  );
}

function resamplesBlank(settings: AssociationSettings): Blank {
  return choiceBlank(
    { key: 'resamples', label: 'number of resamples' },
    String(settings.resamples),
    ['999', '1999', '4999'].map((value) => ({ value, label: Number(value).toLocaleString('en') })),
    'how many',
    (value) => ({ ...settings, resamples: Number(value) }),
  );
}

function alternativeBlank(settings: AssociationSettings): Blank {
  return choiceBlank(
    { key: 'alternative', label: 'sides' },
    settings.alternative,
    [
      { value: 'two-sided', label: 'two-sided' },
      { value: 'greater', label: 'one-sided (rising)' },
      { value: 'less', label: 'one-sided (falling)' },
    ],
    'two-sided',
    (alternative) => ({ ...settings, alternative }),
  );
}

function alphaBlank(settings: AssociationSettings): Blank {
  return choiceBlank(
    { key: 'alpha', label: 'alpha' },
    String(settings.alpha),
    [0.1, 0.05, 0.01, 0.005, 0.001].map((value) => ({
      value: String(value),
      label: alphaText(value),
      hint: `${levelPercent(1 - value)} intervals`,
    })),
    '\u03b1',
    (alpha) => ({ ...settings, alpha: Number(alpha) }),
  );
}

/** The column that most likely tells participants apart: the first that has another value in every row. */
export function guessParticipant(table: Table): string | null {
  const isWhole = (values: Float64Array) => values.every((value) => Number.isInteger(value));
  const apart = table.columns.find((column) =>
    column.type === 'number'
      ? isWhole(column.values) && new Set(column.values).size === table.rows
      : column.type === 'text' && column.levels.length === table.rows,
  );
  return apart?.name ?? null;
}
