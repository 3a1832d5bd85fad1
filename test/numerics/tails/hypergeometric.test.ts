import { describe, expect, test } from 'vitest';
import {
  hypergeometricLower,
  hypergeometricMass,
  hypergeometricUpper,
} from '../../../src/numerics/tails/hypergeometric.ts';
import { expectRelative } from './expect-relative.ts';

describe('hypergeometric', () => {
  test('by hand: two of five, two marked: 3 6 1 of 10, 1e-14', () => {
    [0.3, 0.6, 0.1].forEach((mass, k) => {
      expectRelative(hypergeometricMass(k, 5, 2, 2), mass, 1e-14);
    });
    expectRelative(hypergeometricLower(1, 5, 2, 2), 0.9, 1e-14);
    expectRelative(hypergeometricUpper(0, 5, 2, 2), 0.7, 1e-14);
  });

  // Source: the tea-tasting table, all four right of 8 cups: 1 / 70 (common practice).
  test('agrees with a published example, 1e-14', () => {
    expectRelative(hypergeometricUpper(3, 8, 4, 4), 1 / 70, 1e-13);
  });

  test('theory: masses sum to the tails; marked and drawn are interchangeable, 1e-12', () => {
    let sum = 0;
    for (let k = 0; k <= 30; k++) {
      sum += hypergeometricMass(k, 100, 40, 30);
      expectRelative(hypergeometricLower(k, 100, 40, 30), sum, 1e-12);
      expectRelative(hypergeometricMass(k, 100, 40, 30), hypergeometricMass(k, 100, 30, 40), 1e-12);
      expect(
        Math.abs(hypergeometricLower(k, 100, 40, 30) + hypergeometricUpper(k, 100, 40, 30) - 1),
      ).toBeLessThanOrEqual(2.3e-16);
    }
  });

  test('degenerate: nothing or everything drawn, and k outside the support', () => {
    expect([hypergeometricMass(0, 9, 4, 0), hypergeometricMass(4, 9, 4, 9), hypergeometricMass(0, 9, 8, 5)]).toEqual([
      1, 1, 0,
    ]);
    expect([
      hypergeometricLower(-1, 9, 4, 3),
      hypergeometricUpper(2, 9, 8, 5),
      hypergeometricLower(3, 9, 4, 3),
    ]).toEqual([0, 1, 1]);
    expect(hypergeometricMass(1, 1, 1, 1)).toBe(1);
  });

  test('refuses wrong arguments', () => {
    expect(() => hypergeometricMass(1, 5, 6, 2)).toThrow(
      '*K* must be a whole number of at least 0 and at most 5; got 6',
    );
    expect(() => hypergeometricLower(1, 5, 2, 2.5)).toThrow('*n*');
    expect(() => hypergeometricUpper(Number.NaN, 5, 2, 2)).toThrow('*k*');
  });
});
