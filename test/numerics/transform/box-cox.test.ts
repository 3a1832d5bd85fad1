import { expect, test } from 'vitest';
import { normalQuantile } from '../../../src/numerics/tails/normal.ts';
import { boxCox, boxCoxLambda } from '../../../src/numerics/transform/box-cox.ts';
import { stopping } from '../checks/stopping.ts';

test('by hand: (x^lambda - 1) / lambda at 2, 1/2, 0, -1', () => {
  const x = Float64Array.of(4);
  expect(boxCox(x, 2)[0]).toBeCloseTo(7.5, 13);
  expect(boxCox(x, 0.5)[0]).toBeCloseTo(2, 14);
  expect(boxCox(x, 0)[0]).toBe(Math.log(4));
  expect(boxCox(x, -1)[0]).toBeCloseTo(0.75, 14);
});

test('agrees with SciPy 1.10 boxcox and boxcox_llf of the stopping distances', () => {
  const found = boxCoxLambda(stopping);
  expect(found.lambda).toBeCloseTo(0.49507620191118606, 6);
  expect(found.logLikelihood).toBeCloseTo(-157.80490551886228, 9);
});

test('theory: scores whose logs are normal quantiles have lambda near 0', () => {
  const x = Float64Array.from({ length: 99 }, (_, i) => Math.exp(3 + 0.5 * normalQuantile((i + 1) / 100)));
  expect(Math.abs(boxCoxLambda(x).lambda as number)).toBeLessThan(1e-9);
});

test('invariance: another unit leaves lambda, reciprocals change its sign', () => {
  const plain = boxCoxLambda(stopping).lambda as number;
  expect(boxCoxLambda(stopping.map((v) => 0.3048 * v)).lambda).toBeCloseTo(plain, 10);
  expect(boxCoxLambda(stopping.map((v) => 1 / v)).lambda).toBeCloseTo(-plain, 10);
});

test('degenerate: a score of 0, equal and few scores, no top inside -50 to 50', () => {
  expect(boxCoxLambda(Float64Array.of(0, 1, 2)).reason).toBe('a score is 0 or below');
  expect(boxCoxLambda(Float64Array.of(3, 3, 3)).reason).toBe('all scores are equal');
  expect(boxCoxLambda(Float64Array.of(1, 2)).reason).toBe('fewer than 3 scores');
  expect(boxCoxLambda(Float64Array.of(1, 1.001, 1.5, 1.5001)).lambda).not.toBe(Number.NaN);
  expect(boxCoxLambda(Float64Array.of(1, 1, 1, 1.0001)).reason).toContain('no exponent between');
});

test('refuses scores of 0 and an infinite exponent', () => {
  expect(() => boxCox(Float64Array.of(1, 0), 0.5)).toThrow(/\*x\* must hold numbers above 0; got 0/);
  expect(() => boxCox(Float64Array.of(1), Number.POSITIVE_INFINITY)).toThrow(/\*lambda\* must be finite/);
});
