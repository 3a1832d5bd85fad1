import { expect, test } from 'vitest';
import { powered, poweredSlope } from '../../../src/numerics/transform/power.ts';

test('by hand: log 4 at rates 0, 1/2, 2', () => {
  expect(powered(Math.log(4), 0)).toBe(Math.log(4));
  expect(powered(Math.log(4), 0.5)).toBeCloseTo(2, 14);
  expect(powered(Math.log(4), 2)).toBeCloseTo(7.5, 13);
  expect(poweredSlope(2, 0)).toBe(2);
});

test('agrees with differences of the power itself', () => {
  for (const rate of [-3, -0.4, -0.01, 0.01, 0.3, 0.6, 2]) {
    for (const u of [-2, -0.3, 0.7, 1.5]) {
      const slope = (powered(u, rate + 1e-6) - powered(u, rate - 1e-6)) / 2e-6;
      expect(Math.abs(poweredSlope(u, rate) / slope - 1)).toBeLessThan(1e-7);
    }
  }
});

test('theory: series and closed form meet at |t| = .5', () => {
  expect(poweredSlope(1, 0.5)).toBeCloseTo(poweredSlope(1, 0.5 + 1e-13), 11);
  expect(poweredSlope(1, -0.5)).toBeCloseTo(poweredSlope(1, -0.5 - 1e-13), 11);
});

test('invariance: the reciprocal score with the opposite rate has the opposite power', () => {
  expect(powered(-1.3, -0.7)).toBeCloseTo(-powered(1.3, 0.7), 14);
});

test('degenerate: score 1 (log 0) stays 0 at every rate', () => {
  for (const rate of [-2, 0, 3]) {
    expect(powered(0, rate) + 0).toBe(0);
    expect(poweredSlope(0, rate)).toBe(0);
  }
});

test('refuses nothing: a power out of range shows as Infinity, which the searches exclude', () => {
  expect(powered(800, 1)).toBe(Number.POSITIVE_INFINITY);
});
