import { describe, expect, it } from 'vitest';
import { changeSentence, sharedSentence } from '../../src/app/change-sentence.ts';
import { type Decision, WorksheetDocument } from '../../src/app/document.ts';
import { retitle, setShared } from '../../src/app/edits.ts';
import type { LogEntry, Worksheet } from '../../src/worksheet/format.ts';
import { plainWorksheet, plainRegistry as registry } from '../support/plain-registry.ts';

function append(log: readonly LogEntry[], decision: Decision): readonly LogEntry[] {
  return [...log, { ...decision, before: log.at(-1)?.hash ?? '', hash: String(log.length + 1) }];
}

function open(worksheet = plainWorksheet('c1 data')): { document: WorksheetDocument; clock: { ms: number } } {
  const clock = { ms: 0 };
  const options = {
    worksheet,
    now: () => '2031-05-06T07:08:09Z',
    clock: () => clock.ms,
    who: () => 'A. Writer',
    append,
  };
  return { document: new WorksheetDocument(options), clock };
}

function setTrim(document: WorksheetDocument, value: number): void {
  const label = (before: Worksheet, after: Worksheet): string | null => sharedSentence(before, after, 'trim');
  document.edit(label, (worksheet) => setShared(worksheet, 'trim', value), { merge: 'trim' });
}

const words = (document: WorksheetDocument): readonly string[] => document.record.log.map((entry) => entry.what);

describe('the open worksheet', () => {
  it('by hand: an edit makes a new record, logs a sentence and tells its listeners', () => {
    const { document } = open();
    const before = document.record;
    const told: string[] = [];
    const stop = document.subscribe((change) => told.push(`${change.type} ${change.label}`));
    document.edit('titled \u201cb\u201d', (worksheet) => retitle(worksheet, 'b'));
    stop();
    document.undo();
    expect(before.title).toBe('a worksheet');
    expect(told).toEqual(['edit titled \u201cb\u201d']);
    expect(document.record.log[0]).toMatchObject({ who: 'A. Writer', opening: 'blind', what: 'titled \u201cb\u201d' });
  });

  it('invariance: undo gives everything but the log back exactly, redo brings the edit again', () => {
    const { document } = open();
    const { log: _, ...start } = document.record;
    document.edit('one', (worksheet) => retitle(worksheet, 'one'));
    document.edit('two', (worksheet) => retitle(worksheet, 'two'));
    document.undo();
    document.undo();
    const { log, ...back } = document.record;
    expect(back).toEqual(start);
    expect(log.map((entry) => entry.what)).toEqual(['one', 'two', 'taken back: two', 'taken back: one']);
    document.redo();
    document.redo();
    expect(document.record.title).toBe('two');
    expect(document.redo()).toBeNull();
  });

  it('by hand: a new edit ends what could be done again', () => {
    const { document } = open();
    document.edit('one', (worksheet) => retitle(worksheet, 'one'));
    document.undo();
    expect(document.redoLabel).toBe('one');
    document.edit('two', (worksheet) => retitle(worksheet, 'two'));
    expect(document.redoLabel).toBeNull();
  });

  it('by hand: a burst of steps on one number is one entry and one undo', () => {
    const { document, clock } = open();
    for (const value of [15, 10, 5]) {
      setTrim(document, value);
      clock.ms += 100;
    }
    expect(words(document)).toEqual(['trim 20 % \u2192 5 %']);
    clock.ms += 2000;
    setTrim(document, 0);
    expect(words(document)).toEqual(['trim 20 % \u2192 5 %', 'trim 5 % \u2192 0 %']);
    document.undo();
    document.undo();
    expect(document.record.shared[0]?.value).toBe(20);
  });

  it('by hand: a burst that comes back to where it began leaves no entry', () => {
    const { document, clock } = open();
    setTrim(document, 15);
    clock.ms += 50;
    setTrim(document, 20);
    expect(words(document)).toEqual([]);
    expect(document.undoLabel).toBeNull();
    expect(document.record.shared[0]?.value).toBe(20);
  });

  it('refuses to undo across the opening of the conditions', () => {
    const { document } = open();
    document.edit('one', (worksheet) => retitle(worksheet, 'one'));
    document.openConditions('reanalysis of published data');
    expect(document.undo()).toBeNull();
    expect(document.record.opening).toMatchObject({ state: 'opened-early', reason: 'reanalysis of published data' });
    expect(document.record.log.at(-1)).toMatchObject({
      opening: 'opened-early',
      reason: 'reanalysis of published data',
    });
    document.edit('two', (worksheet) => retitle(worksheet, 'two'));
    document.undo();
    expect(document.record.title).toBe('one');
    expect(document.undo()).toBeNull();
    expect(document.record.opening.state).toBe('opened-early');
  });

  it('refuses to undo into the worksheet that was open before', () => {
    const { document } = open();
    document.edit('one', (worksheet) => retitle(worksheet, 'one'));
    document.replace({ ...plainWorksheet('c1 data'), title: 'another' });
    expect(document.undo()).toBeNull();
    expect(document.record.title).toBe('another');
  });

  it('degenerate: an edit that gives the same record is none', () => {
    const { document } = open();
    expect(document.edit('nothing', (worksheet) => worksheet)).toBe(false);
    expect(words(document)).toEqual([]);
  });

  it('by hand: two hundred edits are taken back one by one to the start', () => {
    const { document } = open();
    for (let n = 0; n < 200; n++) document.edit(`edit ${n}`, (worksheet) => retitle(worksheet, `title ${n}`));
    let back = 0;
    while (document.undo() !== null) back++;
    expect(back).toBe(200);
    expect(document.record.title).toBe('a worksheet');
  });

  it('by hand: a reference is held and let go', () => {
    const { document } = open();
    document.hold({ when: '2031-05-06', label: '\u221284 ms', shared: { trim: 20 }, finding: null });
    expect(document.record.reference?.shared).toEqual({ trim: 20 });
    document.hold(null);
    expect(words(document)).toEqual(['held as reference: \u221284 ms', 'reference let go']);
  });
});

