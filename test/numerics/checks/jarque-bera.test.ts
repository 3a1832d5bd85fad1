import { expect, test } from 'vitest';
import { jarqueBera } from '../../../src/numerics/checks/jarque-bera.ts';
import { stopping } from './stopping.ts';

test('by hand: -1, -1, 1, 1 has g1 = 0, g2 = -2: JB = 4/6', () => {
  expect(jarqueBera(Float64Array.of(-1, -1, 1, 1)).jb).toBeCloseTo(2 / 3, 14);
});

test('agrees with SciPy 1.10 jarque_bera', () => {
  const found = jarqueBera(stopping);
  expect(found.jb).toBeCloseTo(5.230489737002813, 12);
  expect(found.p).toBeCloseTo(0.07314987440262562, 13);
});

test('theory: p is exp(-JB / 2)', () => {
  const found = jarqueBera(stopping);
  expect(found.p).toBeCloseTo(Math.exp(-(found.jb as number) / 2), 14);
});

test('invariance: unit and mirror do not matter', () => {
  expect(jarqueBera(stopping.map((v) => 7 - 3 * v)).jb).toBeCloseTo(5.230489737002813, 11);
});

test('degenerate: few and equal scores give a reason', () => {
  expect(jarqueBera(Float64Array.of(1, 2)).reason).toBe('fewer than 3 scores');
  expect(jarqueBera(Float64Array.of(2, 2, 2)).reason).toBe('all scores are equal');
});

test('refuses NaN', () => {
  expect(() => jarqueBera(Float64Array.of(1, Number.NaN))).toThrow(/\*x\* must hold finite/);
});
