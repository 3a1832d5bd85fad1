import { describe, expect, it } from 'vitest';
import { importText } from '../../../src/data/import/import-bytes.ts';
import { textAt } from '../../../src/data/table.ts';

/** One column of a file beside an id: its type and cells, and the warnings. */
function column(cells: readonly string[], delimiter = ',') {
  const text = [`id${delimiter}x`, ...cells.map((cell, i) => `p${i}${delimiter}${cell}`)].join('\n');
  const { table, warnings } = importText(`${text}\n`, 'x.csv');
  const x = table.columns[1];
  if (x === undefined) throw new Error('no column');
  return { type: x.type, cells: cells.map((_, row) => textAt(x, row)), warnings: [...warnings] };
}

describe('numbers', () => {
  it.each([
    ['plain', ['1', '-2.5', '.5', '7.'], ['1', '-2.5', '0.5', '7']],
    ['signs and exponents', ['+3', '\u22124.5', '1e3', '-2.5E-2'], ['3', '-4.5', '1000', '-0.025']],
    ['negative zero', ['-0', '-0.0', '0', '-0e5'], ['0', '0', '0', '0']],
    ['spaces', [' 1', '2 ', '  3  ', '" 4 "'], ['1', '2', '3', '4']],
    [
      'long decimals',
      ['0.1000000000000000055', '0.49671415301123267', '1', '2'],
      ['0.1', String(Number('0.49671415301123267')), '1', '2'],
    ],
    ['smallest', ['5e-324', '2.2250738585072014e-308', '1e-400', '1'], ['5e-324', '2.2250738585072014e-308', '0', '1']],
  ])('by hand: %s', (_, cells, expected) => {
    expect(column(cells)).toEqual({ type: 'number', cells: expected, warnings: [] });
  });

  it.each(['1,000', '0x10', 'Infinity', '1e', '1.2.3', '--1', '1e999', '12 %', '1_000', '\u0661', '1 2', '+', 'e5'])(
    'by hand: %s is no number',
    (cell) => {
      const { type, warnings } = column(['1', '2', '3', `"${cell}"`]);
      expect(type).toBe('text');
      expect(warnings).toEqual([`Column x looks numeric but row 4 holds "${cell}"; it is kept as text.`]);
    },
  );

  it('by hand: a few words among numbers keep the column text, naming the first rows', () => {
    const cells = Array.from({ length: 20 }, (_, i) => (i === 16 ? 'abc' : i > 16 ? '?' : String(i)));
    expect(column(cells)).toMatchObject({
      type: 'text',
      warnings: ['Column x looks numeric but row 17 holds "abc" and row 18 holds "?"; it is kept as text.'],
    });
  });

  it('by hand: a column of words with some numbers is text without a word', () => {
    expect(column(['a', 'b', 'c', '1'])).toMatchObject({ type: 'text', warnings: [] });
  });

  it('by hand: whole numbers too long for a double stay text', () => {
    const cells = ['9007199254740993', '9007199254740992', '12'];
    expect(column(cells)).toEqual({
      type: 'text',
      cells,
      warnings: [
        'Column x holds whole numbers too long for a number to keep exactly (first in row 1); it is kept as text.',
      ],
    });
  });

  it('by hand: leading zeros are said', () => {
    expect(column(['1', '007'])).toMatchObject({
      type: 'number',
      warnings: ['Column x was read as numbers, which do not keep leading zeros (row 2: "007").'],
    });
  });

  it('by hand: a decimal comma where the delimiter is another mark', () => {
    for (const delimiter of [';', '\t', '|']) {
      expect(column(['3', '1,5', '-2,25', '1e3'], delimiter)).toEqual({
        type: 'number',
        cells: ['3', '1.5', '-2.25', '1000'],
        warnings: ['Column x was read with the comma as its decimal mark (row 2: "1,5" is 1.5).'],
      });
    }
  });

  it('by hand: two decimal marks in one column are not settled by a guess', () => {
    const { type, warnings } = column(['1,5', '2,5', '3.5', '4,5'], ';');
    expect([type, warnings]).toEqual(['text', ['Column x looks numeric but row 3 holds "3.5"; it is kept as text.']]);
  });

  it('invariance: what a column is does not depend on where the odd cell stands', () => {
    const plain = Array.from({ length: 3000 }, (_, i) => String(i / 4));
    for (const at of [0, 60, 2999]) {
      for (const [cell, type] of [
        ['x', 'text'],
        ['NA', 'number'],
        ['', 'number'],
        ['1e2', 'number'],
        ['"3"', 'number'],
      ] as const) {
        expect([at, cell, column(plain.with(at, cell)).type]).toEqual([at, cell, type]);
      }
    }
    const words = Array.from({ length: 3000 }, (_, i) => (i < 60 ? '' : String(i)));
    expect(column(words).type).toBe('number');
  });
});

