import { expect, test } from 'vitest';
import { tieCounts } from '../../../src/numerics/correlation/tie-counts.ts';
import { ranks } from '../../../src/numerics/order.ts';

const x = Float64Array.of(4, 1, 4, 2, 1, 4);

test('by hand: ties of two and three', () => {
  expect(tieCounts(x)).toEqual({ pairs: 8, triples: 6, spread: 2 * 9 + 6 * 11 });
});

test('agrees with the tie sum of the ranks: t^3 - t = t(t-1)(t-2) + 3 t(t-1)', () => {
  const { pairs, triples } = tieCounts(x);
  expect(triples + 3 * pairs).toBe(ranks(x).tieSum);
});

test('theory: all scores tied are one group of n', () => {
  expect(tieCounts(new Float64Array(5).fill(3))).toEqual({ pairs: 20, triples: 60, spread: 20 * 15 });
});

test('invariance: the order does not matter', () => {
  expect(tieCounts(x.slice().reverse())).toEqual(tieCounts(x));
});

test('degenerate: no scores and no ties count 0', () => {
  const none = { pairs: 0, triples: 0, spread: 0 };
  expect(tieCounts(new Float64Array(0))).toEqual(none);
  expect(tieCounts(Float64Array.of(1, 2, 3))).toEqual(none);
});

test('refuses NaN', () => {
  expect(() => tieCounts(Float64Array.of(1, Number.NaN))).toThrow(/\*x\* must hold finite/);
});
