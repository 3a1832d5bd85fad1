import { describe, expect, it } from 'vitest';
import { filterRows } from '../../../src/data/derive/filter-rows.ts';
import { applyFunction, type NamedFunction } from '../../../src/data/derive/named-functions.ts';
import { recode } from '../../../src/data/derive/recode.ts';
import { importText } from '../../../src/data/import/import-bytes.ts';
import { type Table, textAt } from '../../../src/data/table.ts';

const read = (text: string) => importText(text, 'test data').table;
const last = (table: Table) => {
  const column = table.columns.at(-1);
  return column === undefined
    ? []
    : [column.type, ...Array.from({ length: table.rows }, (_, row) => textAt(column, row))];
};

describe('applyFunction', () => {
  const table = read('x,t\n4,a\n1,b\n,c\n4,d\n100,e\n');
  it.each<[NamedFunction, string[]]>([
    ['natural log', [String(Math.log(4)), '0', '', String(Math.log(4)), String(Math.log(100))]],
    ['log10', [String(Math.log10(4)), '0', '', String(Math.log10(4)), '2']],
    ['square root', ['2', '1', '', '2', '10']],
    ['reciprocal', ['0.25', '1', '', '0.25', '0.01']],
    ['absolute value', ['4', '1', '', '4', '100']],
    ['rank', ['2.5', '1', '', '2.5', '4']],
  ])('by hand: %s', (fn, expected) => {
    expect(last(applyFunction(table, { name: 'y', fn, of: 'x' }).table)).toEqual(['number', ...expected]);
  });

  it('by hand: pooled z scores of 1, 2, 3 are -1, 0, 1 (1e-15), however large the unit', () => {
    for (const unit of [1, 1e200, 1e-200]) {
      const { table: out } = applyFunction(read(`x\n${unit}\n${2 * unit}\n${3 * unit}\n`), {
        name: 'z',
        fn: 'z score pooled',
        of: 'x',
      });
      const column = out.columns.at(-1);
      const z = column?.type === 'number' ? [...column.values] : [];
      expect(z).toHaveLength(3);
      for (const [i, value] of z.entries()) expect(Math.abs(value - (i - 1))).toBeLessThanOrEqual(1e-15);
    }
  });

  it('refuses what is not defined, naming column, rows and the way out', () => {
    const bad = read('id,x\n1,3\n2,0\n3,-2\n4,0\n');
    const run =
      (fn: NamedFunction, plus = 0) =>
      () =>
        applyFunction(bad, { name: 'y', fn, of: 'x', plus });
    expect(run('natural log')).toThrow(
      'The natural log is not defined in 3 rows (first: row 2), where column x is zero or negative. Add a constant c that you declare, as in log(x + c)',
    );
    expect(run('log10', 2)).toThrow('is not defined in 1 row (first: row 3), where column x + 2 is zero or negative');
    expect(run('square root')).toThrow('is not defined in 1 row (first: row 3), where column x is negative');
    expect(run('reciprocal')).toThrow('is not defined in 2 rows (first: row 2), where column x is zero');
    expect(() => applyFunction(table, { name: 'y', fn: 'rank', of: 't' })).toThrow(
      'Column t is text, so the rank is not defined',
    );
    expect(() => applyFunction(read('x\n2\n2\n'), { name: 'y', fn: 'z score pooled', of: 'x' })).toThrow(
      'all its values are the same',
    );
    expect(() => applyFunction(read('x,y\n2,\n,1\n'), { name: 'z', fn: 'z score pooled', of: 'x' })).toThrow(
      'fewer than two rows',
    );
  });

  it('by hand: a declared constant makes the log defined', () => {
    const { table: out } = applyFunction(read('x,k\n0,1\n9,1\n'), { name: 'y', fn: 'log10', of: 'x', plus: 1 });
    expect(last(out)).toEqual(['number', '0', '1']);
  });
});