describe('missing values', () => {
  it('by hand: codes count as missing only as whole cells of numbers or dates', () => {
    expect(column(['1', 'NA', 'n/a', 'NaN', 'NULL', '.', '', '2', 'NA'])).toEqual({
      type: 'number',
      cells: ['1', '', '', '', '', '', '', '2', ''],
      warnings: [
        'Column x: 2 cells with "NA" are read as missing.',
        'Column x: 1 cell with "N/A" is read as missing.',
        'Column x: 1 cell with "NaN" is read as missing.',
        'Column x: 1 cell with "null" is read as missing.',
        'Column x: 1 cell with "." is read as missing.',
      ],
    });
    expect(column(['2024-01-01', 'NA'])).toMatchObject({ type: 'date', cells: ['2024-01-01', ''] });
    expect(column(['male', '.', 'female', ''])).toEqual({
      type: 'text',
      cells: ['male', '.', 'female', ''],
      warnings: ['Column x holds "." as text; recode it where it stands for a missing value.'],
    });
  });

  it('by hand: a column of nothing', () => {
    expect(column(['', '', ''])).toEqual({
      type: 'number',
      cells: ['', '', ''],
      warnings: ['Column x holds no value.'],
    });
    expect(column(['NA', 'NA'])).toMatchObject({ type: 'number', cells: ['', ''] });
  });

  it('by hand: rows empty in every column are kept and said', () => {
    const { table, warnings } = importText('a,b\n1,x\n,\n2,y\n,\n', 'x.csv');
    expect([table.rows, warnings]).toEqual([4, ['2 rows are empty in every column (first: row 2).']]);
  });

  it.each([
    [['310', '420', '9999', '515', '9999'], ['9,999 in 2 rows (first in row 3), far from the rest (310 to 515)']],
    [['1', '2', '-99', '5', '4'], ['\u221299 in 1 row (first in row 3), far from the rest (1 to 5)']],
    [
      ['-99', '999', '1', '2', '3'],
      ['999 in 1 row', '\u221299 in 1 row'],
    ],
    [['310', '420', '999', '515', '800'], []],
    [['0', '1', '1', '0', '1'], []],
    [['9', '1', '5', '3', '7'], []],
    [['9999', '5', '5', '5', '5'], []],
  ])('by hand: %j is left as it is, with a warning where a code lies far out', (cells, expected) => {
    const { type, cells: read, warnings } = column(cells);
    expect([type, read, warnings.length]).toEqual(['number', cells, expected.length]);
    for (const [i, part] of expected.entries()) expect(warnings[i]).toContain(part);
  });
});

describe('dates and text', () => {
  it.each([
    ['2024-02-29', '2024-02-29'],
    ['2024-01-31T10:00', '2024-01-31T10:00'],
    ['2024-01-31 10:00:05', '2024-01-31T10:00:05'],
    ['2024-01-31T10:00:05.250Z', '2024-01-31T10:00:05.250Z'],
    ['2024-01-31T10:00+02:00', '2024-01-31T10:00+02:00'],
  ])('by hand: %s is a date', (cell, expected) => {
    expect(column([cell, cell, ''])).toEqual({ type: 'date', cells: [expected, expected, ''], warnings: [] });
  });

  it.each([
    '2023-02-29',
    '2024-13-01',
    '2024-1-1',
    '31.01.2024',
    '2024-01-01T25:00',
    '20240131T10',
    '2024-01-31T10:00+25:00',
  ])('by hand: %s is text', (cell) => expect(column([cell, cell]).type).toBe('text'));

  it('by hand: spaces around bare text are taken off and said, those in quotation marks stay', () => {
    expect(column(['tone', 'tone ', '" tone"'])).toEqual({
      type: 'text',
      cells: ['tone', 'tone', ' tone'],
      warnings: ['Column x: spaces around the text of 1 cell were taken off (first in row 2).'],
    });
  });
});
