import { needFreeName, withColumn } from '../need-column.ts';
import { Refusal } from '../refusal.ts';
import type { Column, Table } from '../table.ts';
import { counted, grouped, quoted } from '../words.ts';
import { compileFormula, type Formula } from './compile-formula.ts';
import type { Evaluation } from './evaluate.ts';
import type { Fault } from './faults.ts';
import { WHY } from './undefined-where.ts';

/** A table with what the reader should know about how it was made. */
export interface Derived {
  readonly table: Table;
  readonly warnings: readonly string[];
}

/**
 * Adds a column made by a formula. A comparison gives 1 for yes and 0 for no; a row in which a needed value is missing
 * gets a missing value.
 *
 * @param table any table
 * @param options.name name of the new column
 * @param options.formula see compileFormula
 * @returns the table with the column at its end; a warning where rows have no value
 * @throws Refusal for a taken name, a formula that cannot be read, and a formula that is not defined in some rows: it
 *   names the part, the number of rows and the first of them
 */
export function deriveColumn(table: Table, options: { name: string; formula: string }): Derived {
  needFreeName(table, options.name);
  const formula = compileFormula(options.formula, table.columns);
  const asked = formula.on(table);
  const column = columnFrom(formula, asked, options.name, table.rows);
  const fault = asked.faults()[0];
  if (fault !== undefined) throw undefinedIn(fault, table);
  const missing = countMissing(column);
  const warnings =
    missing === 0
      ? []
      : [
          `Column ${options.name} has no value in ${counted(missing, 'row')}, where a value it is made from is missing.`,
        ];
  return { table: withColumn(table, column), warnings };
}

function columnFrom(formula: Formula, asked: Evaluation, name: string, rows: number): Column {
  if (formula.type === 'date') {
    throw new Refusal(
      'The formula gives a date as it stands: compare it with another one, or choose the column itself.',
    );
  }
  if (formula.type !== 'text') {
    const values = new Float64Array(rows);
    for (let row = 0; row < rows; row++) values[row] = asked.number(row) + 0;
    return { name, type: 'number', values };
  }
  const codes = new Int32Array(rows).fill(-1);
  const place = new Map<string, number>();
  for (let row = 0; row < rows; row++) {
    const text = asked.text(row);
    if (text === null || text === '') continue;
    const code = place.get(text) ?? place.size;
    place.set(text, code);
    codes[row] = code;
  }
  return { name, type: 'text', codes, levels: [...place.keys()] };
}

function undefinedIn({ part, why, count, row }: Fault, table: Table): Refusal {
  const offer =
    why === WHY.log
      ? 'Add a constant c that you declare, as in ln(x + c), or keep only the rows above zero first.'
      : 'Keep only the rows where it is defined first, or choose with if(condition, a, b).';
  return new Refusal(
    `${quoted(part)} is not defined in ${counted(count, 'row')} (first: row ${grouped(table.origin[row] as number)}), where ${why}. ${offer}`,
  );
}

function countMissing(column: Column): number {
  let missing = 0;
  if (column.type === 'number') for (const value of column.values) missing += Number.isNaN(value) ? 1 : 0;
  else for (const code of column.codes) missing += code < 0 ? 1 : 0;
  return missing;
}
