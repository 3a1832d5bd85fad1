import { describe, expect, it } from 'vitest';
import { looksLikeRows } from '../../src/app/data-actions.ts';
import { blockFromBytes, nextBlockId } from '../../src/app/data-block.ts';
import { demoWorksheets } from '../../src/app/demos.ts';
import { looksLikeWorksheet, worksheetFrom } from '../../src/app/open-worksheet.ts';
import { checkLog } from '../../src/worksheet/decision-log.ts';
import { sha256 } from '../../src/worksheet/digest.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';
import { plainWorksheet } from '../support/plain-registry.ts';

const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);

describe('opening a file', () => {
  it('by hand: worksheet or rows of data, told by name or first letters', () => {
    expect(looksLikeWorksheet(bytes('a,b\n1,2'), 'x.csv')).toBe(false);
    expect(looksLikeWorksheet(bytes('\ufeff {"format":1}'), 'x.txt')).toBe(true);
    expect(looksLikeWorksheet(bytes('<!doctype html>'), 'x')).toBe(true);
    expect(looksLikeWorksheet(bytes(''), 'x.json')).toBe(true);
  });

  it('invariance: what was written is read again', () => {
    const worksheet = plainWorksheet('c1 data', 'c2 design table=c1');
    expect(worksheetFrom(writeWorksheet(worksheet), 'a.json')).toEqual({ worksheet });
  });

  it('refuses a wrong file with a sentence that begins with its name', () => {
    for (const text of ['{', '[]', '{"format":"other"}', '<html></html>']) {
      const opened = worksheetFrom(text, 'wrong.json');
      expect('problem' in opened && opened.problem).toMatch(/^wrong\.json: .+\.$/);
    }
  });

  it('by hand: every demo worksheet opens, the bridge first, with whole logs', () => {
    const demos = demoWorksheets();
    expect(demos[0]?.name).toBe('bridge-alerts.standfast.json');
    for (const demo of demos) {
      const opened = worksheetFrom(demo.text, demo.name);
      expect('worksheet' in opened && opened.worksheet.title).toBe(demo.title);
      expect('worksheet' in opened && checkLog(opened.worksheet.log)).toEqual({ whole: true });
    }
  });

  it('by hand: pasted text looks like rows when every line has a delimiter', () => {
    expect(looksLikeRows('a\tb\n1\t2\n')).toBe(true);
    expect(looksLikeRows('one line, only')).toBe(false);
    expect(looksLikeRows('prose\nover two lines')).toBe(false);
  });

  it('agrees with the digest of the bytes, and gives both fingerprints', () => {
    const block = blockFromBytes(bytes('who,ms\na,1\nb,2\n'), 'x.csv', 'd1');
    expect(block).toMatchObject({ id: 'd1', name: 'x.csv', rows: 2 });
    expect(block.fingerprint.bytes).toBe(sha256(bytes('who,ms\na,1\nb,2\n')));
    // the same table from other bytes has the same second fingerprint
    expect(blockFromBytes(bytes('who;ms\r\na;1\r\nb;2'), 'y.csv', 'd2').fingerprint.table).toBe(
      block.fingerprint.table,
    );
    expect(nextBlockId({ ...plainWorksheet(), data: [block] })).toBe('d2');
  });
});
