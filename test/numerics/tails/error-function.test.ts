import { describe, expect, test } from 'vitest';
import { erf, erfc, erfcScaled, expOfMinusSquare } from '../../../src/numerics/tails/error-function.ts';
import { expectRelative } from './expect-relative.ts';

describe('error function', () => {
  // Source: common practice, printed tables of erf extended to 16 digits.
  test('agrees with printed values, 1e-15', () => {
    expectRelative(erf(1), 0.8427007929497149, 1e-15);
    expectRelative(erfc(2), 0.004677734981047266, 1e-15);
    expectRelative(erf(0.1), 0.1124629160182849, 1e-15);
  });

  test('theory: erf + erfc = 1 and erf is odd, 2e-16', () => {
    for (const x of [0, 0.2, 0.46, 0.47, 1, 3.9, 4.1, 6.5]) {
      expect(Math.abs(erf(x) + erfc(x) - 1)).toBeLessThanOrEqual(2.3e-16);
      expect(erf(-x)).toBe(-erf(x));
      expect(Math.abs(erfc(x) + erfc(-x) - 2)).toBeLessThanOrEqual(4.5e-16);
    }
  });

  // Source: first two terms of the asymptotic series, exp(x^2) erfc(x) = (1 - 1 / (2 x^2) + ...) / (x sqrt(pi)).
  test('theory: the scaled function follows its asymptotic series, 1e-11', () => {
    const x = 1000;
    expectRelative(erfcScaled(x), (1 - 0.5 / (x * x)) / (x * Math.sqrt(Math.PI)), 1e-11);
    expectRelative(erfcScaled(1e10), 1 / (1e10 * Math.sqrt(Math.PI)), 1e-15);
  });

  test('degenerate: ends', () => {
    expect([erf(0), erfc(0), erf(Infinity), erf(-Infinity), erfc(Infinity), erfc(-Infinity)]).toEqual([
      0, 1, 1, -1, 0, 2,
    ]);
  });

  test('by hand: exp(-x^2) at x = 2 and x = 0, 1e-15', () => {
    expectRelative(expOfMinusSquare(2.01, 1), Math.exp(-4.0401), 1e-15);
    expect(expOfMinusSquare(0, 1)).toBe(1);
  });

  test('refuses NaN', () => {
    expect(() => erf(Number.NaN)).toThrow('*x* must be a number; got NaN');
    expect(() => erfc(Number.NaN)).toThrow(RangeError);
  });
});
