import { describe, expect, test } from 'vitest';
import {
  binomialLower,
  binomialMass,
  binomialQuantile,
  binomialTerm,
  binomialUpper,
} from '../../../src/numerics/tails/binomial.ts';
import { expectRelative } from './expect-relative.ts';

describe('binomial', () => {
  test('by hand: three fair trials, 1e-15', () => {
    for (const [k, mass] of [
      [0, 0.125],
      [1, 0.375],
      [2, 0.375],
      [3, 0.125],
    ] as const)
      expectRelative(binomialMass(k, 3, 0.5), mass, 1e-14);
    expectRelative(binomialLower(1, 3, 0.5), 0.5, 1e-15);
    expectRelative(binomialUpper(1, 3, 0.5), 0.5, 1e-15);
    expectRelative(binomialUpper(2, 3, 0.1), 0.001, 1e-14);
  });

  test('theory: masses sum to the tails, 1e-13', () => {
    for (const [n, p] of [
      [20, 0.3],
      [333, 0.01],
    ] as const) {
      let sum = 0;
      for (let k = 0; k <= n; k++) {
        sum += binomialMass(k, n, p);
        expectRelative(binomialLower(k, n, p), sum, 1e-12);
        expect(Math.abs(binomialLower(k, n, p) + binomialUpper(k, n, p) - 1)).toBeLessThanOrEqual(2.3e-16);
      }
    }
  });

  test('invariance: successes and failures change places, 1e-12', () => {
    expectRelative(binomialLower(3, 17, 0.25), binomialUpper(13, 17, 0.75), 1e-12);
    expectRelative(binomialTerm(3, 17, 1e-9, 1 - 1e-9), binomialTerm(14, 17, 1 - 1e-9, 1e-9), 1e-14);
  });

  test('by hand: the quantile is the first k that reaches the probability, exactly', () => {
    expect([0, 0.125, 0.126, 0.5, 0.51, 1].map((prob) => binomialQuantile(prob, 3, 0.5))).toEqual([0, 0, 1, 1, 2, 3]);
    expect(binomialQuantile(0.5, 0, 0.5)).toBe(0);
  });

  test('degenerate: certain outcomes and k outside the support', () => {
    expect([binomialMass(0, 5, 0), binomialMass(5, 5, 1), binomialMass(2, 5, 1), binomialMass(0, 0, 0.3)]).toEqual([
      1, 1, 0, 1,
    ]);
    expect([
      binomialLower(-1, 5, 0.5),
      binomialUpper(-1, 5, 0.5),
      binomialLower(5, 5, 0.5),
      binomialUpper(9, 5, 0.5),
    ]).toEqual([0, 1, 1, 0]);
    expect([binomialLower(2, 5, 0), binomialUpper(2, 5, 1), binomialMass(1.5, 5, 0.5)]).toEqual([1, 1, 0]);
    expect(binomialLower(2.9, 5, 0.4)).toBe(binomialLower(2, 5, 0.4));
  });

  test('refuses wrong arguments', () => {
    expect(() => binomialMass(1, 2.5, 0.5)).toThrow('*n* must be a whole number of at least 0; got 2.5');
    expect(() => binomialLower(1, 2, 1.1)).toThrow('*p* must be between 0 and 1; got 1.1');
    expect(() => binomialUpper(Number.NaN, 2, 0.5)).toThrow(RangeError);
    expect(() => binomialQuantile(-1, 2, 0.5)).toThrow('*prob*');
  });
});
