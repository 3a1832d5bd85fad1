import { describe, expect, it } from 'vitest';
import { compileFormula } from '../../../src/data/derive/compile-formula.ts';
import { deriveColumn } from '../../../src/data/derive/derive-column.ts';
import { importText } from '../../../src/data/import/import-bytes.ts';
import { textAt } from '../../../src/data/table.ts';

const table = importText(
  'ack_ms,load,alert,when,age in years,a-b,none\n400,2,tone,2024-01-31,30,1,\n,3,voice,2024-02-01T06:00Z,40,2,\n900,0,,2023-12-31,50,3,\n',
  'test data',
).table;

/** The new column's values as text, '' = missing. */
function values(formula: string): string[] {
  const { table: out } = deriveColumn(table, { name: 'new', formula });
  const column = out.columns.at(-1);
  return column === undefined ? [] : [0, 1, 2].map((row) => textAt(column, row));
}

describe('arithmetic', () => {
  it.each([
    ['load + 1', '3', '4', '1'],
    ['2 + 3 * load', '8', '11', '2'],
    ['(2 + 3) * load', '10', '15', '0'],
    ['2 - 3 - load', '-3', '-4', '-1'],
    ['12 / 3 / (load + 1)', '1.3333333333333333', '1', '4'],
    ['2 ^ 3 ^ load', '512', '134217728', '2'],
    ['-load^2', '-4', '-9', '0'],
    ['(-load)^2', '4', '9', '0'],
    ['2^-1 * load', '1', '1.5', '0'],
    ['- - load', '2', '3', '0'],
    ['+load \u2212 1', '1', '2', '-1'],
    ['6 \u00f7 3 \u00d7 load', '4', '6', '0'],
    ['ack_ms / 1000', '0.4', '', '0.9'],
    ['1e3 * .5', '500', '500', '500'],
    ['[age in years] * 1', '30', '40', '50'],
    ['`a-b` + [load]', '3', '5', '3'],
    ['none + 1', '', '', ''],
  ])('by hand: %s', (formula, ...expected) => expect(values(formula)).toEqual(expected));

  it('agrees with the language itself on 300 random expressions without columns (exactly)', () => {
    let state = 11;
    const next = (n: number) => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return Math.floor((state / 2 ** 32) * n);
    };
    const expression = (depth: number): [string, number] => {
      if (depth === 0) {
        const number = 1 + next(9);
        return [String(number), number];
      }
      const [[a, x], [b, y]] = [expression(next(depth)), expression(next(depth))];
      const made: [string, number][] = [
        [`(${a} + ${b})`, x + y],
        [`(${a} - ${b})`, x - y],
        [`(${a} * ${b})`, x * y],
        [`(-${a} / (${b} * ${b} + 1))`, -x / (y * y + 1)],
      ];
      return made[next(made.length)] as [string, number];
    };
    for (let k = 0; k < 300; k++) {
      const [formula, value] = expression(5);
      expect([formula, values(formula)[0]]).toEqual([formula, String(value + 0)]);
    }
  });
});

describe('functions', () => {
  it.each([
    ['ln(load + 1)', String(Math.log(3)), String(Math.log(4)), '0'],
    ['log10(ack_ms)', String(Math.log10(400)), '', String(Math.log10(900))],
    ['sqrt(ack_ms)', '20', '', '30'],
    ['abs(load - 2)', '0', '1', '2'],
    ['round(load / 4)', '1', '1', '0'],
    ['round(-load / 4)', '-1', '-1', '0'],
    ['round(ack_ms / 7, 2)', '57.14', '', '128.57'],
    ['min(load, 2, [a-b])', '1', '2', '0'],
    ['max(ack_ms, load)', '400', '', '900'],
    ['mean(load, [a-b])', '1.5', '2.5', '1.5'],
    ['reciprocal(load + 1)', String(1 / 3), '0.25', '1'],
    ['if(load > 0, reciprocal(load), 0)', '0.5', String(1 / 3), '0'],
    ['if(ack_ms > 500, 1, 0)', '0', '', '1'],
    ['if(alert = "tone", "t", "other")', 't', 'other', ''],
    ['alert', 'tone', 'voice', ''],
  ])('by hand: %s', (formula, ...expected) => expect(values(formula)).toEqual(expected));
});

describe('comparison', () => {
  it.each([
    ['load >= 2', '1', '1', '0'],
    ['load = 2 or load == 3', '1', '1', '0'],
    ['not load < 2 and not load > 2', '1', '0', '0'],
    ['load \u2265 2 AND load \u2260 3', '1', '0', '0'],
    ['alert <> "tone"', '0', '1', ''],
    ["when >= '2024-01-31'", '1', '1', '0'],
    ['when < "2024-02-01T06:00Z"', '1', '0', '1'],
    ['load = 0 or ack_ms > 0', '1', '', '1'],
    ['load = 3 or ack_ms > 0', '1', '1', '1'],
    ['load = 2 and ack_ms > 0', '1', '0', '0'],
  ])('by hand: %s', (formula, ...expected) => expect(values(formula)).toEqual(expected));
});

