import { describe, expect, test } from 'vitest';
import {
  gammaFraction,
  gammaLogPrefactor,
  gammaLower,
  gammaQuantile,
  gammaQuantileUpper,
  gammaSeries,
  gammaUpper,
} from '../../../src/numerics/tails/gamma.ts';
import { normalUpper } from '../../../src/numerics/tails/normal.ts';
import { erf, lgamma } from '../../../src/numerics/tails/special.ts';
import { expectRelative } from './expect-relative.ts';

describe('gamma tails', () => {
  test('by hand: shapes 1, 2 and 1/2 in closed form, 1e-13', () => {
    for (const x of [1e-9, 0.3, 1.4, 2, 30, 600]) {
      expectRelative(gammaUpper(x, 1), Math.exp(-x), 1e-13);
      expectRelative(gammaUpper(x, 2), (1 + x) * Math.exp(-x), 1e-13);
      expectRelative(gammaLower(x, 0.5), erf(Math.sqrt(x)), 1e-14);
    }
  });

  test('theory: lower + upper = 1 on both sides of every switch', () => {
    for (const shape of [1e-6, 0.3, 0.99, 4, 700, 1e6, 1e8, 1e12]) {
      for (const z of [-3, -0.2, 0, 1, 5]) {
        const x = Math.max(1e-3, shape + z * Math.sqrt(shape));
        expect(Math.abs(gammaLower(x, shape) + gammaUpper(x, shape) - 1)).toBeLessThanOrEqual(1e-15);
      }
    }
  });

  // Source: the exponential integral of 1, 0.21938393439552029 (common practice).
  test('theory: a tiny shape leaves shape * E1(x) above x, 1e-9', () => {
    expectRelative(gammaUpper(1, 1e-12), 1e-12 * 0.21938393439552029, 1e-9);
  });

  test('theory: the expansion for very large shapes continues the fraction, 1e-9', () => {
    for (const z of [-20, -2, 0.5, 3, 25]) {
      const at = (shape: number) => gammaUpper(shape + z * Math.sqrt(shape), shape);
      expectRelative(at(1e8), at(99_999_999), 1e-6);
    }
    expectRelative(gammaUpper(1e16 + 3e8, 1e16), normalUpper(3), 1e-7);
  });

  test('theory: the parts multiply to the tails, 1e-14', () => {
    expectRelative(Math.exp(gammaLogPrefactor(2, 3)) * gammaSeries(2, 3), gammaLower(2, 3), 1e-14);
    expectRelative(Math.exp(gammaLogPrefactor(9, 3)) * gammaFraction(9, 3), gammaUpper(9, 3), 1e-14);
    expectRelative(gammaLogPrefactor(2, 3), 3 * Math.LN2 - 2 - lgamma(4), 1e-14);
  });

  test('invariance: quantiles invert both tails, 1e-11', () => {
    for (const shape of [0.1, 0.7, 3, 500, 2e5]) {
      for (const p of [1e-12, 0.03, 0.5, 0.9]) {
        expectRelative(gammaLower(gammaQuantile(p, shape), shape), p, 1e-11);
        expectRelative(gammaUpper(gammaQuantileUpper(p, shape), shape), p, 1e-11);
      }
    }
  });

  test('degenerate: ends and the limit of an infinite shape', () => {
    expect([gammaLower(0, 2), gammaUpper(-1, 2), gammaUpper(Infinity, 2)]).toEqual([0, 1, 0]);
    expect([gammaLower(5, Infinity), gammaUpper(5, Infinity)]).toEqual([0, 1]);
    expect([gammaQuantile(0, 2), gammaQuantile(1, 2), gammaQuantileUpper(0, 2)]).toEqual([0, Infinity, Infinity]);
    expect(gammaQuantile(0.3, Infinity)).toBe(Infinity);
  });

  test('refuses wrong arguments', () => {
    expect(() => gammaLower(Number.NaN, 1)).toThrow('*x* must be a number; got NaN');
    expect(() => gammaUpper(1, -1)).toThrow('*shape* must be above 0; got -1');
    expect(() => gammaQuantile(2, 1)).toThrow(RangeError);
  });
});
