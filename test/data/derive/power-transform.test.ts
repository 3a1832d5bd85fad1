import { expect, test } from 'vitest';
import { applyPower } from '../../../src/data/derive/power-transform.ts';
import { columnOf, type Table } from '../../../src/data/table.ts';
import { columnIn, referenceColumns } from '../../support/reference-columns.ts';
import { tableOf } from '../../support/tables.ts';

const cars = tableOf({ hp: Array.from(columnIn(referenceColumns('mtcars'), 'hp')) });
const made = (table: Table) => {
  const column = columnOf(table, 'y');
  return column?.type === 'number' ? [...column.values] : [];
};

// SciPy 1.10 boxcox and yeojohnson, as recorded in test/reference/cases/mtcars.json.
test('agrees with SciPy: exponents of horsepower .094097 and .087850, estimated from all 32 values', () => {
  const boxCox = applyPower(cars, { name: 'y', fn: 'Box-Cox power', of: 'hp' });
  expect(boxCox.power.lambda).toBeCloseTo(0.09409730409724175, 6);
  expect(boxCox.power.n).toBe(32);
  const yeoJohnson = applyPower(cars, { name: 'y', fn: 'Yeo-Johnson power', of: 'hp' });
  expect(yeoJohnson.power.lambda).toBeCloseTo(0.087849604812276, 5);
  // (110^l - 1) / l of the first car.
  const { lambda } = boxCox.power;
  expect(made(boxCox.table)[0]).toBeCloseTo((110 ** lambda - 1) / lambda, 10);
});

test('invariance: the order of the rows, as any relabelling of conditions, leaves the exponent', () => {
  const values = Array.from(columnIn(referenceColumns('mtcars'), 'hp'));
  const turned = applyPower(tableOf({ hp: values.toReversed() }), { name: 'y', fn: 'Box-Cox power', of: 'hp' });
  expect(turned.power.lambda).toBeCloseTo(0.09409730409724175, 6);
  expect(columnOf(cars, 'y')).toBe(undefined);
});

test('by hand: missing stays missing and does not count', () => {
  const gap = tableOf({ x: [2, null, 9, 4, 30] });
  for (const fn of ['Box-Cox power', 'Yeo-Johnson power'] as const) {
    const result = applyPower(gap, { name: 'y', fn, of: 'x' });
    expect(result.power.n).toBe(4);
    expect(made(result.table)[1]).toBe(NaN);
    expect(made(result.table).filter((value) => Number.isFinite(value))).toHaveLength(4);
  }
});

test('refuses zero and below for Box-Cox, naming rows and a way on (methods R5); Yeo-Johnson takes them', () => {
  const signs = tableOf({ x: [3, 0, 5, -2, 8] });
  expect(() => applyPower(signs, { name: 'y', fn: 'Box-Cox power', of: 'x' })).toThrow(
    /not defined in 2 rows \(first: row 2\), where column x is zero or negative\. Take the Yeo-Johnson power/,
  );
  expect(made(applyPower(signs, { name: 'y', fn: 'Yeo-Johnson power', of: 'x' }).table)).toHaveLength(5);
});

test('refuses equal values, too few, text, and a taken name', () => {
  const odd = tableOf({ same: [4, 4, 4], two: [1, 2, null], who: ['a', 'b', 'c'] });
  const power =
    (of: string, name = 'y') =>
    () =>
      applyPower(odd, { name, fn: 'Box-Cox power', of });
  expect(power('same')).toThrow(/no Box-Cox power of same, because all scores are equal/);
  expect(power('two')).toThrow(/because fewer than 3 scores/);
  expect(power('who')).toThrow(/Column who is text/);
  expect(power('same', 'two')).toThrow(/already/);
});
