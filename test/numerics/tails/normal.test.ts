import { describe, expect, test } from 'vitest';
import {
  normalDensity,
  normalLogLower,
  normalLower,
  normalQuantile,
  normalQuantileUpper,
  normalUpper,
} from '../../../src/numerics/tails/normal.ts';
import { expectRelative } from './expect-relative.ts';

describe('normal tails', () => {
  // Source: common practice, printed tables.
  test('agrees with printed values, 1e-14', () => {
    expectRelative(normalLower(1), 0.8413447460685429, 1e-15);
    expectRelative(normalUpper(1.959963984540054), 0.025, 1e-14);
    expectRelative(normalQuantile(0.975), 1.959963984540054, 1e-15);
  });

  test('theory: lower + upper = 1 and the tails mirror each other', () => {
    for (const z of [-40, -3, -0.2, 0, 0.7, 5.99, 6.01, 38]) {
      expect(Math.abs(normalLower(z) + normalUpper(z) - 1)).toBeLessThanOrEqual(2.3e-16);
      expect(normalLower(z)).toBe(normalUpper(-z));
    }
  });

  test('agrees with: the log of the lower tail where both are numbers, 1e-13', () => {
    for (const z of [-37, -10, -1, 0, 2, 8])
      expect(Math.abs(normalLogLower(z) - Math.log(normalLower(z)))).toBeLessThanOrEqual(
        1e-13 * Math.max(1, Math.abs(normalLogLower(z))),
      );
  });

  // Source: -z^2 / 2 - log(z sqrt(2 pi)) - 1 / z^2.
  test('theory: the log goes on far beyond the smallest double, 1e-12', () => {
    expectRelative(normalLogLower(-1000), -500000 - Math.log(1000 * Math.sqrt(2 * Math.PI)) - 1e-6, 1e-12);
  });

  test('invariance: quantiles invert both tails, 1e-12', () => {
    for (const p of [1e-300, 1e-20, 0.025, 0.5, 0.9]) {
      expectRelative(normalLower(normalQuantile(p)), p, 1e-12);
      expectRelative(normalUpper(normalQuantileUpper(p)), p, 1e-12);
    }
  });

  test('by hand: density at 0 and 2, 1e-15', () => {
    expectRelative(normalDensity(0), 1 / Math.sqrt(2 * Math.PI), 1e-15);
    expectRelative(normalDensity(-2), Math.exp(-2) / Math.sqrt(2 * Math.PI), 1e-15);
    expect(normalDensity(Infinity)).toBe(0);
  });

  test('degenerate: infinite values and certain probabilities', () => {
    expect([normalLower(-Infinity), normalLower(Infinity), normalUpper(Infinity)]).toEqual([0, 1, 0]);
    expect([normalQuantile(0), normalQuantile(0.5), normalQuantile(1)]).toEqual([-Infinity, 0, Infinity]);
  });

  test('refuses NaN and impossible probabilities', () => {
    expect(() => normalUpper(Number.NaN)).toThrow('*z* must be a number; got NaN');
    expect(() => normalLogLower(Number.NaN)).toThrow(RangeError);
    expect(() => normalDensity(Number.NaN)).toThrow(RangeError);
    expect(() => normalQuantile(-0.1)).toThrow('*p* must be between 0 and 1; got -0.1');
    expect(() => normalQuantileUpper(Number.NaN)).toThrow(RangeError);
  });
});
