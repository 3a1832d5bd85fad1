import { describe, expect, test } from 'vitest';
import { WorksheetDocument } from '../../src/app/document.ts';
import { remove, setSettings } from '../../src/app/edits.ts';
import { conditionNames, opensConditions } from '../../src/app/hidden-conditions.ts';
import type { JsonObject, Worksheet } from '../../src/worksheet/format.ts';
import { plainRegistry } from '../support/plain-registry.ts';
import { cell, worksheet } from '../support/worksheets.ts';

const design = (within: readonly string[], between: readonly string[] = []): JsonObject => ({ within, between });
const filter = (of: string): JsonObject => ({ make: 'filter', of, name: '', formula: '' });

const blind = worksheet(
  [
    cell('c1', 'data'),
    cell('c2', 'reshape', { to: 'long', columns: ['load_tone', 'load_voice'] }, 'c1'),
    cell('c3', 'derive', { make: 'recode', of: 'alert', name: 'kind', formula: '' }, 'c2'),
    cell('c4', 'derive', filter('age'), 'c3'),
    cell('c5', 'design', design(['alert'], ['training']), 'c4'),
    cell('c6', 'exclusion', {}, 'c5'),
  ],
  { opening: { state: 'blind' } },
);
const withSettings = (id: string, settings: JsonObject): Worksheet => setSettings(blind, id, settings);

describe('what a design hides', () => {
  test('by hand: its conditions, the columns of a wide file, and what is made from them', () => {
    expect([...conditionNames(blind)].sort()).toEqual(['alert', 'kind', 'load_tone', 'load_voice', 'training']);
  });
});

describe('changes that open the conditions', () => {
  test('by hand: removing the design, leaving it out, taking a condition out of it', () => {
    const without = { ...blind, cells: blind.cells.filter(({ id }) => id !== 'c5') };
    expect(opensConditions(blind, without)).toContain('alert and training would be hidden no longer');
    const left = { ...blind, cells: blind.cells.map((each) => (each.id === 'c5' ? { ...each, leftOut: true } : each)) };
    expect(opensConditions(blind, left as Worksheet)).toContain('alert and training');
    expect(opensConditions(blind, withSettings('c5', design(['alert'])))).toContain('training would be hidden');
  });

  test('by hand: keeping rows by a condition, by a column made from one, by a column of the wide file', () => {
    for (const of of ['alert', 'kind', 'load_voice']) {
      expect(opensConditions(blind, withSettings('c4', filter(of)))).toContain(`Keeping rows by ${of} looks at`);
    }
  });

  test('by hand: other changes do not: another role, one more condition, a rule, an age', () => {
    expect(opensConditions(blind, withSettings('c5', design([], ['training', 'alert'])))).toBe(null);
    expect(opensConditions(blind, withSettings('c5', design(['alert', 'hand'], ['training'])))).toBe(null);
    expect(opensConditions(blind, withSettings('c6', { what: 'named' }))).toBe(null);
    expect(opensConditions(blind, withSettings('c4', { ...filter('age'), value: '18' }))).toBe(null);
  });

  test('by hand: a design that no cell reads yet can still be corrected', () => {
    const fresh = { ...blind, cells: blind.cells.filter(({ id }) => id !== 'c6') };
    expect(opensConditions(fresh, setSettings(fresh, 'c5', design(['hand'])))).toBe(null);
  });

  test('degenerate: with the conditions open nothing is asked', () => {
    const open: Worksheet = { ...blind, opening: { state: 'opened-early', reason: 'a check', when: '2026-01-01' } };
    expect(opensConditions(open, setSettings(open, 'c5', design([])))).toBe(null);
  });
});

describe('a document asks before such a change', () => {
  function documentOf(): { open: WorksheetDocument; asked: () => number } {
    let asked = 0;
    const open = new WorksheetDocument({
      worksheet: blind,
      now: () => '2026-01-02T00:00:00Z',
      clock: () => 0,
      who: () => '',
      append: (log, decision) => [...log, { ...decision, before: '', hash: '' }],
      opens: opensConditions,
      ask: () => asked++,
    });
    return { open, asked: () => asked };
  }
  const takeOut = (record: Worksheet): Worksheet => remove(record, plainRegistry, 'c5');

  test('by hand: the change waits, and is given up without an answer', () => {
    const { open, asked } = documentOf();
    expect(open.edit('design removed', takeOut)).toBe(false);
    expect([open.record, asked()]).toEqual([blind, 1]);
    expect(open.asked).toContain('would be hidden no longer');
    open.answer(null);
    expect([open.record, open.asked]).toEqual([blind, null]);
  });

  test('by hand: with a reason it is made, logged, and undo does not cross it', () => {
    const { open } = documentOf();
    open.edit('a rule changed', (record) => setSettings(record, 'c6', { what: 'named' }));
    open.edit('design removed', takeOut);
    open.answer('published data');
    expect(open.record.cells.some(({ id }) => id === 'c5')).toBe(false);
    expect(open.record.opening).toEqual({
      state: 'opened-early',
      reason: 'published data',
      when: '2026-01-02T00:00:00Z',
    });
    const last = open.record.log.at(-1);
    expect([last?.what, last?.reason, last?.opening]).toEqual([
      'design removed, which opened the conditions without a sealed plan',
      'published data',
      'opened-early',
    ]);
    expect([open.undo(), open.undoLabel]).toEqual([null, null]);
  });

  test('by hand: taking back a condition that was added asks too', () => {
    const { open } = documentOf();
    open.edit('condition added', (record) => setSettings(record, 'c5', design(['alert', 'hand'], ['training'])));
    expect(open.undo()).toBe(null);
    expect(open.asked).toContain('hand would be hidden no longer');
    expect(open.record.opening.state).toBe('blind');
    open.answer('it is no condition');
    expect(open.record.cells.find(({ id }) => id === 'c5')?.settings).toEqual(design(['alert'], ['training']));
    expect(open.record.log.map(({ what }) => what).at(-1)).toContain('taken back: condition added, which opened');
  });
});
