import { expect, test } from 'vitest';
import {
  fitLinear,
  fittedValues,
  type LinearModel,
  type NoModel,
} from '../../../src/numerics/regression/linear-model.ts';
import { lightness, quality } from '../correlation/tuna.ts';

function fitted(model: LinearModel | NoModel): LinearModel {
  if (model.coefficients === null) throw new Error(model.reason);
  return model;
}

test('by hand: the line through (0, 1), (1, 3), (2, 2) is 1.5 + .5 x', () => {
  const model = fitted(fitLinear(Float64Array.of(1, 3, 2), [Float64Array.of(0, 1, 2)]));
  expect(model.coefficients[0]).toBeCloseTo(1.5, 14);
  expect(model.coefficients[1]).toBeCloseTo(0.5, 14);
  expect([...fittedValues(model)].map((v) => Math.round(v * 1e12) / 1e12)).toEqual([1.5, 2, 2.5]);
  expect(model.df).toBe(1);
});

test('agrees with R 4.2 lm on nine pairs', () => {
  const model = fitted(fitLinear(quality, [lightness]));
  expect(model.coefficients[0]).toBeCloseTo(-1.0241071649039057, 12);
  expect(model.coefficients[1]).toBeCloseTo(0.09718095394872214, 13);
});

test('theory: residuals add up to 0 and do not run with a predictor; with none the fit is the mean', () => {
  const model = fitted(fitLinear(quality, [lightness]));
  expect(model.residuals.reduce((a, b) => a + b, 0)).toBeCloseTo(0, 12);
  expect(model.residuals.reduce((a, e, i) => a + e * (lightness[i] as number), 0)).toBeCloseTo(0, 10);
  expect(fitted(fitLinear(Float64Array.of(1, 2, 6), [])).coefficients[0]).toBeCloseTo(3, 14);
});

test('invariance: another unit of the predictor divides its coefficient', () => {
  const plain = fitted(fitLinear(quality, [lightness]));
  const scaled = fitted(fitLinear(quality, [lightness.map((v) => v * 1000)]));
  expect((scaled.coefficients[1] as number) * 1000).toBeCloseTo(plain.coefficients[1] as number, 12);
});

test('degenerate: few rows, a flat predictor and dependent predictors give a reason; an exact fit says so', () => {
  expect(fitLinear(Float64Array.of(1), [Float64Array.of(1)])).toMatchObject({ reason: 'fewer than 2 rows' });
  const reason = 'a predictor does not vary or is a combination of the others';
  expect(fitLinear(quality, [new Float64Array(9).fill(3)])).toEqual({ coefficients: null, reason });
  expect(fitLinear(quality, [lightness, lightness.map((v) => 2 * v + 1)])).toEqual({ coefficients: null, reason });
  expect(
    fitted(
      fitLinear(
        lightness.map((v) => 0.1 * v + 3),
        [lightness],
      ),
    ).exact,
  ).toBe(true);
});

test('refuses unequal lengths and NaN', () => {
  expect(() => fitLinear(quality, [Float64Array.of(1)])).toThrow(/must be as long as/);
  expect(() => fitLinear(Float64Array.of(Number.NaN, 1), [])).toThrow(/\*y\* must hold finite/);
});
