import { describe, expect, test } from 'vitest';
import {
  betaFraction,
  betaLogit,
  betaLogPrefactor,
  betaLower,
  betaQuantile,
  betaQuantileUpper,
  betaTail,
  betaUpper,
} from '../../../src/numerics/tails/beta.ts';
import { expectRelative } from './expect-relative.ts';

describe('beta tails', () => {
  test('by hand: closed forms, 1e-14', () => {
    for (const x of [1e-9, 0.1, 0.5, 0.83]) {
      expectRelative(betaLower(x, 1, 1), x, 1e-14);
      expectRelative(betaLower(x, 3.5, 1), Math.exp(3.5 * Math.log(x)), 3e-14);
      expectRelative(betaUpper(x, 1, 40), Math.exp(40 * Math.log1p(-x)), 1e-13);
      expectRelative(betaLower(x, 2, 2), x * x * (3 - 2 * x), 1e-14);
      expectRelative(betaLower(x, 0.5, 0.5), (2 / Math.PI) * Math.asin(Math.sqrt(x)), 1e-14);
    }
  });

  test('theory: lower + upper = 1 and the mirror image swaps the shapes', () => {
    for (const [a, b] of [
      [0.05, 3],
      [2.5, 7],
      [300, 4000],
      [2e5, 1e5],
    ] as const) {
      for (const x of [0.001, 0.07, 0.25, 0.66, 0.75]) {
        expect(Math.abs(betaLower(x, a, b) + betaUpper(x, a, b) - 1)).toBeLessThanOrEqual(3e-16);
        expectRelative(betaLower(x, a, b), betaTail(1 - x, x, b, a, true), 1e-12);
      }
    }
  });

  test('theory: I_x(a, b) = I_x(a + 1, b) + x^a y^b / (a B(a, b)), 1e-13', () => {
    const step = Math.exp(betaLogPrefactor(0.3, 0.7, 4.5, 9)) / 4.5;
    expectRelative(betaLower(0.3, 4.5, 9), betaLower(0.3, 5.5, 9) + step, 1e-13);
    expectRelative(betaLower(0.3, 4.5, 9) * betaFraction(0.3, 0.7, 4.5, 9), step * 4.5, 1e-13);
  });

  test('invariance: quantiles invert both tails, 1e-11', () => {
    for (const [a, b] of [
      [0.3, 12],
      [5, 5],
      [2000, 3],
    ] as const) {
      for (const p of [1e-40, 0.01, 0.5, 0.97]) {
        expectRelative(betaLower(betaQuantile(p, a, b), a, b), p, 1e-11);
        const w = betaLogit(p, a, b, true);
        expectRelative(betaTail(1 / (1 + Math.exp(-w)), 1 / (1 + Math.exp(w)), a, b, true), p, 1e-11);
      }
    }
  });

  test('degenerate: ends', () => {
    expect([betaLower(0, 2, 3), betaLower(1, 2, 3), betaUpper(0, 2, 3), betaUpper(1, 2, 3)]).toEqual([0, 1, 1, 0]);
    expect([betaQuantile(0, 2, 3), betaQuantile(1, 2, 3), betaQuantileUpper(0, 2, 3)]).toEqual([0, 1, 1]);
    // The true value is about 1e-6000.
    expect(betaQuantile(1e-300, 0.05, 2)).toBe(0);
  });

  test('refuses wrong arguments', () => {
    expect(() => betaLower(1.1, 2, 3)).toThrow('*x* must be between 0 and 1; got 1.1');
    expect(() => betaUpper(0.5, 0, 3)).toThrow('*a* must be above 0; got 0');
    expect(() => betaUpper(0.5, 1, Infinity)).toThrow('*b* must be finite; got Infinity');
    expect(() => betaQuantile(Number.NaN, 1, 1)).toThrow(RangeError);
  });
});
