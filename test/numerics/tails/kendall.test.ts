import { describe, expect, test } from 'vitest';
import { kendallLower, kendallUpper } from '../../../src/numerics/tails/kendall.ts';
import { expectRelative } from './expect-relative.ts';

describe('Kendall tails', () => {
  test('by hand: three ranks have counts 1 2 2 1 of 6, 1e-15', () => {
    [1, 3, 5, 6].forEach((count, c) => {
      expectRelative(kendallLower(c, 3), count / 6, 1e-15);
    });
    [5, 3, 1, 0].forEach((count, c) => {
      expectRelative(kendallUpper(c, 3), count / 6, 1e-15);
    });
  });

  test('theory: lower + upper = 1, mirror image, one order of n! is the most extreme, 1e-13', () => {
    for (const c of [0, 30, 94, 95, 96, 189]) {
      expect(Math.abs(kendallLower(c, 20) + kendallUpper(c, 20) - 1)).toBeLessThanOrEqual(2.3e-16);
      expect(kendallLower(c, 20)).toBe(kendallUpper(189 - c, 20));
    }
    expectRelative(kendallUpper(189, 20), 1 / 2432902008176640000, 1e-13);
  });

  // Source: variance n (n - 1) (2n + 5) / 18 of concordant minus discordant pairs; continuity-corrected normal value.
  test('theory: large samples approach the normal distribution, 5e-3', () => {
    const sd = Math.sqrt((100 * 99 * 205) / 18) / 2;
    expectRelative(kendallUpper(Math.floor(2475 + 1.6448536 * sd), 100), 0.05, 5e-3);
  });

  test('degenerate: one rank, and values outside the range', () => {
    expect([kendallLower(0, 1), kendallUpper(0, 1)]).toEqual([1, 0]);
    expect([kendallLower(-1, 4), kendallUpper(-1, 4), kendallLower(6, 4), kendallUpper(99, 4)]).toEqual([0, 1, 1, 0]);
  });

  test('refuses wrong arguments', () => {
    expect(() => kendallLower(1, 0)).toThrow('*n* must be a whole number of at least 1 and at most 1000; got 0');
    expect(() => kendallUpper(Number.NaN, 4)).toThrow('*concordant*');
  });
});
