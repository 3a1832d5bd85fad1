import { describe, expect, it } from 'vitest';
import { importBytes, importText } from '../../../src/data/import/import-bytes.ts';
import { type Column, type Table, textAt } from '../../../src/data/table.ts';

const bytes = (text: string) => new TextEncoder().encode(text);
const cells = (column: Column | undefined) =>
  column === undefined
    ? []
    : Array.from({ length: column.type === 'number' ? column.values.length : column.codes.length }, (_, row) =>
        textAt(column, row),
      );
const grid = (table: Table) => table.columns.map((column) => [column.name, column.type, ...cells(column)]);

describe('delimiters and records', () => {
  const expected = [
    ['alert', 'text', 'tone', 'voice'],
    ['ack_ms', 'number', '412.5', '-3'],
  ];
  it.each([
    ['comma', 'alert,ack_ms\ntone,412.5\nvoice,-3\n'],
    ['semicolon', 'alert;ack_ms\ntone;412.5\nvoice;-3\n'],
    ['tab', 'alert\tack_ms\ntone\t412.5\nvoice\t-3\n'],
    ['bar', 'alert|ack_ms\ntone|412.5\nvoice|-3\n'],
    ['CRLF', 'alert,ack_ms\r\ntone,412.5\r\nvoice,-3\r\n'],
    ['CR alone', 'alert,ack_ms\rtone,412.5\rvoice,-3\r'],
    ['no last line end', 'alert,ack_ms\ntone,412.5\nvoice,-3'],
    ['blank lines', '\n\nalert,ack_ms\n\ntone,412.5\n   \n\r\nvoice,-3\n\n'],
    ['trailing delimiters', 'alert,ack_ms,\ntone,412.5,\nvoice,-3,\n'],
    ['trailing delimiter in the header only', 'alert,ack_ms,\ntone,412.5\nvoice,-3\n'],
    ['trailing delimiter in a row only', 'alert,ack_ms\ntone,412.5,\nvoice,-3\n'],
    ['spaces around cells', 'alert , ack_ms\n"tone", 412.5\n "voice" ,  -3 \n'],
    ['quoted numbers', '"alert","ack_ms"\n"tone","412.5"\n"voice"," -3"\n'],
    ['a byte order mark', '\ufeffalert,ack_ms\ntone,412.5\nvoice,-3\n'],
    ['a named delimiter', 'sep=;\r\nalert;ack_ms\r\ntone;412.5\r\nvoice;-3\r\n'],
  ])('by hand: %s', (_, text) => {
    const { table, warnings } = importBytes(bytes(text), 'acks.csv');
    expect(grid(table)).toEqual(expected);
    expect(warnings).toEqual([]);
    expect([...table.origin]).toEqual([1, 2]);
  });

  it('by hand: quoted line breaks, delimiters and doubled quotation marks stay in the text', () => {
    const { table } = importText('id,note\n1,"late,\nvery ""late"""\n2,"x\r\ny"\n3,5" pipe\n', 'n.csv');
    expect(cells(table.columns[1])).toEqual(['late,\nvery "late"', 'x\r\ny', '5" pipe']);
  });

  it('by hand: a quoted and a bare spelling of one text are one level', () => {
    const { table } = importText('id,a\n1,"to""ne"\n2,to"ne\n3,"to""ne"\n', 'n.csv');
    expect(table.columns[1]).toMatchObject({ levels: ['to"ne'] });
  });

  it('by hand: the name of the file does not tell the delimiter', () => {
    for (const name of ['a.tsv', 'a.csv', 'a.txt', 'a']) {
      expect(importText('a\tb\n1\tx\n', name).table.columns).toHaveLength(2);
    }
  });

  it('by hand: commas inside values do not outvote the semicolon', () => {
    const { table } = importText('name;x, in cm\n"Ito, A";1,5\n"Roe, B";2,25\n', 'n.csv');
    expect(grid(table)).toEqual([
      ['name', 'text', 'Ito, A', 'Roe, B'],
      ['x, in cm', 'number', '1.5', '2.25'],
    ]);
  });
});

