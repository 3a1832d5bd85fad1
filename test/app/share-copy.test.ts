import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { copyForSharing, newCodes, textsWithCodes } from '../../src/app/share-copy.ts';
import { breaksOf } from '../../src/replay/check-whole.ts';
import { exitOf, replayWorksheet } from '../../src/replay/replay-worksheet.ts';
import { computedParts } from '../../src/replay/saved-parts.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import { appendEntry, checkLog } from '../../src/worksheet/decision-log.ts';
import type { DataBlock, Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { cell, dataBlock, worksheet } from '../support/worksheets.ts';

const about = { id: 'copy', when: '2026-03-02T10:00:00Z', who: 'Ada' };
const block: DataBlock = {
  ...dataBlock('d1', []),
  rows: 5,
  columns: [
    { name: 'who', type: 'text', levels: ['Kim', 'Bo'], codes: [0, 1, 0, -1, 1] },
    { name: 'email', type: 'text', levels: ['k@x.org', 'b@x.org'], codes: [0, 1, 0, -1, 1] },
    { name: 'ms', type: 'number', values: [1, 2, null, 4, 5] },
  ],
  warnings: ['Column email: 1 cell is empty.', 'Column ms: 1 cell with "NA" is read as missing.'],
};
const log = appendEntry([], {
  when: '2026-03-01T09:30:00Z',
  who: '',
  what: 'set aside Kim',
  opening: 'blind',
  reason: 'r',
});
const record = worksheet([cell('c1', 'exclusion', { participants: ['Bo', 'nobody'], how: 'named' })], {
  data: [block],
  log,
});
const choices = { leaveOut: [{ block: 'd1', column: 'email' }], replace: 'who' };

function demo(name: string): Worksheet {
  const parsed = parseWorksheet(readFileSync(`demo-data/${name}.standfast.json`, 'utf8'));
  if (!parsed.ok) throw new Error(parsed.sentence);
  return parsed.worksheet;
}

describe('a copy for sharing', () => {
  it('by hand: codes by first appearance, in the data and in the cells; the column gone with its warning', () => {
    const copy = copyForSharing(record, choices, about);
    expect(copy.data[0]?.columns).toEqual([
      { name: 'who', type: 'text', levels: ['P1', 'P2'], codes: [0, 1, 0, -1, 1] },
      block.columns[2],
    ]);
    expect(copy.data[0]?.warnings).toEqual([block.warnings[1]]);
    expect(copy.data[0]?.fingerprint.bytes).toBe(block.fingerprint.bytes);
    expect(copy.cells[0]?.settings.participants).toEqual(['P2', 'nobody']);
    expect(copy.id).toBe('copy');
  });

  it('by hand: codes written as numbers are replaced, too, in the order of the rows and of the files', () => {
    const numbers = (id: string, values: readonly (number | null)[]): DataBlock => ({
      ...dataBlock(id, values),
      columns: [{ name: 'who', type: 'number', values }],
    });
    const data = [numbers('d1', [23, null, 4, 23]), numbers('d2', [4, 8])];
    expect([...newCodes(data, 'who')]).toEqual([
      ['23', 'P1'],
      ['4', 'P2'],
      ['8', 'P3'],
    ]);
    const copy = copyForSharing(worksheet([], { data }), { leaveOut: [], replace: 'who' }, about);
    expect(copy.data[0]?.columns[0]).toMatchObject({ type: 'text', levels: ['P1', 'P2'], codes: [0, -1, 1, 0] });
    expect(copy.data[1]?.columns[0]).toMatchObject({ type: 'text', levels: ['P2', 'P3'], codes: [0, 1] });
    expect(
      newCodes(
        [
          numbers(
            'd1',
            Array.from({ length: 10 }, (_, i) => i),
          ),
        ],
        'who',
      ).get('0'),
    ).toBe('P01');
  });

  it('by hand: a new chain, whose first entry names the old end and the new fingerprint, then the old entries', () => {
    const copy = copyForSharing(record, choices, about);
    const print = copy.data[0]?.fingerprint.table;
    expect(checkLog(copy.log)).toEqual({ whole: true });
    expect(copy.log[0]?.what).toBe(
      'copy made for sharing: 2 codes in who replaced in the order of first appearance; left out email; ' +
        `the log it was made from has 1 entry, which follow here in a new chain, and ends in ${log[0]?.hash}; ` +
        `the table of d1.csv now has the fingerprint ${print}`,
    );
    expect(copy.log[1]).toMatchObject({ what: 'set aside Kim', reason: 'r', when: '2026-03-01T09:30:00Z' });
    expect(breaksOf(copy)).toEqual([]);
  });

  it('by hand: typed texts that name a code are told, bare numbers are not', () => {
    expect(textsWithCodes(record, newCodes(record.data, 'who'))).toEqual(['entry 1 of the log']);
    expect(textsWithCodes({ ...record, title: 'Bo-2 and 4' }, new Map([['4', 'P1']]))).toEqual([]);
  });

  it('invariance: arguments are not modified; without choices only id, log and results differ', () => {
    const before = JSON.stringify(record);
    const {
      id: _id,
      log: _log,
      results: _results,
      ...rest
    } = copyForSharing(record, { leaveOut: [], replace: null }, about);
    const { id: _1, log: _2, results: _3, ...same } = record;
    expect(rest).toEqual(same);
    expect(JSON.stringify(record)).toBe(before);
  });

  it('invariance: scores and what is set aside stay, and the copy is replayed with exit 0', async () => {
    const whole = demo('hearing-words');
    // The comparison and the standing strip are checked by the tests of one file.
    const cells = whole.cells.filter(({ kind }) => kind !== 'comparison' && kind !== 'claim' && kind !== 'standing');
    const run = (each: Worksheet) => computedParts(each, registry, inlineRunner(), '1');
    const copy = copyForSharing(
      { ...whole, cells },
      { leaveOut: [{ block: 'd1', column: 'hearing_level_db' }], replace: 'listener' },
      about,
    );
    const [before, after] = await Promise.all([run({ ...whole, cells }), run(copy)]);
    const scoreOf = (results: Worksheet['results']) => JSON.stringify(results.c6);
    const codes = newCodes(whole.data, 'listener');
    const renamed = scoreOf(before.worksheet.results).replace(/"(\d+)"/g, (_, code: string) => `"${codes.get(code)}"`);
    expect(scoreOf(after.worksheet.results)).toBe(renamed);
    const replayed = await replayWorksheet(after.worksheet, registry, inlineRunner());
    expect(exitOf(replayed)).toBe(0);
  });
});
