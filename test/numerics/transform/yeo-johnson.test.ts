import { expect, test } from 'vitest';
import { yeoJohnson, yeoJohnsonLambda } from '../../../src/numerics/transform/yeo-johnson.ts';
import { stopping } from '../checks/stopping.ts';

const around = stopping.map((v) => v - 40);

test('by hand: 3 and -3 at 2, 0, 1 (1 leaves scores as they are)', () => {
  const x = Float64Array.of(3, -3);
  expect(yeoJohnson(x, 2)[0]).toBeCloseTo(7.5, 13);
  expect(yeoJohnson(x, 2)[1]).toBe(-Math.log(4));
  expect(yeoJohnson(x, 0)[0]).toBe(Math.log(4));
  expect(yeoJohnson(x, 0)[1]).toBeCloseTo(-7.5, 13);
  expect(yeoJohnson(x, 1)[1]).toBeCloseTo(-3, 14);
});

test('agrees with SciPy 1.10 yeojohnson and yeojohnson_llf of distances around 40', () => {
  const found = yeoJohnsonLambda(around);
  expect(found.lambda).toBeCloseTo(0.8821456192603755, 5);
  expect(found.logLikelihood).toBeCloseTo(-158.1937303847282, 9);
});

test('theory: no exponent nearby is likelier', () => {
  const found = yeoJohnsonLambda(around);
  const stretch = around.reduce((a, v) => a + Math.sign(v) * Math.log1p(Math.abs(v)), 0);
  const likelihood = (lambda: number) => {
    const y = yeoJohnson(around, lambda);
    const mean = y.reduce((a, b) => a + b, 0) / y.length;
    const square = y.reduce((a, b) => a + (b - mean) ** 2, 0) / y.length;
    return (lambda - 1) * stretch - (y.length / 2) * Math.log(square);
  };
  for (const step of [-0.01, 0.01]) {
    expect(likelihood((found.lambda as number) + step)).toBeLessThan(found.logLikelihood as number);
  }
});

test('invariance: mirrored scores have the exponent 2 - lambda', () => {
  const plain = yeoJohnsonLambda(around).lambda as number;
  expect(yeoJohnsonLambda(around.map((v) => -v)).lambda).toBeCloseTo(2 - plain, 9);
});

test('degenerate: few and equal scores, and no top inside -50 to 50', () => {
  expect(yeoJohnsonLambda(Float64Array.of(1, 2)).reason).toBe('fewer than 3 scores');
  expect(yeoJohnsonLambda(Float64Array.of(5, 5, 5)).reason).toBe('all scores are equal');
  expect(yeoJohnsonLambda(Float64Array.of(1, 1, 1, 1.0001)).reason).toContain('no exponent between');
  expect(yeoJohnsonLambda(Float64Array.of(1e9, 2e9, 5e9, 3e9)).lambda).not.toBe(Number.NaN);
});

test('refuses an exponent that is not a number', () => {
  expect(() => yeoJohnson(around, Number.NaN)).toThrow(/\*lambda\* must be finite/);
});
