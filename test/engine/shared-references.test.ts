import { describe, expect, test } from 'vitest';
import { resolveShared, sharedIdsIn } from '../../src/engine/shared-references.ts';

const settings = {
  trim: { shared: 'trim' },
  rules: [{ cutoff: { shared: 'cutoff' } }, { cutoff: { shared: 'trim' } }],
  n: 3,
};

describe('shared numbers in settings', () => {
  test('by hand: found at any depth, each once', () => {
    expect(sharedIdsIn(settings)).toEqual(['trim', 'cutoff']);
  });

  test('by hand: replaced by their numbers, null included; the settings themselves are not modified', () => {
    const before = JSON.stringify(settings);
    const numbers = new Map<string, number | null>([
      ['trim', 20],
      ['cutoff', null],
    ]);
    expect(resolveShared(settings, numbers)).toEqual({ trim: 20, rules: [{ cutoff: null }, { cutoff: 20 }], n: 3 });
    expect(JSON.stringify(settings)).toBe(before);
  });

  test('degenerate: only an object with the one text field "shared" is a reference', () => {
    const other = { a: { shared: 3 }, b: { shared: 'x', more: 1 }, shared2: 'y', c: ['shared'] };
    expect(sharedIdsIn(other)).toEqual([]);
    expect(resolveShared(other, new Map())).toBe(other);
  });

  test('refuses: a number that is not given', () => {
    expect(() => resolveShared(settings, new Map())).toThrow('got none called "trim"');
  });
});
