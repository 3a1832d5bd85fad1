import { expect, test } from 'vitest';
import { covarianceMatrix, mahalanobisDistances, squaredDistances } from '../../../src/numerics/rules/mahalanobis.ts';

const x = Float64Array.of(1, 2, 3, 4, 5);
const y = Float64Array.of(2, 1, 4, 3, 5);

test('by hand: covariance of 1..5 with 2, 1, 4, 3, 5', () => {
  expect([...covarianceMatrix([x, y]).data]).toEqual([2.5, 2, 2, 2.5]);
});

test('by hand: one column gives squared z scores', () => {
  const found = mahalanobisDistances([x]);
  expect(found.distance2?.[0]).toBeCloseTo(4 / 2.5, 14);
  expect(found.distance2?.[2]).toBeCloseTo(0, 14);
});

test('by hand: two columns, inverse of [2.5 2; 2 2.5] is [2.5 -2; -2 2.5] / 2.25', () => {
  const found = mahalanobisDistances([x, y]);
  const first = (2.5 * 4 - 2 * 2 * -2 * -1 + 2.5) / 2.25;
  expect(found.distance2?.[0]).toBeCloseTo(first, 13);
});

test('agrees with R 4.2 qchisq(.975, 2) and qchisq(.99, 3)', () => {
  expect(mahalanobisDistances([x, y]).cutoff).toBeCloseTo(7.377758908227871, 12);
  const z = Float64Array.of(1, 0, 0, 1, 3);
  expect(mahalanobisDistances([x, y, z], { quantile: 0.99 }).cutoff).toBeCloseTo(11.34486673014437, 11);
});

test('theory: squared distances add up to (n - 1) p', () => {
  const found = mahalanobisDistances([x, y]);
  expect(found.distance2?.reduce((a, b) => a + b, 0)).toBeCloseTo(4 * 2, 12);
});

test('invariance: mixing and rescaling the columns changes nothing', () => {
  const plain = mahalanobisDistances([x, y]).distance2 as Float64Array;
  const mixed = mahalanobisDistances([x.map((v, i) => 3 * v - (y[i] as number)), y.map((v) => 100 * v + 7)]);
  plain.forEach((value, i) => {
    expect(mixed.distance2?.[i]).toBeCloseTo(value, 11);
  });
});

test('degenerate: few rows and dependent columns give a reason', () => {
  expect(mahalanobisDistances([Float64Array.of(1, 2), Float64Array.of(3, 5)]).reason).toBe('fewer than 3 rows');
  const found = mahalanobisDistances([x, x.map((v) => 2 * v + 1)]);
  expect(found).toMatchObject({ distance2: null, reason: 'a column does not vary or is a combination of the others' });
  expect(squaredDistances([x], Float64Array.of(3), covarianceMatrix([Float64Array.of(1, 1)]))).toBe(null);
});

test('refuses no columns, unequal lengths and a quantile of 1', () => {
  expect(() => mahalanobisDistances([])).toThrow(/\*columns\* must hold at least 1 column/);
  expect(() => mahalanobisDistances([x, Float64Array.of(1)])).toThrow(/must be as long as/);
  expect(() => mahalanobisDistances([x], { quantile: 1 })).toThrow(/\*quantile\* must be between 0 and 1/);
});
