import { Refusal } from '../refusal.ts';
import { grouped, listed, quoted } from '../words.ts';

const NUMBER = /^[+\-\u2212]?\d+([.,]\d+)?$/;

export interface ColumnNames {
  readonly names: readonly string[];
  readonly notes: readonly (string | null)[];
  readonly warnings: readonly string[];
}

/**
 * Makes every column name distinct and not empty.
 *
 * @param fields the header's fields as read
 * @param file the file's name, for the sentence
 * @returns one name a field; a sentence for each that had to be made (null where it was not); sentences on the whole
 * @throws Refusal where the header holds nothing but numbers, so that it seems to be missing
 */
export function columnNames(fields: readonly string[], file: string): ColumnNames {
  const filled = fields.filter((field) => field !== '');
  if (filled.length > 0 && filled.every((field) => NUMBER.test(field))) {
    throw new Refusal(
      `The first line of ${file} holds only numbers (${listed(filled.map(quoted), 3)}): put a line with the column names above it.`,
    );
  }
  const taken = new Set(fields);
  const names: string[] = [];
  const notes: (string | null)[] = [];
  for (const [i, field] of fields.entries()) {
    if (field !== '' && !names.includes(field)) {
      names.push(field);
      notes.push(null);
      continue;
    }
    const name = field === '' ? unused(`column ${i + 1}`, taken) : unused(field, taken);
    taken.add(name);
    names.push(name);
    notes.push(
      field === ''
        ? `Column ${grouped(i + 1)} has no name in the header; it is called ${quoted(name)}.`
        : `The header names ${quoted(field)} more than once; column ${grouped(i + 1)} is called ${quoted(name)}.`,
    );
  }
  const numeric = filled.find((field) => NUMBER.test(field));
  if (numeric === undefined) return { names, notes, warnings: [] };
  const warning = `The first line was read as column names, though ${quoted(numeric)} in it is a number.`;
  return { names, notes, warnings: [warning] };
}

function unused(wish: string, taken: ReadonlySet<string>): string {
  if (!taken.has(wish)) return wish;
  for (let k = 2; ; k++) if (!taken.has(`${wish} (${k})`)) return `${wish} (${k})`;
}
