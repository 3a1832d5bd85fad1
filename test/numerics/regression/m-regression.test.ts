import { expect, test } from 'vitest';
import { linearRegression } from '../../../src/numerics/regression/linear-regression.ts';
import { mRegression } from '../../../src/numerics/regression/m-regression.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: without large residuals Huber weights are all 1 and the fit is least squares', () => {
  const found = mRegression(quality, [lightness], { madDivisor: 0.6745 });
  const plain = linearRegression(quality, [lightness]).coefficients as Float64Array;
  expect([...(found.weights ?? [])]).toEqual([1, 1, 1, 1, 1, 1, 1, 1, 1]);
  expect(found.coefficients?.[1]).toBeCloseTo(plain[1] as number, 13);
});

test('agrees with R 4.2 MASS rlm(psi.bisquare, acc = 1e-13)', () => {
  const found = mRegression(quality, [lightness], { psi: 'bisquare', madDivisor: 0.6745 });
  expect(found.coefficients?.[0]).toBeCloseTo(-1.071852805181498, 8);
  expect(found.coefficients?.[1]).toBeCloseTo(0.09783976952802169, 9);
  expect(found.scale).toBeCloseTo(0.9966389353041805, 8);
});

test('theory: at the solution weighted residuals add up to 0 and do not run with the predictor', () => {
  const y = quality.map((v, i) => (i === 2 ? 40 : v));
  for (const psi of ['huber', 'bisquare'] as const) {
    const found = mRegression(y, [lightness], { psi });
    const [a, b] = found.coefficients as unknown as [number, number];
    const pull = (of: (i: number) => number) =>
      y.reduce((sum, v, i) => sum + (found.weights?.[i] as number) * (v - a - b * (lightness[i] as number)) * of(i), 0);
    expect(pull(() => 1)).toBeCloseTo(0, 9);
    expect(pull((i) => lightness[i] as number)).toBeCloseTo(0, 7);
  }
});

test('invariance: bisquare does not see how far a rejected outcome lies', () => {
  const slopes = (far: number) =>
    mRegression(
      quality.map((v, i) => (i === 2 ? far : v)),
      [lightness],
      { psi: 'bisquare' },
    );
  expect(slopes(400).coefficients?.[1]).toBeCloseTo(slopes(4000).coefficients?.[1] as number, 9);
});

test('degenerate: half of the residuals 0, dependent predictors', () => {
  const x = Float64Array.of(1, 2, 3, 4, 5, 6, 7);
  const exact = mRegression(
    x.map((v) => 2 * v),
    [x],
  );
  expect(exact).toMatchObject({ coefficients: null, reason: expect.stringContaining('no residual scale') });
  expect(mRegression(quality, [lightness, lightness]).coefficients).toBe(null);
});

test('refuses a tuning or divisor that is not above 0', () => {
  expect(() => mRegression(quality, [lightness], { tuning: 0 })).toThrow(/\*tuning\* must be/);
  expect(() => mRegression(quality, [lightness], { madDivisor: -1 })).toThrow(/\*madDivisor\* must be/);
});