describe('refuses with the place', () => {
  it.each([
    ['ack_ms *', 'After "ack_ms *" a value is missing (character 9 of the formula).'],
    ['', 'After the beginning a value is missing (character 1 of the formula).'],
    ['* 2', 'After the beginning a value is missing (character 1'],
    ['(load + 1', 'The parenthesis opened here is not closed (character 1'],
    ['load + 1)', 'After "load + 1" a parenthesis is closed that was not opened (character 9'],
    ['load load', 'After "load" "load" does not fit (character 6'],
    ['load ? 1', '"?" has no meaning in a formula (character 6'],
    ['[load + 1', '[ is not closed with ] (character 1'],
    ['reaction', 'There is no column called "reaction" (character 1'],
    [
      'age * 2',
      'There is no column called "age"; names with spaces or signs stand in brackets: [age in years] (character 1',
    ],
    ['log(load)', 'Write ln for the natural logarithm or log10 (character 1'],
    ['constructor(load)', 'There is no function called constructor; there are ln, log10'],
    ['abs()', 'abs takes 1 value in its parentheses, not 0'],
    ['round(1, 2, 3)', 'round takes 1 to 2 values in its parentheses, not 3'],
    ['alert + 1', '"+" needs a number, but column alert is text (character 1'],
    ['1 + (load > 2)', '"+" needs a number, but what stands here is a comparison (character 5'],
    ['load and 1', '"and" needs a comparison, but column load is a number'],
    ['alert = 2', '"=" compares text with a number (character 9'],
    ['alert < "tone"', '"<" needs numbers or dates; text can only be equal or not'],
    ['when > "soon"', '"soon" is not a date such as 2024-01-31 (character 8'],
    ['1 < load < 3', 'Two comparisons in a row: join them with and'],
    ['if(load > 1, 1, "x")', 'if gives a number or text; both must be of one type (character 17'],
    ['1e999', '1e999 is too large a number'],
    ['when', 'The formula gives a date as it stands'],
    ['('.repeat(200), 'The formula is nested too deeply (character 101'],
    ['1+'.repeat(2000), 'The formula is too long'],
    ['__proto__', 'There is no column called "__proto__"'],
    ['globalThis.process', 'There is no column called "globalThis.process"'],
  ])('refuses %s', (formula, sentence) => {
    expect(() => values(formula)).toThrow(sentence);
    expect(() => values(formula)).toThrow(expect.objectContaining({ name: 'Refusal' }));
  });

  it.each([
    [
      'ln(load)',
      '"ln(load)" is not defined in 1 row (first: row 3), where what it is taken of is zero or negative. Add a constant c that you declare, as in ln(x + c)',
    ],
    [
      'sqrt(2 - load)',
      '"sqrt(2 - load)" is not defined in 1 row (first: row 2), where what it is taken of is negative',
    ],
    ['1 / load', '"1 / load" is not defined in 1 row (first: row 3), where the divisor is zero'],
    ['0 / load', '"0 / load" is not defined in 1 row'],
    ['(-load - 1) ^ .5', 'is not defined in 3 rows (first: row 1), where the base is negative'],
    ['load ^ -1', 'is not defined in 1 row (first: row 3)'],
    ['10 ^ 400', 'is not defined in 3 rows (first: row 1), where the result is beyond the largest number'],
    ['1e308 * 10 - 1e308 * 10', '"1e308 * 10" is not defined in 3 rows'],
  ])('refuses %s where it is not defined', (formula, sentence) => expect(() => values(formula)).toThrow(sentence));
});

describe('deriveColumn', () => {
  it('by hand: a missing part is said, the table before is unchanged, the name must be free', () => {
    const before = table.columns.length;
    const { warnings, table: out } = deriveColumn(table, { name: 'sec', formula: 'ack_ms / 1000' });
    expect(warnings).toEqual(['Column sec has no value in 1 row, where a value it is made from is missing.']);
    expect([table.columns.length, out.columns.length]).toEqual([before, before + 1]);
    expect(() => deriveColumn(table, { name: 'load', formula: '1' })).toThrow(
      'There is a column called "load" already',
    );
    expect(() => deriveColumn(table, { name: ' ', formula: '1' })).toThrow('The new column has no name');
  });

  it('by hand: compileFormula says type and columns read', () => {
    const { type, reads } = compileFormula('if(load > min(load, ack_ms), alert, "x")', table.columns);
    expect([type, reads]).toEqual(['text', ['load', 'ack_ms', 'alert']]);
  });
});
