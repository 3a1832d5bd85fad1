import { expect, test } from 'vitest';
import { select } from '../../../src/numerics/regression/select.ts';
import { rng } from '../../../src/numerics/rng.ts';

test('by hand: places of 5, 1, 4, 1, 3', () => {
  const found = [0, 1, 2, 3, 4].map((k) => select(Float64Array.of(5, 1, 4, 1, 3), k));
  expect(found).toEqual([1, 1, 3, 4, 5]);
});

test('agrees with sorting, with and without ties', () => {
  const stream = rng(1);
  for (const levels of [3, 1000]) {
    const values = Float64Array.from({ length: 501 }, () => stream.below(levels));
    const sorted = values.slice().sort();
    for (const k of [0, 1, 125, 250, 251, 499, 500]) expect(select(values, k)).toBe(sorted[k]);
  }
});

test('theory: after a call everything before the place is no larger', () => {
  const values = Float64Array.of(9, 2, 7, 4, 8, 1);
  const third = select(values, 2);
  expect(Math.max(...values.slice(0, 2))).toBeLessThanOrEqual(third);
});

test('invariance: the order given does not matter', () => {
  expect(select(Float64Array.of(3, 2, 1), 1)).toBe(select(Float64Array.of(1, 2, 3), 1));
});

test('degenerate: one number, and all equal', () => {
  expect(select(Float64Array.of(7), 0)).toBe(7);
  expect(select(new Float64Array(50).fill(2), 25)).toBe(2);
});

test('refuses places outside', () => {
  expect(() => select(Float64Array.of(1), 1)).toThrow(/\*k\* must be a whole number from 0 to 0/);
  expect(() => select(Float64Array.of(1), 0.5)).toThrow(/\*k\* must be/);
});
