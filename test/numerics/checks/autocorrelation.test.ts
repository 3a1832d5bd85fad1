import { expect, test } from 'vitest';
import { autocorrelation } from '../../../src/numerics/checks/autocorrelation.ts';
import { hormone } from './stopping.ts';

test('by hand: 1, 2, 3 has r1 = 0 and r2 = -1/2', () => {
  const found = autocorrelation(Float64Array.of(1, 2, 3), { lags: 2 });
  expect([...(found.r ?? [])]).toEqual([0, -0.5]);
  expect(found.durbinWatson).toBe(1);
});

test('agrees with R 4.2 acf of the hormone series, and its Durbin-Watson ratio', () => {
  const found = autocorrelation(hormone, { lags: 3 });
  expect(found.r?.[0]).toBeCloseTo(0.5755244755244755, 13);
  expect(found.r?.[1]).toBeCloseTo(0.1818181818181818, 13);
  expect(found.r?.[2]).toBeCloseTo(-0.1447552447552447, 13);
  expect(found.durbinWatson).toBeCloseTo(0.8314685314685315, 13);
});

test('theory: all n - 1 autocorrelations add up to -1/2', () => {
  const found = autocorrelation(hormone, { lags: 47 });
  expect(found.r?.reduce((a, b) => a + b, 0)).toBeCloseTo(-0.5, 12);
});

test('invariance: unit and direction of time do not matter', () => {
  const turned = autocorrelation(hormone.map((v) => 4 - 10 * v).reverse(), { lags: 1 });
  expect(turned.r?.[0]).toBeCloseTo(0.5755244755244755, 12);
});

test('degenerate: equal scores give a reason', () => {
  const found = autocorrelation(Float64Array.of(0.1, 0.1, 0.1), { lags: 1 });
  expect(found).toEqual({ r: null, durbinWatson: null, reason: 'all scores are equal' });
});

test('refuses lags outside 1 to n - 1', () => {
  expect(() => autocorrelation(Float64Array.of(1, 2, 3), { lags: 3 })).toThrow(
    /\*lags\* must be a whole number from 1 to 2/,
  );
  expect(() => autocorrelation(Float64Array.of(1, 2, 3), { lags: 0 })).toThrow(/\*lags\* must be/);
});
