import { expect, test } from 'vitest';
import { breuschPagan } from '../../../src/numerics/regression/breusch-pagan.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: (0, 0), (0, 2), (1, 0), (1, 4): squared residuals 1, 1, 4, 4 are the predictor, chi2 = n', () => {
  const found = breuschPagan(Float64Array.of(0, 2, 0, 4), [Float64Array.of(0, 0, 1, 1)]);
  expect(found.chi2).toBeCloseTo(4, 12);
  expect(found.df).toBe(1);
  expect(found.p).toBeCloseTo(0.04550026389635842, 12); // R 4.2: pchisq(4, 1, lower.tail = FALSE)
});

test('agrees with R 4.2: n R^2 of squared residuals, 3.5105', () => {
  expect(breuschPagan(quality, [lightness]).chi2).toBeCloseTo(3.510530894222448, 11);
});

test('theory: n R^2 lies between 0 and n', () => {
  const chi2 = breuschPagan(quality, [lightness, lightness.map((v) => v * v)]).chi2 as number;
  expect(chi2).toBeGreaterThan(0);
  expect(chi2).toBeLessThan(9);
});

test('invariance: the unit of the outcome does not matter', () => {
  const plain = breuschPagan(quality, [lightness]).chi2 as number;
  expect(
    breuschPagan(
      quality.map((v) => 1000 * v),
      [lightness],
    ).chi2,
  ).toBeCloseTo(plain, 10);
});

test('degenerate: an exact fit, equal squared residuals, dependent predictors', () => {
  expect(breuschPagan(Float64Array.of(1, 3, 5), [Float64Array.of(0, 1, 2)]).reason).toContain('exact');
  const equal = breuschPagan(Float64Array.of(0, 2, 0, 2), [Float64Array.of(0, 0, 1, 1)]);
  expect(equal).toMatchObject({ chi2: null, p: null, reason: 'all squared residuals are equal' });
  expect(breuschPagan(quality, [lightness, lightness]).chi2).toBe(null);
});

test('refuses no predictor', () => {
  expect(() => breuschPagan(quality, [])).toThrow(/\*predictors\* must hold at least 1/);
});
