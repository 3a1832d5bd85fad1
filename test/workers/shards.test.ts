import { describe, expect, test } from 'vitest';
import { shardsOf } from '../../src/workers/shards.ts';

describe('shardsOf', () => {
  test('by hand: seven items in shards of three', () => {
    expect(shardsOf(7, 3)).toEqual([
      { index: 0, from: 0, to: 3 },
      { index: 1, from: 3, to: 6 },
      { index: 2, from: 6, to: 7 },
    ]);
  });

  test('degenerate: no items, one item, a size beyond the total', () => {
    expect(shardsOf(0, 5)).toEqual([]);
    expect(shardsOf(1, 1)).toEqual([{ index: 0, from: 0, to: 1 }]);
    expect(shardsOf(4, 100)).toEqual([{ index: 0, from: 0, to: 4 }]);
  });

  test.each([
    [-1, 1],
    [1.5, 1],
    [1, 0],
    [1, 0.5],
    [1, Number.NaN],
  ])('refuses: %d items in shards of %d', (total, size) => {
    expect(() => shardsOf(total, size)).toThrow(RangeError);
  });
});
