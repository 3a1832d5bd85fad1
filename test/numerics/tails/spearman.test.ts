import { describe, expect, test } from 'vitest';
import { spearmanLower, spearmanUpper } from '../../../src/numerics/tails/spearman.ts';
import { expectRelative } from './expect-relative.ts';

describe('Spearman tails', () => {
  test('by hand: three ranks have sums 0 2 2 6 6 8, 1e-15', () => {
    [
      [0, 1],
      [2, 3],
      [4, 3],
      [6, 5],
      [8, 6],
    ].forEach(([s, count]) => {
      expectRelative(spearmanLower(s!, 3), count! / 6, 1e-15);
    });
    [
      [0, 6],
      [2, 5],
      [4, 3],
      [6, 3],
      [8, 1],
    ].forEach(([s, count]) => {
      expectRelative(spearmanUpper(s!, 3), count! / 6, 1e-15);
    });
  });

  test('theory: P(S <= s) + P(S >= s + 2) = 1, counts and series alike, 1e-14', () => {
    for (const n of [2, 5, 9, 10, 40]) {
      const step = 2 * Math.max(1, Math.floor((n * n * n) / 60));
      for (let s = 0; s < (n * (n * n - 1)) / 3; s += step)
        expect(Math.abs(spearmanLower(s, n) + spearmanUpper(s + 2, n) - 1)).toBeLessThanOrEqual(1e-14);
    }
  });

  // Source: R 4.2.2, stats package, C code of AS 89 at n = 10: P(S <= 32) and P(S >= 32); n = 10: P(S <= 98).
  test('agrees with another program of the same series, 1e-13', () => {
    expectRelative(spearmanLower(32, 10), 0.004117785411425578, 1e-13);
    expectRelative(spearmanUpper(32, 10), 0.9965944336140866, 1e-13);
    expectRelative(spearmanLower(98, 10), 0.1236853938059657, 1e-13);
  });

  test('theory: counts and series nearly agree where they meet, 2e-3', () => {
    // The 5 % point of n = 9 lies near rho = .60, that of n = 10 near .564 (common practice).
    expect(Math.abs(spearmanLower(48, 9) - 0.048)).toBeLessThanOrEqual(2e-3);
    expect(Math.abs(spearmanLower(72, 10) - 0.048)).toBeLessThanOrEqual(2e-3);
  });

  test('degenerate: ends and odd values', () => {
    expect([spearmanLower(-1, 5), spearmanUpper(0, 5), spearmanLower(40, 5), spearmanUpper(41, 5)]).toEqual([
      0, 1, 1, 0,
    ]);
    for (const n of [6, 20]) {
      expect(spearmanLower(11, n)).toBe(spearmanLower(10, n));
      expect(spearmanUpper(11, n)).toBe(spearmanUpper(12, n));
    }
  });

  test('refuses wrong arguments', () => {
    expect(() => spearmanLower(1, 1)).toThrow('*n* must be a whole number of at least 2; got 1');
    expect(() => spearmanUpper(Number.NaN, 4)).toThrow('*s* must be a number; got NaN');
  });
});
