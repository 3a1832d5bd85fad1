import { describe, expect, test } from 'vitest';
import { sameValue } from '../../src/engine/same-value.ts';

describe('sameValue', () => {
  const equal: readonly [string, unknown, unknown][] = [
    ['numbers', 1.5, 1.5],
    ['missing values', Number.NaN, Number.NaN],
    ['zeros of either sign', 0, -0],
    ['fields in any order', { a: 1, b: [2, { c: null }] }, { b: [2, { c: null }], a: 1 }],
    ['typed arrays with missing values', Float64Array.of(1, Number.NaN), Float64Array.of(1, Number.NaN)],
    ['typed arrays that are parts of others', Int32Array.of(9, 1, 2).subarray(1), Int32Array.of(1, 2)],
    ['maps', new Map([['a', [1]]]), new Map([['a', [1]]])],
    ['sets', new Set([1, 2]), new Set([1, 2])],
    [
      'objects without a prototype',
      Object.assign(Object.create(null), { a: 1 }),
      Object.assign(Object.create(null), { a: 1 }),
    ],
  ];
  test.each(equal)('by hand: equal %s', (_title, a, b) => {
    expect(sameValue(a, b)).toBe(true);
    expect(sameValue(b, a)).toBe(true);
  });

  const different: readonly [string, unknown, unknown][] = [
    ['numbers', 1, 2],
    ['a number and its text', 1, '1'],
    ['null and undefined', null, undefined],
    ['null and an object', null, {}],
    ['an array and an object', [], {}],
    ['lengths', [1], [1, 2]],
    ['a field that is missing and one that is undefined', { a: undefined }, { b: undefined }],
    ['more fields', { a: 1 }, { a: 1, b: 2 }],
    ['deep parts', { a: [{ b: 1 }] }, { a: [{ b: 2 }] }],
    ['typed arrays of other kinds', Int32Array.of(1), Float64Array.of(1)],
    ['typed arrays in one number', Float64Array.of(1, 2), Float64Array.of(1, 2 + Number.EPSILON * 2)],
    ['maps', new Map([['a', 1]]), new Map([['a', 2]])],
    ['functions', () => 1, () => 1],
  ];
  test.each(different)('by hand: different %s', (_title, a, b) => {
    expect(sameValue(a, b)).toBe(false);
    expect(sameValue(b, a)).toBe(false);
  });

  test('by hand: the same object is not walked', () => {
    const trap = {
      get part(): number {
        throw new Error('walked');
      },
    };
    expect(sameValue({ trap }, { trap })).toBe(true);
  });
});
