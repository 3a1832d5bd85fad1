import { asLevels, columnOf, type Table } from '../../src/data/table.ts';
import { choiceBlank, columnOptions, words } from '../blanks.ts';
import type { Computed, Context, Part } from '../kind.ts';
import { count, plural } from '../numbers.ts';

export type DataSettings = {
  readonly data: string | null;
  /** What one row is. */
  readonly row: string;
  /** Column that tells participants apart; null = guessed from the names. */
  readonly participant: string | null;
};

/** "Read [file]: N rows, one per [trial], from M [officers]." */
export function dataSentence(settings: DataSettings, context: Context): Part[] {
  const block = context.data.find((each) => each.id === settings.data);
  const parts: Part[] = [
    'Read ',
    {
      key: 'file',
      label: 'data file',
      shown: block?.name ?? 'a data file',
      filled: block !== undefined,
      editor: { type: 'file', value: settings.data, set: (data) => ({ ...settings, data, participant: null }) },
    },
  ];
  const table = (context.own as Computed<Table> | undefined)?.value;
  if (!block || !table) return [...parts, '.'];
  const row = choiceBlank(
    { key: 'row', label: 'what one row is' },
    settings.row,
    words('trial', 'participant', 'participant and condition'),
    'what',
    (value) => ({ ...settings, row: value }),
  );
  const name = settings.participant ?? guessParticipant(table);
  const column = name === null ? undefined : columnOf(table, name);
  const people = column ? asLevels(column).levels.length : 0;
  const who = choiceBlank(
    { key: 'participant', label: 'column that tells participants apart' },
    name,
    columnOptions(table, undefined, context.blind),
    'which participants',
    (value) => ({ ...settings, participant: value }),
  );
  parts.push(`: ${count(table.rows)} rows, one per `, row, ', from ');
  if (column)
    parts.push(`${count(people)} `, { ...who, shown: people === 1 ? (name as string) : plural(name as string) });
  else parts.push(who);
  return [...parts, '.'];
}

/** The column that most likely tells participants apart: by its name, else none. */
export function guessParticipant(table: Table): string | null {
  const named = table.columns.find((column) =>
    /^(participant|officer|listener|wearer|subject|subj|person|patient|pupil|student|volunteer|ppt|pid|id|code)([ _-]?(id|code|no|nr|number))?$/i.test(
      column.name,
    ),
  );
  return named?.name ?? null;
}
