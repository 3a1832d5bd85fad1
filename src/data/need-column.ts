import { Refusal } from './refusal.ts';
import { type Column, columnOf, type NumberColumn, type Table } from './table.ts';
import { listed, quoted } from './words.ts';

/**
 * The column called `name`.
 *
 * @param table where to look
 * @param name a column's name
 * @returns the column
 * @throws Refusal that lists the columns there are
 */
export function needColumn(table: Table, name: string): Column {
  const column = columnOf(table, name);
  if (column !== undefined) return column;
  throw new Refusal(
    `There is no column called ${quoted(name)}: choose one of ${listed(
      table.columns.map((each) => each.name),
      8,
    )}.`,
  );
}

/**
 * The number column called `name`.
 *
 * @param table where to look
 * @param name a column's name
 * @param what what is to be done with it, for the sentence: "the natural log"
 * @returns the column
 * @throws Refusal where there is none, or it is text or dates
 */
export function needNumbers(table: Table, name: string, what: string): NumberColumn {
  const column = needColumn(table, name);
  if (column.type === 'number') return column;
  throw new Refusal(
    `Column ${name} is ${column.type === 'date' ? 'a date' : 'text'}, so ${what} is not defined: choose a column of numbers.`,
  );
}

/**
 * A table with one more column at its end.
 *
 * @param table any table
 * @param column of as many rows
 * @returns a new table; the old one is not changed
 * @throws Refusal where the name is empty or taken
 */
export function withColumn(table: Table, column: Column): Table {
  needFreeName(table, column.name);
  return { ...table, columns: [...table.columns, column] };
}

/**
 * Refuses a name for a new column that is empty or taken.
 *
 * @param table where the column is to stand
 * @param name the wished name
 * @throws Refusal
 */
export function needFreeName(table: Table, name: string): void {
  if (name.trim() === '') throw new Refusal('The new column has no name: give it one.');
  if (columnOf(table, name) !== undefined) {
    throw new Refusal(`There is a column called ${quoted(name)} already: give the new one another name.`);
  }
}
