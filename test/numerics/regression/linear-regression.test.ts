import { expect, test } from 'vitest';
import { pearsonCorrelation } from '../../../src/numerics/correlation/pearson.ts';
import { linearRegression } from '../../../src/numerics/regression/linear-regression.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: (0, 1), (1, 3), (2, 2): RSS 1.5, slope SE sqrt(1.5 / 2), r2 = .25', () => {
  const found = linearRegression(Float64Array.of(1, 3, 2), [Float64Array.of(0, 1, 2)]);
  expect(found.residualSd).toBeCloseTo(Math.sqrt(1.5), 14);
  expect(found.se?.[1]).toBeCloseTo(Math.sqrt(0.75), 14);
  expect(found.r2).toBeCloseTo(0.25, 14);
  expect(found.adjustedR2).toBeCloseTo(1 - 0.75 * 2, 14);
  expect(found.f).toBeCloseTo(0.5 / 1.5, 14);
  expect(found.fDf).toEqual([1, 1]);
});

test('agrees with R 4.2 summary.lm and confint', () => {
  const found = linearRegression(quality, [lightness]);
  expect(found.se?.[0]).toBeCloseTo(2.5401998199519813, 11);
  expect(found.t?.[1]).toBeCloseTo(1.841082638115336, 12);
  expect(found.p?.[0]).toBeCloseTo(0.6988603430382798, 12);
  expect(found.lower?.[0]).toBeCloseTo(-7.030725263053985, 11);
  expect(found.upper?.[1]).toBeCloseTo(0.2219968833060844, 12);
  expect(found.r2).toBeCloseTo(0.3262483717010408, 13);
  expect(found.f).toBeCloseTo(3.389585280369724, 12);
  expect(found.residualSd).toBeCloseTo(0.8673229157764329, 13);
});

test('theory: with one predictor F is t squared and its p that of the correlation', () => {
  const found = linearRegression(quality, [lightness]);
  expect(found.f).toBeCloseTo((found.t?.[1] as number) ** 2, 12);
  expect(found.fP).toBeCloseTo(pearsonCorrelation(lightness, quality).p as number, 13);
  expect(linearRegression(quality, []).f).toBe(null);
});

test('invariance: the order of the rows does not matter', () => {
  const a = linearRegression(quality, [lightness]);
  const b = linearRegression(quality.slice().reverse(), [lightness.slice().reverse()]);
  expect(b.t?.[1]).toBeCloseTo(a.t?.[1] as number, 12);
});

test('degenerate: no residual left, an exact fit, dependent predictors', () => {
  const two = linearRegression(Float64Array.of(1, 3), [Float64Array.of(0, 1)]);
  expect(two).toMatchObject({ se: null, reason: 'as many coefficients as rows: no residual left' });
  expect(two.coefficients?.[1]).toBeCloseTo(2, 14);
  const exact = linearRegression(Float64Array.of(1, 3, 5), [Float64Array.of(0, 1, 2)]);
  expect(exact).toMatchObject({ t: null, p: null, reason: 'the fit is exact: no residual spread' });
  expect(linearRegression(quality, [lightness, lightness]).coefficients).toBe(null);
});

test('refuses a level of 1', () => {
  expect(() => linearRegression(quality, [lightness], { level: 1 })).toThrow(/\*level\* must be/);
});
