import { shownLevels } from '../../src/analysis/hidden-design.ts';
import { asLevels, type Column, missingCount, type Table } from '../../src/data/table.ts';
import type { Note, TableOut } from '../kind.ts';
import { count } from '../numbers.ts';
import { guessParticipant } from './sentence.ts';

/** Most levels that are listed by name. */
const MOST = 12;

/**
 * Names, types, level lists and missing counts: all of a file that is shown while the conditions are hidden. In a file
 * with one row a participant every column of numbers may be a condition, so their missing values are counted together.
 */
export function hiddenColumns(table: Table): TableOut {
  const pooled = isWide(table);
  const who = guessParticipant(table);
  return {
    title: 'columns',
    columns: [
      { name: 'column', numeric: false },
      { name: 'type', numeric: false },
      { name: 'missing', numeric: true },
      { name: 'levels', numeric: false },
    ],
    rows: table.columns.map((column) => [
      column.name,
      column.type,
      pooled && column.type === 'number' ? 'counted together' : count(missingCount(column)),
      column.type === 'number' ? '' : levelWords(column, column.name === who),
    ]),
  };
}

/** The margin beside a data cell while the conditions are hidden. */
export function hiddenNotes(table: Table): Note[] {
  const notes: Note[] = [
    {
      type: 'note',
      lead: 'Hidden.',
      text: 'While the conditions are hidden, only names, types, levels and missing counts of the file are shown; its rows, and what reading had to say of single values, are shown once the conditions are open.',
    },
  ];
  const missing = missingWords(table);
  return missing === '' ? notes : [...notes, { type: 'note', text: `Missing values: ${missing}.` }];
}

function missingWords(table: Table): string {
  const pooled = isWide(table);
  const words: string[] = [];
  let together = 0;
  for (const column of table.columns) {
    const missing = missingCount(column);
    if (pooled && column.type === 'number') together += missing;
    else if (missing > 0) words.push(`${column.name} ${count(missing)}`);
  }
  if (together > 0) words.push(`in the columns of numbers together ${count(together)}`);
  return words.join(', ');
}

/** Codes of participants are counted, not listed. */
function levelWords(column: Column, codes: boolean): string {
  const levels = shownLevels(column, true);
  return levels.length <= MOST && !codes ? levels.join(', ') : `${count(levels.length)} different`;
}

/** Whether a row is a participant: no column tells participants apart, or each stands in one row. */
function isWide(table: Table): boolean {
  const name = guessParticipant(table);
  const column = table.columns.find((each) => each.name === name);
  if (column === undefined) return true;
  const { levels } = asLevels(column);
  return levels.length >= table.rows - missingCount(column);
}
