import { describe, expect, test } from 'vitest';
import {
  chiSquareLower,
  chiSquareQuantile,
  chiSquareQuantileUpper,
  chiSquareUpper,
} from '../../../src/numerics/tails/chi-square.ts';
import { normalUpper } from '../../../src/numerics/tails/normal.ts';
import { expectRelative } from './expect-relative.ts';

describe('chi-square tails', () => {
  test('by hand: 2 degrees of freedom are exponential, 1 is a squared normal value, 1e-13', () => {
    for (const x of [0.01, 1, 7, 900]) {
      expectRelative(chiSquareUpper(x, 2), Math.exp(-x / 2), 1e-13);
      expectRelative(chiSquareUpper(x, 1), 2 * normalUpper(Math.sqrt(x)), 1e-12);
    }
  });

  // Source: common practice, printed table: 5 % values for 1 and 10 degrees of freedom.
  test('agrees with printed values, 1e-9', () => {
    expectRelative(chiSquareQuantileUpper(0.05, 1), 3.841458821, 1e-9);
    expectRelative(chiSquareQuantile(0.95, 10), 18.30703805, 1e-9);
  });

  test('theory: lower + upper = 1', () => {
    for (const df of [0.3, 5, 1e5])
      expect(Math.abs(chiSquareLower(df, df) + chiSquareUpper(df, df) - 1)).toBeLessThanOrEqual(2.3e-16);
  });

  test('degenerate: 0 and infinite degrees of freedom', () => {
    expect([chiSquareLower(0, 3), chiSquareLower(5, Infinity), chiSquareUpper(5, Infinity)]).toEqual([0, 0, 1]);
  });

  test('refuses wrong arguments by their own name', () => {
    expect(() => chiSquareLower(1, 0)).toThrow('*df* must be above 0; got 0');
    expect(() => chiSquareUpper(Number.NaN, 1)).toThrow(RangeError);
    expect(() => chiSquareQuantile(0.5, Number.NaN)).toThrow('*df*');
    expect(() => chiSquareQuantileUpper(-1, 2)).toThrow(RangeError);
  });
});
