import { describe, expect, test } from 'vitest';
import { compareRecords } from '../../src/replay/compare-records.ts';
import type { Json } from '../../src/worksheet/format.ts';

const differencesOf = (a: Json, b: Json) => compareRecords(a, b).differences;
const pathsOf = (a: Json, b: Json) => differencesOf(a, b).map(({ path }) => path);

const record = {
  label: 'trimmed mean',
  n: 34,
  kept: [true, false],
  estimate: -85.25,
  se: 21.125,
  interval: [-128.5, -42.125],
  p: 0.00012,
  reason: null,
};

describe('compareRecords', () => {
  test('by hand: the same record has no difference, whatever the order of its fields', () => {
    const turned = Object.fromEntries(Object.entries(record).reverse()) as Json;
    expect(compareRecords(record, turned)).toEqual({ differences: [], compared: 10 });
  });

  test.each<[string, Json, string[]]>([
    ['a whole number', { ...record, n: 35 }, ['n']],
    ['a text', { ...record, label: 'mean' }, ['label']],
    ['a mark', { ...record, kept: [true, true] }, ['kept[1]']],
    ['a longer list', { ...record, kept: [true, false, true] }, ['kept[2]']],
    ['a shorter list', { ...record, interval: [-128.5] }, ['interval[1]']],
    ['null for a number', { ...record, estimate: null }, ['estimate']],
    ['a number for null', { ...record, reason: 0 }, ['reason']],
    ['a list for a number', { ...record, n: [34] }, ['n']],
    ['a field more', { ...record, df: 1 }, ['df']],
    ['text for a number', { ...record, n: '34' }, ['n']],
    ['several', { ...record, n: 1, se: 2.5 }, ['n', 'se']],
  ])('refuses: %s, naming the place', (_title, other, paths) => {
    expect(pathsOf(record, other).sort()).toEqual([...paths].sort());
    expect(pathsOf(other, record).sort()).toEqual([...paths].sort());
  });

  test('by hand: a difference holds both values; a part that is not there is undefined', () => {
    expect(differencesOf({ a: 1 }, { b: 2 })).toEqual([
      { path: 'a', recorded: 1, recomputed: undefined },
      { path: 'b', recorded: undefined, recomputed: 2 },
    ]);
  });

  // The bound is 1e-9 of the larger number and 1e-12 of the scale, which is 128.5 here: 8.5e-8 + 1.3e-10 for the estimate.
  test.each([
    [-85.25 * (1 + 0.9e-9), true],
    [-85.25 * (1 + 1.1e-9), false],
    [85.25, false],
  ])('by hand: an estimate of -85.25 against %d', (estimate, same) => {
    expect(pathsOf(record, { ...record, estimate }).length === 0).toBe(same);
  });

  test('by hand: what cancelled to nearly nothing is judged in the scale of its neighbours, also in a list', () => {
    const near = { ...record, estimate: 1.2e-14 };
    expect(pathsOf(near, { ...record, estimate: -3.1e-14 })).toEqual([]);
    expect(pathsOf(near, { ...record, estimate: 2e-10 })).toEqual(['estimate']);
    expect(pathsOf([1e-15, 250.5], [-1e-15, 250.5])).toEqual([]);
    expect(pathsOf({ estimate: 1.2e-14 }, { estimate: -3.1e-14 })).toEqual(['estimate']);
    expect(pathsOf({ inner: { estimate: 1e-15 }, se: 250.5 }, { inner: { estimate: -1e-15 }, se: 250.5 })).toEqual([
      'inner.estimate',
    ]);
  });

  test('by hand: a whole number that came out a last digit off is near; two whole numbers are not', () => {
    expect(pathsOf(85, 85.00000000000001)).toEqual([]);
    expect(pathsOf(1e15, 1e15 + 1)).toEqual(['']);
  });

  test('by hand: a small p is judged on its logarithm', () => {
    const p = (value: number) => ({ estimate: 85.25, p: value });
    // ln(1e-20) = -46.05: the bound is 4.6e-8 of p.
    expect(pathsOf(p(1e-20), p(1e-20 * (1 + 4e-8)))).toEqual([]);
    expect(pathsOf(p(1e-20), p(1e-20 * (1 + 6e-8)))).toEqual(['p']);
    expect(pathsOf(p(1e-20), p(1e-15))).toEqual(['p']);
    expect(pathsOf({ estimate: 85.25, q: 1e-20 }, { estimate: 85.25, q: 1e-15 })).toEqual([]);
    expect(pathsOf(p(1e-300), p(0))).toEqual(['p']);
    expect(pathsOf(p(0.5), p(0.5 * (1 + 0.9e-9)))).toEqual([]);
    expect(pathsOf(p(0.5), p(0.5 * (1 + 1.2e-9)))).toEqual(['p']);
  });

  test('refuses: NaN, even against NaN', () => {
    expect(pathsOf({ a: Number.NaN }, { a: Number.NaN })).toEqual(['a']);
  });
});
