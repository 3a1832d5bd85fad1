import { describe, expect, it } from 'vitest';
import { csvOf } from '../../src/app/csv.ts';
import { brokenIn, wholeWords } from '../../src/app/log-check.ts';
import { filtered, logTable, logText, signersOf } from '../../src/app/log-words.ts';
import { canonicalTable } from '../../src/data/canonical-table.ts';
import { tableFromStored } from '../../src/data/stored.ts';
import { appendEntry } from '../../src/worksheet/decision-log.ts';
import { sha256 } from '../../src/worksheet/digest.ts';
import type { DataBlock, LogEntry } from '../../src/worksheet/format.ts';
import { dataBlock, worksheet } from '../support/worksheets.ts';

function logOf(...entries: readonly Partial<LogEntry>[]): readonly LogEntry[] {
  return entries.reduce<readonly LogEntry[]>(
    (log, entry) => appendEntry(log, { when: '2026-03-01T09:30:00Z', who: '', what: '', opening: 'blind', ...entry }),
    [],
  );
}

const log = logOf(
  { what: 'trim 20 % \u2192 10 %', who: 'Ada' },
  { what: 'say "no", or =1+1', reason: 'first line\nsecond', opening: 'opened-early' },
);

function whole(block: DataBlock): DataBlock {
  return { ...block, fingerprint: { ...block.fingerprint, table: sha256(canonicalTable(tableFromStored(block))) } };
}

describe('the decision log taken away', () => {
  it('by hand: text has every entry with its recorded time, and the hash of the last', () => {
    const lines = logText({ title: 'Alerts', log }).split('\n');
    expect(lines[0]).toBe('Decision log of "Alerts"');
    expect(lines[2]).toBe(`2 entries; the last has the hash ${log[1]?.hash}.`);
    expect(lines[4]).toBe('1. 2026-03-01T09:30:00Z, Ada (while hidden): trim 20 % \u2192 10 %.');
  });

  it('by hand: CSV quotes what RFC 4180 quotes and disarms nothing else', () => {
    const csv = csvOf(logTable(log)).split('\r\n');
    expect(csv[0]).toBe('entry,when,who,what,reason,conditions,hash_before,hash');
    expect(csv[1]).toBe(
      `1,2026-03-01T09:30:00Z,Ada,trim 20 % \u2192 10 %,,while hidden,${'0'.repeat(64)},${log[0]?.hash}`,
    );
    expect(csv[2]).toContain(',"say ""no"", or =1+1","first line\nsecond",opened early,');
  });

  it('degenerate: an empty log says so', () => {
    expect(logText({ title: 'Alerts', log: [] })).toContain('It has no entries yet.');
    expect(logTable([]).rows).toEqual([]);
  });

  it('by hand: filtered by letters, also of the reason and the name, and by signer', () => {
    expect(filtered(log, ' TRIM ', null)).toEqual([log[0]]);
    expect(filtered(log, 'second', null)).toEqual([log[1]]);
    expect(filtered(log, 'ada', null)).toEqual([log[0]]);
    expect(filtered(log, '', '')).toEqual([log[1]]);
    expect(filtered(log, 'trim', '')).toEqual([]);
    expect(signersOf(log)).toEqual(['Ada', '']);
  });
});

describe('the check on every opening', () => {
  it('by hand: a whole chain and whole data are told with the end of the chain', () => {
    const record = worksheet([], { log, data: [whole(dataBlock('d1', [1, 2]))] });
    expect(brokenIn(record)).toEqual([]);
    expect(wholeWords(record)).toBe(
      `The chain of 2 entries is whole and ends in ${log[1]?.hash}. The data of d1.csv still have the fingerprint they were read with.`,
    );
  });

  it('refuses: a changed entry and a changed value, in words', () => {
    const changed = log.map((entry) => ({ ...entry, what: entry.what.replace('20', '25') }));
    const block = whole(dataBlock('d1', [1, 2]));
    const data = [{ ...block, columns: [{ name: 'x', type: 'number' as const, values: [1, 3] }] }];
    const broken = brokenIn(worksheet([], { log: changed, data }));
    expect(broken).toHaveLength(2);
    expect(broken[0]).toContain('was changed after it was written');
    expect(broken[1]).toContain('The data of d1.csv are not those that were read');
  });
});
