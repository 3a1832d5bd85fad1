import type { BestExponent } from '../../numerics/transform/best-exponent.ts';
import { boxCox, boxCoxLambda } from '../../numerics/transform/box-cox.ts';
import { yeoJohnson, yeoJohnsonLambda } from '../../numerics/transform/yeo-johnson.ts';
import { needFreeName, needNumbers, withColumn } from '../need-column.ts';
import { Refusal } from '../refusal.ts';
import type { Table } from '../table.ts';
import { counted, grouped } from '../words.ts';
import type { Derived } from './derive-column.ts';

export type PowerTransform = 'Box-Cox power' | 'Yeo-Johnson power';

/** Exponent of a power transformation and the values it was estimated from. */
export interface PowerEstimate {
  readonly lambda: number;
  /** Values with which it was estimated: every value of the column. */
  readonly n: number;
}

/**
 * Adds a column that is a power of one other, the exponent the likeliest for normal values. It is estimated from all values of
 * the column together: there is no parameter through which a condition could reach it.
 *
 * @param table any table
 * @param options.name name of the new column
 * @param options.fn which family of powers
 * @param options.of the column it is taken of
 * @returns the table with the column at its end, missing staying missing, and the exponent
 * @throws Refusal where a Box-Cox power meets a value of zero or below, where no exponent is the likeliest, and where the powers
 *   run beyond the largest number
 * @source Box & Cox 1964, J. R. Stat. Soc. B 26, 211-252; Yeo & Johnson 2000, Biometrika 87, 954-959
 * @checked outside check cases box_cox_lambda and yeo_johnson_lambda, 1e-6
 */
export function applyPower(
  table: Table,
  options: { readonly name: string; readonly fn: PowerTransform; readonly of: string },
): Derived & { readonly power: PowerEstimate } {
  const { name, fn, of } = options;
  needFreeName(table, name);
  const { values } = needNumbers(table, of, `the ${fn}`);
  if (fn === 'Box-Cox power') refuseNonPositive(table, values, of);
  const there = values.filter((value) => !Number.isNaN(value));
  const { lambda, reason } = likeliest(fn, there);
  if (lambda === null) {
    throw new Refusal(`There is no ${fn} of ${of}, because ${reason}: choose another column or function.`);
  }
  const powered = fn === 'Box-Cox power' ? boxCox(there, lambda) : yeoJohnson(there, lambda);
  if (!powered.every((value) => Number.isFinite(value))) {
    throw new Refusal(
      `The ${fn} of ${of} with exponent ${grouped(lambda)} runs beyond the largest number. Derive the column in a larger unit first.`,
    );
  }
  let at = 0;
  const out = values.map((value) => (Number.isNaN(value) ? value : (powered[at++] as number)));
  const made = withColumn(table, { name, type: 'number', values: out });
  return { table: made, warnings: [], power: { lambda, n: there.length } };
}

function likeliest(fn: PowerTransform, values: Float64Array): BestExponent {
  return fn === 'Box-Cox power' ? boxCoxLambda(values) : yeoJohnsonLambda(values);
}

function refuseNonPositive(table: Table, values: Float64Array, of: string): void {
  const bad = Array.from(values.keys()).filter((row) => (values[row] as number) <= 0);
  if (bad.length === 0) return;
  throw new Refusal(
    `The Box-Cox power is not defined in ${counted(bad.length, 'row')} (first: row ${grouped(table.origin[bad[0] as number] as number)}), where column ${of} is zero or negative. Take the Yeo-Johnson power, or add a constant that you declare with a formula first.`,
  );
}
