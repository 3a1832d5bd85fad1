import { expect, test } from 'vitest';
import { kurtosis } from '../../../src/numerics/checks/kurtosis.ts';
import { stopping } from './stopping.ts';

test('by hand: -1, -1, 1, 1 has m4 / m2^2 = 1', () => {
  const found = kurtosis(Float64Array.of(-1, -1, 1, 1));
  expect(found.g2).toBeCloseTo(-2, 15);
  expect(found.bigG2).toBeCloseTo((3 / 2) * (5 * -2 + 6), 14);
  expect(found.b2).toBeCloseTo((3 / 4) ** 2 - 3, 15);
});

test('agrees with SciPy 1.10 kurtosis and kurtosistest', () => {
  const found = kurtosis(stopping);
  expect(found.g2).toBeCloseTo(0.24801865717051808, 13);
  expect(found.bigG2).toBeCloseTo(0.4050525816795765, 13);
  expect(found.z).toBeCloseTo(0.7974337620915266, 12);
  expect(found.p).toBeCloseTo(0.4251991576950608, 12);
});

test('theory: no sample has g2 below -2; SE near sqrt(24 / n) for many scores', () => {
  expect(kurtosis(stopping.map((v) => (v > 36 ? 1 : -1))).g2).toBeGreaterThanOrEqual(-2);
  const many = Float64Array.from({ length: 5000 }, (_, i) => (i * 37) % 101);
  expect((kurtosis(many).se as number) / Math.sqrt(24 / 5000)).toBeCloseTo(1, 2);
});

test('invariance: unit and mirror do not matter', () => {
  expect(kurtosis(stopping.map((v) => 7 - 3 * v)).z).toBeCloseTo(0.7974337620915266, 11);
});

test('degenerate: few and equal scores give a reason', () => {
  expect(kurtosis(Float64Array.of(1, 2, 3))).toMatchObject({ g2: null, reason: 'fewer than 4 scores' });
  expect(kurtosis(Float64Array.of(1, 1, 1, 1))).toMatchObject({ g2: null, reason: 'all scores are equal' });
  expect(kurtosis(Float64Array.of(1, 2, 4, 8))).toMatchObject({ z: null, reason: 'fewer than 5 scores: no test' });
});

test('refuses infinities', () => {
  expect(() => kurtosis(Float64Array.of(1, Number.NEGATIVE_INFINITY, 2, 3))).toThrow(/\*x\* must hold finite/);
});
