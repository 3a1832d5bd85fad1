import { describe, expect, test } from 'vitest';
import { canonicalTable } from '../../src/data/canonical-table.ts';
import { importBytes } from '../../src/data/import/import-bytes.ts';
import { tableFromStored } from '../../src/data/stored.ts';
import { dataCsv } from '../../src/worksheet/data-csv.ts';
import type { DataBlock } from '../../src/worksheet/format.ts';

type Rows = Pick<DataBlock, 'rows' | 'columns'>;

const block: Rows = {
  rows: 3,
  columns: [
    { name: 'ack, ms', type: 'number', values: [412.5, null, 1e-7] },
    { name: 'said', type: 'text', levels: ['two\nlines', 'a "word"'], codes: [0, 1, -1] },
    { name: 'day', type: 'date', levels: ['2026-03-01'], codes: [0, 0, 0] },
  ],
};

describe('dataCsv', () => {
  test('by hand: quotes what RFC 4180 quotes; missing is an empty field', () => {
    expect(dataCsv(block)).toBe(
      '"ack, ms",said,day\n412.5,"two\nlines",2026-03-01\n,"a ""word""",2026-03-01\n1e-7,,2026-03-01\n',
    );
  });

  test('invariance: read back it is the same table, exactly', () => {
    const { table } = importBytes(new TextEncoder().encode(dataCsv(block)), 'back.csv');
    expect(canonicalTable(table)).toEqual(canonicalTable(tableFromStored(block)));
  });

  test('degenerate: no rows give the header alone', () => {
    expect(dataCsv({ rows: 0, columns: [{ name: 'x', type: 'number', values: [] }] })).toBe('x\n');
  });
});
