import { describe, expect, it } from 'vitest';
import { csvOf, tabbedOf } from '../../src/app/csv.ts';
import { safeName } from '../../src/app/download.ts';

const table = {
  title: 'scores',
  columns: [
    { name: 'who', numeric: false },
    { name: 'score, ms', numeric: true },
  ],
  rows: [
    ['a "b"', '1.3'],
    ['=SUM(1)', ''],
  ],
  raw: [
    ['a "b"', 1.3333333333333333],
    ['=SUM(1)', null],
  ],
};

describe('a table taken away', () => {
  it('by hand: full-precision numbers, quoted where a comma or a quote stands (RFC 4180)', () => {
    expect(csvOf(table)).toBe('who,"score, ms"\r\n"a ""b""",1.3333333333333333\r\n\'=SUM(1),\r\n');
  });

  it('refuses to hand a formula to a spreadsheet, and leaves negative numbers alone', () => {
    const rows = [['@x'], ['-12.5'], ['-cmd'], ['\u221212']];
    const shown = csvOf({ title: 't', columns: [{ name: '+n', numeric: false }], rows });
    expect(shown).toBe("'+n\r\n'@x\r\n-12.5\r\n'-cmd\r\n\u221212\r\n");
  });

  it('by hand: copied as shown, one tab between values', () => {
    expect(tabbedOf(table)).toBe('who\tscore, ms\na "b"\t1.3\n=SUM(1)\t');
    expect(tabbedOf({ ...table, rows: [['a\tb\nc', '1']] })).toContain('a b c\t1');
  });

  it('by hand: file names keep letters and lose what a file system minds', () => {
    expect(safeName('Bridge: voice/tone?')).toBe('Bridge voice tone');
    expect(safeName('../\u2026')).toBe('standfast');
    expect(safeName('\u00c9tude n\u2020 3')).toBe('\u00c9tude n 3');
  });
});
