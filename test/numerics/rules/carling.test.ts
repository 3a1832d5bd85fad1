import { expect, test } from 'vitest';
import { carlingLimits } from '../../../src/numerics/rules/carling.ts';

test('by hand: n = 11, k = (17.63 * 11 - 23.64) / (7.74 * 11 - 3.71)', () => {
  const found = carlingLimits(Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11));
  const k = 170.29 / 81.43;
  expect(found.k).toBeCloseTo(k, 14);
  // Ideal fourths at (11 + 1/3)/4 + 1/3 = 3.16667 and 8.83333.
  expect(found.spread).toBeCloseTo(17 / 3, 13);
  expect(found.upper).toBeCloseTo(6 + (k * 17) / 3, 12);
});

test('agrees with a transcription in R 4.2 (case airquality/175): k = 2.2607898180354087 at n = 116', () => {
  expect(carlingLimits(Float64Array.from({ length: 116 }, (_, i) => i)).k).toBeCloseTo(2.2607898180354087, 14);
});

test('theory: k grows with n towards 17.63 / 7.74', () => {
  const k = (n: number) => carlingLimits(Float64Array.from({ length: n }, (_, i) => i)).k as number;
  expect(k(50)).toBeGreaterThan(k(10));
  expect(k(100000)).toBeCloseTo(17.63 / 7.74, 4);
});

test('invariance: the order of the scores does not matter', () => {
  expect(carlingLimits(Float64Array.of(9, 1, 4, 2, 7))).toEqual(carlingLimits(Float64Array.of(1, 2, 4, 7, 9)));
});

test('degenerate: no, one and tied scores give a reason', () => {
  expect(carlingLimits(new Float64Array(0)).reason).toBe('there are no scores');
  expect(carlingLimits(Float64Array.of(2)).reason).toBe('one score has no spread');
  expect(carlingLimits(Float64Array.of(2, 2, 2, 2, 2, 2, 2, 5)).reason).toBe(
    'the quartiles coincide (quartile distance = 0)',
  );
});

test('refuses infinite scores', () => {
  expect(() => carlingLimits(Float64Array.of(1, Number.POSITIVE_INFINITY))).toThrow(/\*x\* must hold finite/);
});
