import { describe, expect, it } from 'vitest';
import type { DataDetail } from '../../cells/data/kind.ts';
import { dataKind } from '../../cells/data/kind.ts';
import { type DataSettings, guessParticipant } from '../../cells/data/sentence.ts';
import { plainSentence } from '../../cells/kind.ts';
import type { Table } from '../../src/data/table.ts';
import { blankOf, choose, contextOf, run } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

/** Three trials of two officers; one time is missing. */
const block = {
  id: 'd1',
  name: 'alerts.csv',
  rows: 3,
  columns: [
    { name: 'officer', type: 'text', levels: ['P07', 'P08'], codes: [0, 0, 1] },
    { name: 'alert', type: 'text', levels: ['tone', 'voice'], codes: [0, 1, 0] },
    { name: 'ack_ms', type: 'number', values: [512.5, null, 430] },
  ],
  warnings: ['alerts.csv, row 2: the code 999 was read as missing.'],
} as const;
const settings: DataSettings = { data: 'd1', row: 'trial', participant: null };
const context = contextOf({}, { data: [block] });

const compute = () => run<Table, DataDetail>(dataKind, settings, {}, [block]);

describe('the data sentence', () => {
  it('by hand: before and after the file is read', async () => {
    expect(plainSentence(dataKind.sentence({ ...settings, data: null }, contextOf()))).toBe('Read a data file.');
    expect(plainSentence(dataKind.sentence(settings, context))).toBe('Read alerts.csv.');
    const own = await compute();
    expect(plainSentence(dataKind.sentence(settings, { ...context, own }))).toBe(
      'Read alerts.csv: 3 rows, one per trial, from 2 officers.',
    );
    expect(plainSentence(dataKind.sentence({ ...settings, participant: 'alert' }, { ...context, own }))).toMatch(
      /from 2 alerts\.$/,
    );
  });

  it('by hand: filling a blank gives the settings whole; another file forgets the participant column', async () => {
    const parts = dataKind.sentence({ ...settings, participant: 'officer' }, { ...context, own: await compute() });
    expect(choose(parts, 'row', 'participant')).toEqual({ data: 'd1', row: 'participant', participant: 'officer' });
    expect(choose(parts, 'participant', 'alert')).toEqual({ ...settings, participant: 'alert' });
    const { editor, filled } = blankOf(parts, 'file');
    expect(filled).toBe(true);
    expect(editor.type === 'file' && editor.set('d2')).toEqual({ data: 'd2', row: 'trial', participant: null });
  });

  it('by hand: the participant column is guessed by its name only', () => {
    const guess = (...names: string[]) =>
      guessParticipant(tableOf(Object.fromEntries(names.map((name) => [name, ['a']]))));
    expect(guess('trial', 'Participant_ID', 'ms')).toBe('Participant_ID');
    expect(guess('trial', 'subj', 'id')).toBe('subj');
    expect(guess('trial', 'identity', 'ms')).toBeNull();
  });
});

describe('the data cell', () => {
  it('by hand: table, words, flow, notes and record agree', async () => {
    const computed = await compute();
    expect(computed.value.rows).toBe(3);
    expect(dataKind.say(computed, settings)).toBe('alerts.csv has 3 rows and 3 columns.');
    expect(dataKind.flow?.(computed, settings)).toEqual({ count: 3, label: 'trials read', share: 1 });
    expect(dataKind.flow?.(computed, { ...settings, row: 'participant' })).toMatchObject({ label: 'rows read' });
    expect(dataKind.notes?.(computed, settings)).toEqual([
      { type: 'caution', text: 'alerts.csv, row 2: the code 999 was read as missing.' },
      { type: 'note', text: 'Missing values: ack_ms 1.' },
    ]);
    expect(dataKind.record(computed)).toEqual({
      rows: 3,
      columns: [
        { name: 'officer', type: 'text', missing: 0 },
        { name: 'alert', type: 'text', missing: 0 },
        { name: 'ack_ms', type: 'number', missing: 1 },
      ],
    });
  });

  it('by hand: tables show every column and the first rows, a missing value as nothing', async () => {
    const [columns, rows] = dataKind.tables?.(await compute(), settings) ?? [];
    expect(columns?.rows).toEqual([
      ['officer', 'text', '0', '2'],
      ['alert', 'text', '0', '2'],
      ['ack_ms', 'number', '1', '2'],
    ]);
    expect(rows?.title).toBe('first 3 rows');
    expect(rows?.rows).toEqual([
      ['P07', 'tone', '512.5'],
      ['P07', 'voice', ''],
      ['P08', 'tone', '430'],
    ]);
  });

  it('refuses to go on without data, and says when they are gone', async () => {
    expect(dataKind.check({ ...settings, data: null }, contextOf())).toEqual([
      'No data yet: open, paste or drop a file of rows.',
    ]);
    expect(dataKind.check(settings, context)).toEqual([]);
    await expect(run(dataKind, settings)).rejects.toThrow('The data this cell read are not in the worksheet any more.');
  });

  it('by hand: a new cell reads the newest data', () => {
    expect(
      dataKind.defaults(
        contextOf(
          {},
          {
            data: [
              { id: 'd1', name: 'a' },
              { id: 'd2', name: 'b' },
            ],
          },
        ),
      ),
    ).toEqual({
      data: 'd2',
      row: 'trial',
      participant: null,
    });
    expect(dataKind.defaults(contextOf())).toMatchObject({ data: null });
  });
});