describe('encodings', () => {
  const text = 'größe,wörter\n1,naïve – “x”\n2,𝛼é\n';
  const wide = (littleEndian: boolean) => {
    const view = new DataView(new ArrayBuffer(2 * text.length + 2));
    view.setUint16(0, 0xfeff, littleEndian);
    for (let i = 0; i < text.length; i++) view.setUint16(2 + 2 * i, text.charCodeAt(i), littleEndian);
    return new Uint8Array(view.buffer);
  };
  it('by hand: UTF-8 and UTF-16 of both orders read alike', () => {
    for (const source of [bytes(text), wide(true), wide(false)]) {
      const { table, warnings } = importBytes(source, 'g.csv');
      expect(grid(table)).toEqual([
        ['größe', 'number', '1', '2'],
        ['wörter', 'text', 'naïve – “x”', '𝛼é'],
      ]);
      expect(warnings).toEqual([]);
    }
  });

  it('by hand: other bytes are read as Latin-1, with a warning that names the line', () => {
    const latin = Uint8Array.from('a,b\n1,x\n2,caf\xe9 \x80\x93\n', (c) => c.charCodeAt(0));
    const { table, warnings } = importBytes(latin, 'l.csv');
    expect(cells(table.columns[1])).toEqual(['x', 'café €“']);
    expect(warnings).toEqual([
      'l.csv is not UTF-8 (first on line 3); it was read as Latin-1. Check letters such as é or ü in names and text.',
    ]);
  });

  it('agrees with TextDecoder in fatal mode on what is UTF-8 (random bytes, exactly)', () => {
    let state = 7;
    const next = (n: number) => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return Math.floor((state / 2 ** 32) * n);
    };
    const leads = [0x41, 0xc3, 0xc1, 0xe0, 0xe2, 0xed, 0xf0, 0xf4, 0xf5, 0x80, 0xbf, 0x9f, 0xa0, 0x90, 0x8f];
    for (let k = 0; k < 300; k++) {
      const body = Uint8Array.from({ length: 1 + next(5) }, () => leads[next(leads.length)] as number);
      const source = Uint8Array.from([...bytes('a,b\n1,"'), ...body, ...bytes('"\n')]);
      let valid = true;
      try {
        new TextDecoder('utf-8', { fatal: true }).decode(source);
      } catch {
        valid = false;
      }
      const { warnings } = importBytes(source, 'f.csv');
      expect([...body, warnings.some((w) => w.includes('not UTF-8'))]).toEqual([...body, !valid]);
    }
  });
});

describe('refuses, saying where', () => {
  it.each([
    ['an empty file', '', 'x.csv is empty: '],
    ['blank lines only', '\n \r\n', 'x.csv holds only blank lines: '],
    ['a header only', 'a,b\n', 'x.csv has column names but no rows'],
    ['a short row', 'a,b,c\n1,2,3\n\n4,5\n', 'x.csv, line 4 has 2 fields where the header has 3'],
    ['a long row', 'a,b\n1,2\n"3\n3",4\n5,6,7\n', 'x.csv, line 5 has 3 fields where the header has 2'],
    ['one field where two are due', 'a,b\n1,2\nend of file\n', 'x.csv, line 3 has 1 field where the header has 2'],
    ['rows longer than a header of one', 'note\nhello, world\n', 'x.csv, line 2 has 2 fields where the header has 1'],
    ['a mark never closed', 'a,b\n1,2\n3,"x\n4,5\n', 'x.csv, line 3: a quotation mark is opened and never closed'],
    ['a mark never closed in the header', 'a,"b\n1,2\n', 'x.csv, line 1: a quotation mark is opened and never closed'],
    ['text after a closing mark', 'a,b\n1,"x"y\n', 'x.csv, line 2: text follows a closing quotation mark'],
    ['NUL bytes', 'a,b\n1,\0\n', 'x.csv is not a text file (byte 7 is NUL)'],
    ['a zip container', 'PK\x03\x04....', 'x.csv is a spreadsheet or another zip container'],
    ['a PDF', '%PDF-1.7\n', 'x.csv is a PDF document'],
    ['a web page', '<!DOCTYPE html><table>', 'x.csv is a web page or XML'],
    ['a missing header', '1,2\n3,4\n', 'The first line of x.csv holds only numbers ("1" and "2")'],
    ['nothing but delimiters', ',\n,\n', 'x.csv holds neither column names nor values'],
    ['more columns than can be read', `${'a,'.repeat(16_384)}b\n`, 'x.csv has 16,385 columns'],
  ])('refuses %s', (_, text, sentence) => {
    const run = () => importText(text, 'x.csv');
    expect(run).toThrow(sentence);
    expect(run).toThrow(
      expect.objectContaining({ name: 'Refusal', message: expect.stringMatching(/: .{15,}|\. .{15,}/) }),
    );
  });
});

describe('column names', () => {
  it('by hand: duplicate and empty names get a name and a warning', () => {
    const { table, warnings } = importText(',a,a,column 1,a (2)\n1,2,3,4,5\n', 'x.csv');
    expect(table.columns.map((column) => column.name)).toEqual(['column 1 (2)', 'a', 'a (3)', 'column 1', 'a (2)']);
    expect(warnings).toEqual([
      'Column 1 has no name in the header; it is called "column 1 (2)".',
      'The header names "a" more than once; column 3 is called "a (3)".',
    ]);
  });

  it('by hand: a nameless column without values is left out, one with values is kept', () => {
    const { table } = importText('a,,b,\n1,,2,x\n3,,4,\n', 'x.csv');
    expect(grid(table)).toEqual([
      ['a', 'number', '1', '3'],
      ['b', 'number', '2', '4'],
      ['column 4', 'text', 'x', ''],
    ]);
  });

  it('by hand: a number among the names is pointed out', () => {
    const { warnings } = importText('P1,tone,431.2\nP2,tone,502\n', 'x.csv');
    expect(warnings).toContain('The first line was read as column names, though "431.2" in it is a number.');
  });
});
