import { expect, test } from 'vitest';
import { dagostinoK2 } from '../../../src/numerics/checks/dagostino-k2.ts';
import { stopping } from './stopping.ts';

test('by hand: K2 is the sum of the two squared z scores', () => {
  expect(dagostinoK2(stopping).k2).toBeCloseTo(2.312812786045302 ** 2 + 0.7974337620915266 ** 2, 11);
});

test('agrees with SciPy 1.10 normaltest', () => {
  const found = dagostinoK2(stopping);
  expect(found.k2).toBeCloseTo(5.985003588218076, 11);
  expect(found.p).toBeCloseTo(0.05016178515335476, 12);
});

test('theory: p is exp(-K2 / 2), chi-square on two degrees of freedom', () => {
  const found = dagostinoK2(stopping);
  expect(found.p).toBeCloseTo(Math.exp(-(found.k2 as number) / 2), 14);
});

test('invariance: unit and mirror do not matter', () => {
  expect(dagostinoK2(stopping.map((v) => 7 - 3 * v)).k2).toBeCloseTo(5.985003588218076, 10);
});

test('degenerate: few and equal scores give a reason', () => {
  expect(dagostinoK2(Float64Array.of(1, 2, 4, 8, 9, 11, 2))).toMatchObject({
    k2: null,
    reason: 'fewer than 8 scores: no test',
  });
  expect(dagostinoK2(new Float64Array(9)).reason).toBe('all scores are equal');
});

test('refuses NaN', () => {
  expect(() => dagostinoK2(Float64Array.of(1, Number.NaN))).toThrow(/\*x\* must hold finite/);
});
