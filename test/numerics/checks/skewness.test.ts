import { expect, test } from 'vitest';
import { skewness, skewnessError } from '../../../src/numerics/checks/skewness.ts';
import { stopping } from './stopping.ts';

test('by hand: 0, 0, 3 has g1 = 2 / 2^1.5 = 1 / sqrt(2), and G1 = g1 sqrt(6)', () => {
  const found = skewness(Float64Array.of(0, 0, 3));
  expect(found.g1).toBeCloseTo(Math.SQRT1_2, 14);
  expect(found.bigG1).toBeCloseTo(Math.sqrt(3), 14);
  expect(found.b1).toBeCloseTo(Math.SQRT1_2 * (2 / 3) ** 1.5, 14);
});

test('agrees with SciPy 1.10 skew and skewtest', () => {
  const found = skewness(stopping);
  expect(found.g1).toBeCloseTo(0.7824835173114966, 13);
  expect(found.bigG1).toBeCloseTo(0.8068949601674216, 13);
  expect(found.z).toBeCloseTo(2.312812786045302, 12);
  expect(found.p).toBeCloseTo(0.020732934495967113, 13);
});

test('theory: SE near sqrt(6 / n) for many scores; symmetric scores have z = 0', () => {
  expect(skewnessError(1e6) / Math.sqrt(6e-6)).toBeCloseTo(1, 5);
  expect(skewness(Float64Array.of(-4, -3, -2, -1, 1, 2, 3, 4))).toMatchObject({ z: 0, p: 1 });
});

test('invariance: mirrored scores change the sign', () => {
  const found = skewness(stopping.map((v) => 7 - 3 * v));
  expect(found.z).toBeCloseTo(-2.312812786045302, 12);
});

test('degenerate: few and equal scores give a reason', () => {
  expect(skewness(Float64Array.of(1, 2))).toMatchObject({ g1: null, reason: 'fewer than 3 scores' });
  expect(skewness(Float64Array.of(1, 1, 1))).toMatchObject({ g1: null, reason: 'all scores are equal' });
  expect(skewness(Float64Array.of(1, 2, 4, 8))).toMatchObject({
    z: null,
    p: null,
    reason: 'fewer than 8 scores: no test',
  });
});

test('refuses NaN', () => {
  expect(() => skewness(Float64Array.of(1, Number.NaN, 2))).toThrow(/\*x\* must hold finite/);
});
