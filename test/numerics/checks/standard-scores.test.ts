import { expect, test } from 'vitest';
import { standardScores } from '../../../src/numerics/checks/standard-scores.ts';

test('by hand: 3, 1, 2 become -1, 0, 1', () => {
  expect([...(standardScores(Float64Array.of(3, 1, 2)) ?? [])]).toEqual([-1, 0, 1]);
});

test('agrees with R 4.2 scale(c(41, 36, 12, 18, 28)): largest (41 - 27) / 12.08304597359457', () => {
  expect(standardScores(Float64Array.of(41, 36, 12, 18, 28))?.[4]).toBeCloseTo(14 / 12.08304597359457, 14);
});

test('theory: they add up to 0 and their squares to n - 1', () => {
  const z = standardScores(Float64Array.of(4, 8, 15, 16, 23, 42)) as Float64Array;
  expect(z.reduce((a, b) => a + b, 0)).toBeCloseTo(0, 14);
  expect(z.reduce((a, b) => a + b * b, 0)).toBeCloseTo(5, 14);
});

test('invariance: unit and order do not matter', () => {
  const a = standardScores(Float64Array.of(4, 8, 15)) as Float64Array;
  const b = standardScores(Float64Array.of(1500, 400, 800)) as Float64Array;
  for (const [i, value] of a.entries()) expect(b[i]).toBeCloseTo(value, 14);
});

test('degenerate: equal scores', () => {
  expect(standardScores(Float64Array.of(2, 2))).toBe(null);
});

test('refuses one score', () => {
  expect(() => standardScores(Float64Array.of(2))).toThrow(/must hold at least 2 scores/);
});