describe('recode', () => {
  const table = read('alert,code,when\ntone,1,2024-01-01\nvoice,9999,2024-01-02\n,2,\ntone,,2024-01-02\n');
  it.each<[string, string, Record<string, string | number | null>, 'keep' | 'missing', string[]]>([
    ['text to text', 'alert', { tone: 'beep' }, 'keep', ['text', 'beep', 'voice', '', 'beep']],
    ['text to number', 'alert', { tone: '1', voice: 2 }, 'keep', ['number', '1', '2', '', '1']],
    ['two levels made one', 'alert', { tone: 'any', voice: 'any' }, 'keep', ['text', 'any', 'any', '', 'any']],
    ['a code made missing', 'code', { 9999: '' }, 'keep', ['number', '1', '', '2', '']],
    ['a number told by its value', 'code', { '1.0': '10' }, 'keep', ['number', '10', '9999', '2', '']],
    ['numbers to words', 'code', { 1: 'low', 2: 'high' }, 'missing', ['text', 'low', '', 'high', '']],
    ['dates stay dates', 'when', { '2024-01-01': null }, 'keep', ['date', '', '2024-01-02', '', '2024-01-02']],
  ])('by hand: %s', (_, of, map, otherwise, expected) => {
    const { table: out, warnings } = recode(table, { name: 'new', of, map, otherwise });
    expect(last(out)).toEqual(expected);
    expect(warnings).toEqual([]);
  });

  it('by hand: an old value that does not occur is said; one named twice is refused', () => {
    const { warnings } = recode(table, { name: 'new', of: 'alert', map: { tonee: 'x' }, otherwise: 'keep' });
    expect(warnings).toEqual(['"tonee" does not occur in column alert.']);
    const twice = () => recode(table, { name: 'new', of: 'code', map: { 1: 'a', '1.0': 'b' }, otherwise: 'keep' });
    expect(twice).toThrow('The recoding names "1" twice');
  });
});

describe('filterRows', () => {
  const table = read('age,alert,when\n17,tone,2024-01-01\n18,voice,2024-01-02T12:00Z\n,tone,\n60,,2024-02-01\n');
  it.each<[Parameters<typeof filterRows>[1], number[], number, number]>([
    [{ column: 'age', op: 'is at least', value: 18 }, [2, 4], 2, 1],
    [{ column: 'age', op: 'is at least', value: '18.0' }, [2, 4], 2, 1],
    [{ column: 'age', op: 'is above', value: 18 }, [4], 3, 1],
    [{ column: 'age', op: 'is at most', value: 18 }, [1, 2], 2, 1],
    [{ column: 'age', op: 'is below', value: 18 }, [1], 3, 1],
    [{ column: 'age', op: 'is', value: 60 }, [4], 3, 1],
    [{ column: 'age', op: 'is not', value: 60 }, [1, 2], 2, 1],
    [{ column: 'age', op: 'is one of', value: '17, 60' }, [1, 4], 2, 1],
    [{ column: 'age', op: 'is missing' }, [3], 3, 0],
    [{ column: 'age', op: 'is not missing', value: '' }, [1, 2, 4], 1, 1],
    [{ column: 'alert', op: 'is', value: 'tone' }, [1, 3], 2, 1],
    [{ column: 'alert', op: 'is not', value: 'tone' }, [2], 3, 1],
    [{ column: 'alert', op: 'is one of', value: ['tone', 'voice'] }, [1, 2, 3], 1, 1],
    [{ column: 'when', op: 'is at least', value: '2024-01-02T12:00Z' }, [2, 4], 2, 1],
    [{ column: 'when', op: 'is', value: '2024-01-01' }, [1], 3, 1],
  ])('by hand: %j', (options, rows, dropped, droppedMissing) => {
    const out = filterRows(table, options);
    expect([...out.table.origin]).toEqual(rows);
    expect([out.dropped, out.droppedMissing]).toEqual([dropped, droppedMissing]);
  });

  it('refuses what has no meaning, and an empty table', () => {
    const run = (options: Parameters<typeof filterRows>[1]) => () => filterRows(table, options);
    expect(run({ column: 'alert', op: 'is above', value: 'tone' })).toThrow('Column alert is text, which has no order');
    expect(run({ column: 'alert', op: 'is', value: 'Tone' })).toThrow(
      'Column alert never is "Tone": choose among "tone" and "voice".',
    );
    expect(run({ column: 'age', op: 'is', value: 'old' })).toThrow('"old", which is not a number');
    expect(run({ column: 'when', op: 'is', value: 'May' })).toThrow('"May", which is not a date such as');
    expect(run({ column: 'age', op: 'is', value: ' ' })).toThrow('Say which value rows are kept by.');
    expect(run({ column: 'age', op: 'is above', value: 99 })).toThrow(
      'No row is left: in none is age as asked (is above 99)',
    );
    expect(run({ column: 'sex', op: 'is missing' })).toThrow('There is no column called "sex"');
  });
});
