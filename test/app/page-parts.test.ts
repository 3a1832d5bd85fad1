import { describe, expect, it } from 'vitest';
import type { CellModel } from '../../src/app/cell-model.ts';
import { computedOf, keepModel, waitingWords } from '../../src/app/cell-model.ts';
import { withColours } from '../../src/app/chart-config.ts';
import { placesMoved } from '../../src/app/drag-cell.ts';
import { findingText } from '../../src/app/finding-text.ts';
import { newWorksheet } from '../../src/app/new-worksheet.ts';
import type { CellState } from '../../src/engine/cell-state.ts';
import { plainWorksheet, plainRegistry as registry, trim } from '../support/plain-registry.ts';

function model(change: Partial<CellModel> = {}): CellModel {
  const cell = plainWorksheet('c1 data').cells[0]!;
  const settings = cell.settings;
  return {
    cell,
    kind: registry.data,
    state: fresh,
    context: { shared: [trim], given: {}, data: [], own: undefined },
    resolved: settings,
    recomputed: 0,
    theme: 'light',
    width: 680,
    reference: null,
    sweep: null,
    opening: 'blind',
    openBlank: null,
    openPanel: null,
    waitingFor: '',
    ...change,
  };
}

const fresh: CellState = { status: 'fresh', computed: { value: 1, detail: null }, count: 1 };

describe('what a cell is drawn from', () => {
  it('invariance: the same object while nothing it shows has changed', () => {
    const before = model();
    const again = model({ context: { shared: [{ ...trim }], given: {}, data: [] }, resolved: { ...before.resolved } });
    expect(keepModel(before, { ...again, cell: before.cell })).toBe(before);
  });

  it('by hand: another object for another state, width, or a shared number that it uses', () => {
    const before = model();
    expect(keepModel(before, { ...before, width: 400 }).width).toBe(400);
    expect(keepModel(before, { ...before, state: { status: 'veiled' } })).not.toBe(before);
    const cell = { ...before.cell, settings: { cutoff: { shared: 'trim' } } };
    const user = { ...before, cell };
    const changed = { ...user, context: { ...user.context, shared: [{ ...trim, value: 5 }] } };
    expect(keepModel(user, changed).context.shared[0]?.value).toBe(5);
  });

  it('by hand: what a cell came to last is kept while it fails or waits', () => {
    const last = { value: 2, detail: null };
    expect(computedOf({ status: 'failed', sentence: 'No.', last })).toBe(last);
    expect(computedOf({ status: 'veiled' })).toBeUndefined();
  });

  it('by hand: the words for what it waits for', () => {
    const state: CellState = { status: 'waiting', for: [{ cellId: 'c1', why: 'unset' }] };
    expect(waitingWords(state, () => 'the data')).toBe('the data, which has open blanks');
    expect(waitingWords(fresh, () => '')).toBe('');
  });
});

describe('small parts of the page', () => {
  it('by hand: an estimate with its interval, to two figures of its width', () => {
    expect(findingText({ estimate: -84.2, interval: [-131.4, -37.6], unit: 'ms' })).toBe(
      '\u221284 ms [\u2212131, \u221238]',
    );
    expect(findingText({ estimate: 0.5, interval: [0.1, null], unit: '' })).toContain('no limit');
    expect(findingText({ estimate: null })).toBeNull();
    expect(findingText('text')).toBeNull();
  });

  it('by hand: how far a cell moves when it is let go', () => {
    const middles = [50, 150, 250];
    expect(placesMoved(0, 40, middles)).toBe(0);
    expect(placesMoved(0, 160, middles)).toBe(1);
    expect(placesMoved(0, 900, middles)).toBe(2);
    expect(placesMoved(2, 10, middles)).toBe(-2);
  });

  it('by hand: colours by name become the page\u2019s, everything else stays', () => {
    const colours = { hold: '#0f6b62' } as never;
    expect(withColours({ a: ['var(--hold)', 'var(--nothing)'], b: 1, c: null }, colours)).toEqual({
      a: ['#0f6b62', 'var(--nothing)'],
      b: 1,
      c: null,
    });
  });

  it('by hand: a new worksheet begins hidden, titled after its file', () => {
    const block = {
      id: 'd1',
      name: 'peg_test-2.csv',
      rows: 2,
      columns: [],
      fingerprint: { bytes: '', table: '' },
      warnings: [],
    };
    const made = newWorksheet({ id: 'w', seed: 3, program: '0.1.0', registry, block });
    expect(made.title).toBe('Peg test 2');
    expect(made.opening).toEqual({ state: 'blind' });
    expect(made.cells.map((cell) => cell.kind)).toEqual(['data']);
    expect(newWorksheet({ id: 'w', seed: 3, program: '0.1.0', registry, block: null }).data).toEqual([]);
  });
});
