import { describe, expect, test } from 'vitest';
import { recordResults } from '../../src/replay/record.ts';
import { computedParts } from '../../src/replay/saved-parts.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import { testRegistry } from '../support/kinds.ts';
import { cell, worksheet } from '../support/worksheets.ts';

const cells = [
  cell('c1', 'number', { value: 3 }),
  cell('c2', 'number', { value: -4 }),
  cell('c3', 'add', { by: 1 }, 'c2'),
  { ...cell('c4', 'number', { value: 1 }), leftOut: true },
  cell('c5', 'of tomorrow'),
  cell('c6', 'veiled', {}, 'c1'),
];

describe('savedParts', () => {
  test('by hand: each cell in words, whatever became of it', async () => {
    const blind = worksheet(cells, { opening: { state: 'blind' } });
    const parts = await computedParts(blind, testRegistry, inlineRunner(), '9');
    const [value, failed, waiting, out, unknown, veiled] = parts.cells.map(({ result }) => result);
    expect(value).toBe(testRegistry.number?.say({ value: [3], detail: null }, { value: 3 }));
    expect([failed, waiting, out, unknown, veiled]).toEqual([
      'The number -4 is negative: choose one of 0 or more.',
      'Waiting for cell 2 (number).',
      'Left out for now.',
      'A kind of cell this program does not know.',
      'Not worked out while the conditions are hidden.',
    ]);
  });

  test('invariance: the worksheet is what recording gives', async () => {
    const record = worksheet(cells);
    const parts = await computedParts(record, testRegistry, inlineRunner(), '9');
    expect(parts.worksheet).toEqual(await recordResults(record, testRegistry, inlineRunner(), '9'));
  });
});
