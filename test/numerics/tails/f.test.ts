import { describe, expect, test } from 'vitest';
import { chiSquareUpper } from '../../../src/numerics/tails/chi-square.ts';
import { fLower, fQuantile, fQuantileUpper, fUpper } from '../../../src/numerics/tails/f.ts';
import { tTwoSided } from '../../../src/numerics/tails/t.ts';
import { expectRelative } from './expect-relative.ts';

describe('F tails', () => {
  test('by hand: 2 numerator degrees of freedom in closed form, 1e-13', () => {
    for (const x of [0.01, 1, 30, 1e5]) {
      for (const df2 of [1.5, 12, 400])
        expectRelative(fUpper(x, 2, df2), Math.exp(-0.5 * df2 * Math.log1p((2 * x) / df2)), 1e-12);
    }
  });

  test('theory: F with 1 numerator degree of freedom is a squared t, 1e-13', () => {
    for (const t of [0.1, 2, 50]) expectRelative(fUpper(t * t, 1, 17.5), tTwoSided(t, 17.5), 1e-13);
  });

  // Source: common practice, printed table: 5 % value for 3 and 20 degrees of freedom, 3.0984.
  test('agrees with printed values, 1e-5', () => {
    expectRelative(fQuantileUpper(0.05, 3, 20), 3.0984, 1e-5);
  });

  test('theory: lower + upper = 1; the reciprocal swaps the degrees of freedom, 1e-12', () => {
    for (const [a, b] of [
      [0.5, 9],
      [4, 33.3],
      [1e4, 2e4],
    ] as const) {
      for (const x of [1e-20, 0.9, 1.02, 40]) {
        expect(Math.abs(fLower(x, a, b) + fUpper(x, a, b) - 1)).toBeLessThanOrEqual(2.3e-16);
        expectRelative(fLower(x, a, b), fUpper(1 / x, b, a), 1e-12);
      }
    }
  });

  test('theory: infinite degrees of freedom are the limits, 1e-9', () => {
    expectRelative(fUpper(2, 3, 1e12), fUpper(2, 3, Infinity), 1e-9);
    expectRelative(fUpper(2, 1e12, 3), fUpper(2, Infinity, 3), 1e-9);
    expect(fUpper(2, 3, Infinity)).toBe(chiSquareUpper(6, 3));
    expect([fUpper(0.99, Infinity, Infinity), fUpper(1.01, Infinity, Infinity)]).toEqual([1, 0]);
    expect(fQuantile(0.2, Infinity, Infinity)).toBe(1);
    expectRelative(fQuantile(0.2, 4, 1e12), fQuantile(0.2, 4, Infinity), 1e-9);
    expectRelative(fQuantile(0.2, 1e12, 4), fQuantile(0.2, Infinity, 4), 1e-9);
  });

  test('invariance: quantiles invert both tails, 1e-11', () => {
    for (const p of [1e-30, 0.04, 0.5, 0.96]) {
      expectRelative(fLower(fQuantile(p, 2.5, 30), 2.5, 30), p, 1e-11);
      expectRelative(fUpper(fQuantileUpper(p, 2.5, 30), 2.5, 30), p, 1e-11);
    }
  });

  test('degenerate: ends', () => {
    expect([fLower(0, 2, 3), fUpper(-1, 2, 3), fLower(Infinity, 2, 3), fQuantile(0, 2, 3), fQuantile(1, 2, 3)]).toEqual(
      [0, 1, 1, 0, Infinity],
    );
    expectRelative(fLower(1e308, 5, 0.001) + fUpper(1e308, 5, 0.001), 1, 1e-15);
  });

  test('refuses wrong arguments', () => {
    expect(() => fLower(1, 0, 2)).toThrow('*df1* must be above 0; got 0');
    expect(() => fUpper(1, 2, Number.NaN)).toThrow('*df2* must be above 0; got NaN');
    expect(() => fUpper(Number.NaN, 2, 2)).toThrow(RangeError);
    expect(() => fQuantile(7, 2, 2)).toThrow(RangeError);
  });
});
