import { expect, test } from 'vitest';
import { adjustedFences } from '../../../src/numerics/rules/adjusted-fences.ts';
import { fenceLimits } from '../../../src/numerics/rules/iqr-fences.ts';

test('by hand: 1, 2, 3, 5, 9 has hinges 2 and 5 and medcouple 1/3', () => {
  const found = adjustedFences(Float64Array.of(1, 2, 3, 5, 9));
  expect(found.lower).toBeCloseTo(2 - 1.5 * Math.exp(-4 / 3) * 3, 13);
  expect(found.upper).toBeCloseTo(5 + 1.5 * Math.exp(1) * 3, 12);
});

test('agrees with R robustbase 0.95 on the drug1 scores of sleep (case sleep/171)', () => {
  const found = adjustedFences(Float64Array.of(0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2));
  expect(found.lower).toBeCloseTo(-1.5687836085492188, 12);
  expect(found.upper).toBeCloseTo(8.384814703526702, 12);
});

test('by hand: the exponents are taken as given', () => {
  const found = adjustedFences(Float64Array.of(1, 2, 3, 5, 9), { coef: 1, shortExponent: -3.5, longExponent: 4 });
  expect(found.lower).toBeCloseTo(2 - Math.exp(-3.5 / 3) * 3, 13);
  expect(found.upper).toBeCloseTo(5 + Math.exp(4 / 3) * 3, 12);
});

test('theory: symmetric scores get the plain fences', () => {
  const x = Float64Array.of(-6, -3, -2, -1, 1, 2, 3, 6);
  const plain = fenceLimits(x, { k: 1.5, quartiles: 'tukey_hinges' });
  const found = adjustedFences(x);
  expect(found.lower).toBeCloseTo(plain.lower as number, 13);
  expect(found.upper).toBeCloseTo(plain.upper as number, 13);
});

test('invariance: mirrored scores have mirrored fences', () => {
  const x = Float64Array.of(1, 2, 4, 8, 16, 32, 64);
  const a = adjustedFences(x);
  const b = adjustedFences(x.map((score) => -score));
  expect(b.lower).toBeCloseTo(-(a.upper as number), 10);
  expect(b.upper).toBeCloseTo(-(a.lower as number), 12);
});

test('degenerate: coinciding hinges and no scores give a reason', () => {
  expect(adjustedFences(Float64Array.of(1, 4, 4, 4, 4, 4, 9))).toMatchObject({
    lower: null,
    upper: null,
    reason: 'the quartiles coincide (quartile distance = 0)',
  });
  expect(adjustedFences(new Float64Array(0)).reason).toBe('there are no scores');
});

test('refuses a coefficient of 0', () => {
  expect(() => adjustedFences(Float64Array.of(1, 2), { coef: 0 })).toThrow(/\*coef\* must be/);
});
