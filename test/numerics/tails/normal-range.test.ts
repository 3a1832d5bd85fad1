import { describe, expect, test } from 'vitest';
import { normalUpper } from '../../../src/numerics/tails/normal.ts';
import { normalRangeLower, normalRangeUpper } from '../../../src/numerics/tails/normal-range.ts';
import { erf } from '../../../src/numerics/tails/special.ts';
import { expectRelative } from './expect-relative.ts';

describe('range of normal values', () => {
  test('by hand: two values differ by a normal value of variance 2, 1e-13', () => {
    for (const w of [1e-8, 0.3, 0.41, 2, 9, 40]) {
      expectRelative(normalRangeUpper(w, 2), 2 * normalUpper(w / Math.SQRT2), 1e-13);
      expectRelative(normalRangeLower(w, 2), erf(w / 2), 1e-13);
    }
  });

  test('theory: lower + upper = 1, 1e-14', () => {
    for (const k of [3, 20, 200])
      for (const w of [0.1, 1, 3, 7])
        expect(Math.abs(normalRangeLower(w, k) + normalRangeUpper(w, k) - 1)).toBeLessThanOrEqual(1e-14);
  });

  // Source: k small values within w of each other: w^(k - 1) k times the integral of density^k, sqrt(k) / (2 pi)^((k - 1) / 2).
  test('theory: a short range follows its leading term, 1e-7', () => {
    expectRelative(normalRangeLower(1e-4, 5), 1e-16 * (Math.sqrt(5) / (4 * Math.PI * Math.PI)), 1e-7);
  });

  test('degenerate: ends', () => {
    expect([
      normalRangeLower(0, 3),
      normalRangeUpper(-1, 3),
      normalRangeLower(1e20, 3),
      normalRangeUpper(1e20, 3),
    ]).toEqual([0, 1, 1, 0]);
  });
});