describe('what the log says of a change', () => {
  const kind = registry.exclusion!;
  const context = { shared: [], given: {}, data: [] };

  it('by hand: the blanks that changed, before and after', () => {
    const before = { cutoff: 2.5, words: '' };
    expect(changeSentence(kind, before, { cutoff: 3, words: '' }, context)).toBe('exclusion: cutoff 2.5 \u2192 3');
    expect(changeSentence(kind, before, { cutoff: null, words: 'late' }, context)).toBe(
      'exclusion: cutoff 2.5 \u2192 none; reason open \u2192 late',
    );
    expect(changeSentence(kind, before, { ...before }, context)).toBeNull();
  });

  it('by hand: a number tied to a shared one, and freed from it', () => {
    const shared = [{ id: 'k', name: 'cutoff of all', value: 2.5, unit: '', min: 0, max: 5, step: 0.5, none: true }];
    const own = { cutoff: 2.5, words: '' };
    const tied = { cutoff: { shared: 'k' }, words: '' };
    expect(changeSentence(kind, own, tied, { ...context, shared })).toBe(
      'exclusion: cutoff follows the shared number cutoff of all, 2.5',
    );
    expect(changeSentence(kind, tied, own, { ...context, shared })).toBe('exclusion: cutoff 2.5, a number of its own');
  });

  it('refuses to name participants: chosen codes are counted', () => {
    const choices = (values: readonly string[]) => ({
      ...kind,
      sentence: (settings: { readonly [key: string]: unknown }) => [
        {
          key: 'who',
          label: 'participants',
          shown: String(settings.who),
          filled: true,
          editor: {
            type: 'choices' as const,
            values: settings.who as string[],
            options: [],
            atLeast: 0,
            set: () => ({}),
          },
        },
      ],
      title: () => values.join(),
    });
    const given = { design: { participants: ['P07', 'P08'] } as never };
    const text = changeSentence(choices(['rule']), { who: ['P07'] }, { who: ['P07', 'P08'] }, { ...context, given });
    expect(text).toBe('rule: participants 1 chosen \u2192 2 chosen');
  });
});
