import { expect, test } from 'vitest';
import { upperHalfNormal } from '../../../src/numerics/tails/inverse-normal.ts';
import { normalUpper } from '../../../src/numerics/tails/normal.ts';
import { expectRelative } from './expect-relative.ts';

// Source: common practice, the two-sided 5 % and 1 % values.
test('agrees with printed values, 1e-15', () => {
  expectRelative(upperHalfNormal(0.025), 1.959963984540054, 1e-15);
  expectRelative(upperHalfNormal(0.005), 2.5758293035489004, 1e-15);
});

test('theory: the tail of the result is p in all three ranges, 1e-12', () => {
  for (const p of [0.49, 0.2, 0.08, 0.07, 1e-5, 1e-10, 1e-12, 1e-100, 1e-300]) {
    expectRelative(normalUpper(upperHalfNormal(p)), p, 1e-12);
  }
});

test('degenerate: 0 gives Infinity and one half gives 0', () => {
  expect(upperHalfNormal(0)).toBe(Infinity);
  expect(upperHalfNormal(0.5)).toBe(0);
});
