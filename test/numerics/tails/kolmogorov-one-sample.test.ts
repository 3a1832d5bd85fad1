import { describe, expect, test } from 'vitest';
import {
  kolmogorovOneSampleLower,
  kolmogorovOneSampleUpper,
} from '../../../src/numerics/tails/kolmogorov-one-sample.ts';
import { expectRelative } from './expect-relative.ts';

describe('Kolmogorov one-sample', () => {
  // Source: n! (2d - 1 / n)^n for d up to 1 / n; 1 - 2 (1 - d)^n for d from 1 - 1 / n on (common practice).
  test('by hand: both ends in closed form, 1e-13', () => {
    expectRelative(kolmogorovOneSampleLower(0.7, 1), 0.4, 1e-15);
    expectRelative(kolmogorovOneSampleLower(0.4, 2), 2 * 0.3 * 0.3, 1e-14);
    expectRelative(kolmogorovOneSampleLower(0.15, 6), 720 * (0.3 - 1 / 6) ** 6, 1e-13);
    expectRelative(kolmogorovOneSampleUpper(0.95, 12), 2 * 0.05 ** 12, 1e-13);
  });

  // Source: common practice, printed 5 % points: n = 10: .409; n = 20: .294.
  test('agrees with printed values, 2e-2', () => {
    expectRelative(kolmogorovOneSampleUpper(0.40925, 10), 0.05, 2e-3);
    expectRelative(kolmogorovOneSampleUpper(0.29408, 20), 0.05, 2e-3);
  });

  test('theory: lower + upper = 1; matrix and sum meet at the switch, 1e-9', () => {
    for (const [d, n] of [
      [0.05, 200],
      [0.2, 30],
      [0.5, 7],
      [0.8, 40],
    ] as const) {
      expect(Math.abs(kolmogorovOneSampleLower(d, n) + kolmogorovOneSampleUpper(d, n) - 1)).toBeLessThanOrEqual(
        2.3e-16,
      );
    }
    const n = 400;
    const at = Math.sqrt(4.5 / n);
    expectRelative(kolmogorovOneSampleUpper(at * (1 - 1e-12), n), kolmogorovOneSampleUpper(at * (1 + 1e-12), n), 1e-9);
  });

  test('degenerate: ends', () => {
    expect([kolmogorovOneSampleLower(0.02, 20), kolmogorovOneSampleUpper(0, 20)]).toEqual([0, 1]);
    expect([kolmogorovOneSampleLower(1, 20), kolmogorovOneSampleUpper(1.5, 20)]).toEqual([1, 0]);
  });

  test('refuses wrong arguments', () => {
    expect(() => kolmogorovOneSampleLower(0.5, 0)).toThrow(
      '*n* must be a whole number of at least 1 and at most 5000; got 0',
    );
    expect(() => kolmogorovOneSampleUpper(Number.NaN, 4)).toThrow('*d* must be a number; got NaN');
  });
});
