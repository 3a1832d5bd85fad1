import { expect, test } from 'vitest';
import { polynomial } from '../../../src/numerics/tails/polynomial.ts';

test('by hand: 1 + 2x + 3x^2 at 2 is 17, exactly', () => {
  expect(polynomial([1, 2, 3], 2)).toBe(17);
});

test('degenerate: no coefficient gives 0', () => {
  expect(polynomial([], 2)).toBe(0);
});
