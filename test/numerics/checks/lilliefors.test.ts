import { expect, test } from 'vitest';
import { lillieforsTest } from '../../../src/numerics/checks/lilliefors.ts';
import { normalLower, normalQuantile } from '../../../src/numerics/tails/normal.ts';
import { stopping } from './stopping.ts';

test('by hand: -1, -1, 1, 1 in SD of sqrt(4/3): gap 1/2 - F(-sqrt(3/4)) below', () => {
  const found = lillieforsTest(Float64Array.of(-1, -1, 1, 1));
  expect(found.d).toBeCloseTo(0.5 - normalLower(-Math.sqrt(0.75)), 14);
});

test('agrees with R 4.2: D = .1267522 of the stopping distances, and the formula of Dallal & Wilkinson', () => {
  const found = lillieforsTest(stopping);
  expect(found.d).toBeCloseTo(0.1267522327042616, 13);
  const d = 0.1267522327042616;
  const n = 50 + 2.78019;
  const log = -7.01256 * d * d * n + 2.99587 * d * Math.sqrt(n) - 0.122119 + 0.974598 / Math.sqrt(50) + 1.67997 / 50;
  expect(found.pFormula).toBeCloseTo(Math.exp(log), 12);
});

test('theory: where the formula holds it lies near the simulated table', () => {
  const found = lillieforsTest(stopping);
  expect(Math.abs((found.pFormula as number) - (found.pTable as number))).toBeLessThan(0.004);
  expect(found.p).toBe(found.pTable);
});

test('invariance: unit and mirror do not matter', () => {
  expect(lillieforsTest(stopping.map((v) => 7 - 3 * v)).d).toBeCloseTo(0.1267522327042616, 12);
});

test('degenerate: few and equal scores give a reason; far out p comes from the formula', () => {
  expect(lillieforsTest(Float64Array.of(1, 2, 3)).reason).toBe('fewer than 4 scores');
  expect(lillieforsTest(new Float64Array(6)).reason).toBe('all scores are equal');
  const far = lillieforsTest(Float64Array.from({ length: 60 }, (_, i) => (i < 50 ? i / 1000 : 100)));
  expect(far.pTable).toBe(0.001);
  expect(far.p).toBe(far.pFormula);
  expect(far.p).toBeLessThan(1e-6);
  const near = lillieforsTest(Float64Array.from({ length: 40 }, (_, i) => normalQuantile((i + 0.5) / 40)));
  expect(near).toMatchObject({ p: 0.99, pFormula: null });
});

test('refuses NaN', () => {
  expect(() => lillieforsTest(Float64Array.of(1, Number.NaN, 2, 3))).toThrow(/\*x\* must hold finite/);
});
