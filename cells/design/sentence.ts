import type { Roles } from '../../src/analysis/design.ts';
import { shownLevels } from '../../src/analysis/hidden-design.ts';
import { columnOf, type Table } from '../../src/data/table.ts';
import { choiceBlank, choicesBlank, columnOptions, numbersOnly, textBlank } from '../blanks.ts';
import type { Context, Part } from '../kind.ts';
import { plural } from '../numbers.ts';

export type DesignSettings = {
  readonly participant: string;
  readonly within: readonly string[];
  readonly between: readonly string[];
  readonly outcome: string;
  readonly unit: string;
  readonly direction: Roles['direction'];
  readonly rows: Roles['rows'];
};

/** "Each [officer] met every [alert] (...); [training] differs between officers; the outcome is [ack_ms] in [ms] ..." */
export function designSentence(settings: DesignSettings, context: Context): Part[] {
  const table = context.given.table as Table | undefined;
  const blank = conditionBlanks(settings, table, context.blind);
  const noun = settings.participant === '' ? 'participant' : settings.participant;
  return [
    'Each ',
    choiceBlank(
      { key: 'participant', label: 'column that tells participants apart' },
      settings.participant || null,
      columnOptions(table, undefined, context.blind),
      'participant',
      (participant) => ({ ...settings, participant }),
    ),
    settings.within.length === 0 ? ' met ' : ' met every ',
    blank.within,
    levelsOf(settings.within, table, context.blind === true),
    '; ',
    blank.between,
    settings.between.length > 1 ? ' differ' : ' differs',
    ` between ${plural(noun)}; `,
    ...outcomeParts(settings, table, context.blind),
    '.',
  ];
}

function conditionBlanks(settings: DesignSettings, table: Table | undefined, blind?: boolean) {
  const free = (others: readonly string[]) => (column: { name: string; levels?: readonly string[] }) =>
    others.includes(column.name) || column.name === settings.outcome || column.name === settings.participant
      ? 'has another part already'
      : null;
  const within = choicesBlank(
    { key: 'within', label: 'conditions every participant met' },
    settings.within,
    columnOptions(table, free(settings.between), blind),
    { prompt: 'one condition only', atLeast: 0 },
    (values) => ({ ...settings, within: values }),
  );
  const between = choicesBlank(
    { key: 'between', label: 'conditions that differ between participants' },
    settings.between,
    columnOptions(table, free(settings.within), blind),
    { prompt: 'nothing', atLeast: 0 },
    (values) => ({ ...settings, between: values }),
  );
  return { within, between };
}

function outcomeParts(settings: DesignSettings, table: Table | undefined, blind?: boolean): Part[] {
  return [
    'the outcome is ',
    choiceBlank(
      { key: 'outcome', label: 'outcome column' },
      settings.outcome || null,
      columnOptions(table, numbersOnly, blind),
      'which column',
      (outcome) => ({ ...settings, outcome }),
    ),
    ' in ',
    textBlank({ key: 'unit', label: 'unit of the outcome' }, settings.unit, 'no unit', (unit) => ({
      ...settings,
      unit,
    })),
    ', with ',
    choiceBlank(
      { key: 'rows', label: 'rows per participant and condition' },
      settings.rows,
      [
        { value: 'several trials', label: 'several trials', hint: 'scored per participant before any test' },
        { value: 'one score', label: 'one score', hint: 'a repeated row is refused' },
      ],
      'how many rows',
      (rows) => ({ ...settings, rows }),
    ),
    ' each, where ',
    choiceBlank(
      { key: 'direction', label: 'which direction is better' },
      settings.direction,
      [
        { value: 'lower', label: 'lower is better' },
        { value: 'higher', label: 'higher is better' },
        { value: 'neither', label: 'neither is better' },
      ],
      'lower is better',
      (direction) => ({ ...settings, direction }),
    ),
  ];
}

/** " (tone, voice, seat pulse)" after a single factor, nothing after several. */
function levelsOf(names: readonly string[], table: Table | undefined, blind: boolean): string {
  const column = names.length === 1 && table ? columnOf(table, names[0] as string) : undefined;
  if (!column) return '';
  const levels = shownLevels(column, blind);
  return levels.length <= 8 ? ` (${levels.join(', ')})` : ` (${levels.length} levels)`;
}
