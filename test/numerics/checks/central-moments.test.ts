import { expect, test } from 'vitest';
import { centralMoments } from '../../../src/numerics/checks/central-moments.ts';
import { stopping } from './stopping.ts';

test('by hand: 0, 0, 3 has deviations -1, -1, 2, in units of 2', () => {
  const found = centralMoments(Float64Array.of(0, 0, 3));
  expect(found?.m2).toBeCloseTo(6 / 3 / 4, 15);
  expect(found?.m3).toBeCloseTo(6 / 3 / 8, 15);
  expect(found?.m4).toBeCloseTo(18 / 3 / 16, 15);
});

test('agrees with SciPy 1.10 skew and kurtosis of the stopping distances', () => {
  const m = centralMoments(stopping);
  if (m === null) throw new Error('the distances vary');
  expect(m.m3 / m.m2 ** 1.5).toBeCloseTo(0.7824835173114966, 13);
  expect(m.m4 / m.m2 ** 2 - 3).toBeCloseTo(0.24801865717051808, 13);
});

test('theory: m4 is at least m2 squared', () => {
  const m = centralMoments(stopping);
  expect(m?.m4).toBeGreaterThan((m?.m2 as number) ** 2);
});

test('invariance: the unit does not matter, not even a huge one', () => {
  const a = centralMoments(stopping);
  const b = centralMoments(stopping.map((v) => v * 1e120));
  expect(b?.m4).toBeCloseTo(a?.m4 as number, 13);
});

test('degenerate: equal scores have no unit of their own', () => {
  expect(centralMoments(Float64Array.of(0.1, 0.1, 0.1))).toBe(null);
});

test('refuses no scores', () => {
  expect(() => centralMoments(new Float64Array(0))).toThrow(/\*x\* must hold at least 1 score/);
});
