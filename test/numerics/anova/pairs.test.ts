import { describe, expect, it } from 'vitest';
import { allPairs } from '../../../src/numerics/anova/pairs.ts';

describe('allPairs', () => {
  it('by hand: three conditions', () => {
    expect(allPairs(3).map(({ first, second }) => [first, second])).toEqual([
      [0, 1],
      [0, 2],
      [1, 2],
    ]);
  });

  it('theory: k (k - 1) / 2 pairs, none twice', () => {
    const pairs = allPairs(9).map(({ first, second }) => `${first}-${second}`);
    expect(new Set(pairs).size).toBe(36);
    expect(pairs.length).toBe(36);
  });

  it('degenerate: two conditions are one pair', () => {
    expect(allPairs(2)).toEqual([{ first: 0, second: 1 }]);
  });

  it('refuses fewer than two', () => {
    expect(() => allPairs(1)).toThrow('*k* must be a whole number of at least 2; got 1');
    expect(() => allPairs(2.5)).toThrow(RangeError);
  });
});
