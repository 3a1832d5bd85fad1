import { describe, expect, it } from 'vitest';
import { canonicalTable } from '../../src/data/canonical-table.ts';
import { importText } from '../../src/data/import/import-bytes.ts';
import { type PlainBlock, storedFromTable, tableFromStored } from '../../src/data/stored.ts';

const TEXT = 'b,a,when\n1.5,x,2024-01-02\n,,\n-2e-7,"y ""z""",2024-01-03T10:00Z\n';
const read = (text: string) => importText(text, 'test data').table;
const canonical = (text: string) => new TextDecoder().decode(canonicalTable(read(text)));

describe('storedFromTable and tableFromStored', () => {
  it('invariance: a table stored as JSON and read back is the same table', () => {
    const table = read(TEXT);
    const columns = JSON.parse(JSON.stringify(storedFromTable(table)));
    expect(tableFromStored({ rows: table.rows, columns })).toEqual(table);
  });

  it.each<[string, unknown[], number, string]>([
    ['a short column', [{ name: 'a', type: 'number', values: [1] }], 2, 'holds 1 value where there are 2 rows'],
    ['a code without a level', [{ name: 'a', type: 'text', levels: ['x'], codes: [0, 1] }], 2, 'no level for row 2'],
    ['a code below -1', [{ name: 'a', type: 'text', levels: ['x'], codes: [-2, 0] }], 2, 'no level for row 1'],
    ['a broken code', [{ name: 'a', type: 'text', levels: ['x'], codes: [0.5] }], 1, 'no level for row 1'],
    ['a level twice', [{ name: 'a', type: 'text', levels: ['x', 'x'], codes: [0] }], 1, 'has a level twice'],
    ['an empty level', [{ name: 'a', type: 'text', levels: [''], codes: [0] }], 1, 'a level that is not a text'],
    ['a text for a number', [{ name: 'a', type: 'number', values: ['1'] }], 1, 'other than a number in row 1'],
    ['an unknown type', [{ name: 'a', type: 'what', levels: [], codes: [] }], 0, 'a type that is not known'],
    ['no name', [{ name: '', type: 'number', values: [] }], 0, 'has no name'],
    ['half a row', [], 0.5, 'say they have 0.5 rows'],
  ])('refuses %s', (_, columns, rows, sentence) => {
    const block = { name: 'acks.csv', rows, columns } as unknown as PlainBlock;
    expect(() => tableFromStored(block)).toThrow(sentence);
    expect(() => tableFromStored(block)).toThrow(expect.objectContaining({ name: 'Refusal' }));
  });

  it('refuses the same name twice', () => {
    const column = { name: 'a', type: 'number' as const, values: [1] };
    expect(() => tableFromStored({ rows: 1, columns: [column, column] })).toThrow('"a" occurs twice');
  });
});

describe('canonicalTable', () => {
  it('by hand: columns by name, shortest numbers, missing explicit', () => {
    expect(canonical(TEXT)).toBe(
      [
        'rows 3',
        '["a","text"]',
        '"x"',
        'null',
        '"y \\"z\\""',
        '["b","number"]',
        '1.5',
        'null',
        '-2e-7',
        '["when","date"]',
        '"2024-01-02"',
        'null',
        '"2024-01-03T10:00Z"',
        '',
      ].join('\n'),
    );
  });

  it('invariance: delimiter, order of columns, quotation marks and spelling of numbers do not show', () => {
    expect(canonical('a;b\n"x";1,50\ny;-0\n')).toBe(canonical('b,a\n+1.5e0,x\n0.0,"y"\n'));
  });

  it('invariance: the order of rows and a changed value show', () => {
    const base = canonical('a,b\nx,1\ny,2\n');
    expect(canonical('a,b\ny,2\nx,1\n')).not.toBe(base);
    expect(canonical('a,b\nx,1\ny,2.0000000000000004\n')).not.toBe(base);
  });
});
