import { describe, expect, test } from 'vitest';
import { normalQuantile, normalUpper } from '../../../src/numerics/tails/normal.ts';
import { tLower, tQuantile, tQuantileUpper, tTwoSided, tUpper } from '../../../src/numerics/tails/t.ts';
import { expectRelative } from './expect-relative.ts';

describe('t tails', () => {
  test('by hand: 1 and 2 degrees of freedom in closed form, 1e-14', () => {
    for (const t of [1e-5, 0.7, 3, 1e4, 1e100, 1e200]) {
      expectRelative(tUpper(t, 1), Math.atan(1 / t) / Math.PI, 1e-13);
      if (t < 1e100) {
        const root = Math.sqrt(2 + t * t);
        expectRelative(tUpper(t, 2), 1 / (root * (root + t)), 1e-14);
      }
    }
  });

  // Source: common practice, printed t table.
  test('agrees with printed values, 1e-9', () => {
    expectRelative(tQuantile(0.975, 10), 2.228138852, 1e-9);
    expectRelative(tQuantileUpper(0.05, 1), 6.313751515, 1e-9);
  });

  test('theory: lower + upper = 1, mirror image, two-sided is twice the far tail', () => {
    for (const df of [0.5, 3.7, 40, 1e6, Infinity]) {
      for (const t of [-30, -1.2, 0, 0.4, 2, 9]) {
        expect(Math.abs(tLower(t, df) + tUpper(t, df) - 1)).toBeLessThanOrEqual(2.3e-16);
        expect(tLower(t, df)).toBe(tUpper(-t, df));
        expect(tTwoSided(t, df)).toBe(2 * tUpper(Math.abs(t), df));
      }
    }
  });

  test('theory: the normal distribution is the limit, 1e-11', () => {
    expectRelative(tUpper(3, 1e17), normalUpper(3), 1e-12);
    expectRelative(tUpper(20, 1e16), normalUpper(20), 1e-11);
    expect(tUpper(20, Infinity)).toBe(normalUpper(20));
    expect(tQuantile(0.9, Infinity)).toBe(normalQuantile(0.9));
  });

  test('invariance: quantiles invert the tails, also next to the middle, 1e-12', () => {
    for (const df of [0.6, 2, 17.3, 1e5]) {
      for (const p of [1e-60, 0.001, 0.2, 0.25, 0.3, 0.5 - 2 ** -40]) {
        const t = tQuantileUpper(p, df);
        expectRelative(tUpper(t, df), p, 1e-11);
        expect(tQuantile(p, df)).toBe(-t);
      }
    }
    // Source: near 0 the quantile is (p - 1/2) over the density, which is 3 / 8 for 4 degrees of freedom.
    expectRelative(tQuantile(0.5 + 2 ** -30, 4), 2 ** -30 / 0.375, 1e-9);
  });

  test('degenerate: ends', () => {
    expect([tUpper(Infinity, 3), tUpper(-Infinity, 3), tUpper(0, 3), tTwoSided(0, 3)]).toEqual([0, 1, 0.5, 1]);
    expect([tQuantile(0, 3), tQuantile(0.5, 3), tQuantile(1, 3)]).toEqual([-Infinity, 0, Infinity]);
  });

  test('refuses wrong arguments', () => {
    expect(() => tUpper(1, 0)).toThrow('*df* must be above 0; got 0');
    expect(() => tTwoSided(Number.NaN, 3)).toThrow('*t* must be a number; got NaN');
    expect(() => tQuantile(1.2, 3)).toThrow(RangeError);
  });
});
