import { describe, expect, test } from 'vitest';
import { recordResults } from '../../src/replay/record.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import { testRegistry } from '../support/kinds.ts';
import { cell, shared, worksheet } from '../support/worksheets.ts';

const cells = [
  cell('c1', 'number', { value: { shared: 'a' } }),
  cell('c2', 'add', { by: 2.5 }, 'c1'),
  cell('c3', 'number', { value: -4 }),
  cell('c4', 'add', { by: 1 }, 'c3'),
  { ...cell('c5', 'slow', { ms: 1 }, 'c1'), leftOut: true },
  cell('c6', 'veiled', {}, 'c5'),
  cell('c7', 'of tomorrow', { any: 'thing' }),
  cell('c8', 'slow', { ms: 5 }, 'c2'),
  cell('c9', 'veiled', {}, 'c8'),
];
const record = worksheet(cells, {
  shared: [shared('a', 10)],
  results: { c7: { status: 'value', value: 'kept' }, c99: { status: 'value', value: 'of a cell that was removed' } },
});

describe('recordResults', () => {
  test('by hand: values, refusals, what waits, what is left out; unknown kinds keep theirs, removed cells go', async () => {
    const recorded = await recordResults(record, testRegistry, inlineRunner(), '9.9.9');
    expect(recorded.results).toEqual({
      c1: { status: 'value', value: [10] },
      c2: { status: 'value', value: [12.5] },
      c3: { status: 'failed', value: 'The number -4 is negative: choose one of 0 or more.' },
      c4: { status: 'failed', value: 'Waiting for cell 3 (number).' },
      c5: { status: 'left-out', value: null },
      c6: { status: 'failed', value: 'Waiting for cell 5 (slow).' },
      c7: { status: 'value', value: 'kept' },
      c8: { status: 'value', value: [12.5] },
      c9: { status: 'value', value: [12.5] },
    });
    expect(recorded.program.version).toBe('9.9.9');
  });

  test('by hand: while blind, veiled cells are recorded as veiled and hold nothing', async () => {
    const recorded = await recordResults({ ...record, opening: { state: 'blind' } }, testRegistry, inlineRunner(), '1');
    expect([recorded.results.c6, recorded.results.c9]).toEqual([
      { status: 'veiled', value: null },
      { status: 'veiled', value: null },
    ]);
  });

  test('invariance: everything else of the record stays as it is, and recording again gives the same', async () => {
    const once = await recordResults(record, testRegistry, inlineRunner(), '1');
    const { results: _results, program: _program, ...rest } = once;
    const { results: _before, program: _by, ...restBefore } = record;
    expect(rest).toEqual(restBefore);
    expect(await recordResults(once, testRegistry, inlineRunner(), '1')).toEqual(once);
  });
});
