import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import { appendEntry, checkLog, NO_ENTRY } from '../../src/worksheet/decision-log.ts';
import type { LogEntry } from '../../src/worksheet/format.ts';

const entry = (what: string, reason?: string) => ({
  when: '2026-03-01T09:30:00Z',
  who: 'A. N.',
  what,
  opening: 'blind' as const,
  ...(reason === undefined ? {} : { reason }),
});

const log: readonly LogEntry[] = ['cutoff 2.5 -> 3', 'trim 20 % -> 10 %', 'officer 23 set aside'].reduce(
  (before: readonly LogEntry[], what) => appendEntry(before, entry(what)),
  [],
);

describe('decision log', () => {
  test('by hand: an entry is hashed over its canonical JSON with the hash before it', () => {
    const canonical = `{"before":"${NO_ENTRY}","opening":"blind","what":"cutoff 2.5 -> 3","when":"2026-03-01T09:30:00Z","who":"A. N."}`;
    expect(log[0]?.hash).toBe(createHash('sha256').update(canonical).digest('hex'));
    expect(log.map((each) => each.before)).toEqual([NO_ENTRY, log[0]?.hash, log[1]?.hash]);
  });

  test('by hand: a whole log, one with a reason, one written and read again, and an empty one', () => {
    expect(checkLog(log)).toEqual({ whole: true });
    expect(checkLog(appendEntry(log, entry('opened', 'reanalysis of published data')))).toEqual({ whole: true });
    expect(checkLog(JSON.parse(JSON.stringify(log)) as LogEntry[])).toEqual({ whole: true });
    expect(checkLog([])).toEqual({ whole: true });
  });

  test('invariance: a reason that is undefined is a reason that is not there', () => {
    const odd = appendEntry([], { ...entry('x'), reason: undefined } as never);
    expect(checkLog(JSON.parse(JSON.stringify(odd)) as LogEntry[])).toEqual({ whole: true });
    expect(odd[0]?.hash).toBe(appendEntry([], entry('x'))[0]?.hash);
  });

  test.each([
    ['changed', log.map((each, i) => (i === 1 ? { ...each, what: 'trim 20 % -> 15 %' } : each)), 1, 'was changed'],
    [
      'given another time',
      log.map((each, i) => (i === 2 ? { ...each, when: '2026-03-02T09:30:00Z' } : each)),
      2,
      'was changed',
    ],
    ['given a reason', log.map((each, i) => (i === 0 ? { ...each, reason: 'later' } : each)), 0, 'was changed'],
    ['removed', [log[0], log[2]] as LogEntry[], 1, 'does not follow'],
    ['moved', [log[1], log[0], log[2]] as LogEntry[], 0, 'does not follow'],
    ['put in twice', [log[0], log[0], log[1], log[2]] as LogEntry[], 1, 'does not follow'],
  ])('refuses: an entry that was %s', (_title, broken, at, sentence) => {
    const check = checkLog(broken);
    expect(check).toMatchObject({ whole: false, at });
    expect('sentence' in check && check.sentence).toContain(sentence);
  });

  test('invariance: the log before is not modified', () => {
    const before = [...log];
    appendEntry(log, entry('more'));
    expect(log).toEqual(before);
  });
});
