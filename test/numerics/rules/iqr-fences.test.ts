import { expect, test } from 'vitest';
import { fenceLimits } from '../../../src/numerics/rules/iqr-fences.ts';
import { flagOutside } from '../../../src/numerics/rules/limits.ts';

const x = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 30);

test('by hand: the quartiles of 1..8, 30 by three definitions', () => {
  expect(fenceLimits(x, { k: 1.5, quartiles: 'tukey_hinges' }).quartiles).toEqual([3, 7]);
  expect(fenceLimits(x, { k: 1.5, quartiles: 'type7' }).quartiles).toEqual([3, 7]);
  expect(fenceLimits(x, { k: 1.5, quartiles: 'type6' }).quartiles).toEqual([2.5, 7.5]);
  expect(fenceLimits(x, { k: 1.5, quartiles: 'type6' })).toMatchObject({ lower: -5, upper: 15, center: 5, spread: 5 });
});

test('agrees with R 4.2 quantile(type = 7) on the sleep differences: -0.025 and 3.4 (case sleep)', () => {
  const sleep = Float64Array.of(
    0.7,
    -1.6,
    -0.2,
    -1.2,
    -0.1,
    3.4,
    3.7,
    0.8,
    0,
    2,
    1.9,
    0.8,
    1.1,
    0.1,
    -0.1,
    4.4,
    5.5,
    1.6,
    4.6,
    3.4,
  );
  const [q1, q3] = fenceLimits(sleep, { k: 1.5, quartiles: 'type7' }).quartiles as [number, number];
  expect(q1).toBeCloseTo(-0.025, 14);
  expect(q3).toBeCloseTo(3.4, 14);
});

test('theory: the definition of the quartiles decides whom it flags (PlantGrowth trt1, Dobson 1983)', () => {
  const trt1 = Float64Array.of(4.81, 4.17, 4.41, 3.59, 5.87, 3.83, 6.03, 4.89, 4.32, 4.69);
  const flagged = (quartiles: 'type7' | 'tukey_hinges') =>
    flagOutside(trt1, fenceLimits(trt1, { k: 1.5, quartiles })).reduce((a, b) => a + b, 0);
  expect(flagged('tukey_hinges')).toBe(1);
  expect(flagged('type7')).toBe(2);
});

test('invariance: fences move with the unit', () => {
  const a = fenceLimits(x, { k: 2.2, quartiles: 'type6' });
  const b = fenceLimits(
    x.map((score) => 4 - 2 * score),
    { k: 2.2, quartiles: 'type6' },
  );
  expect(b.lower).toBeCloseTo(4 - 2 * (a.upper as number), 12);
  expect(b.upper).toBeCloseTo(4 - 2 * (a.lower as number), 12);
});

test('degenerate: coinciding quartiles give a reason', () => {
  const tied = Float64Array.of(1, 4, 4, 4, 4, 4, 9);
  expect(fenceLimits(tied, { k: 1.5, quartiles: 'type7' })).toMatchObject({
    lower: null,
    upper: null,
    center: 4,
    reason: 'the quartiles coincide (quartile distance = 0)',
  });
  expect(fenceLimits(Float64Array.of(4), { k: 1.5, quartiles: 'type6' }).reason).toBe('one score has no spread');
  expect(fenceLimits(new Float64Array(0), { k: 1.5, quartiles: 'type6' }).quartiles).toBe(null);
});

test('refuses an unknown definition and a k of 0', () => {
  expect(() => fenceLimits(x, { k: 1.5, quartiles: 'type5' as 'type6' })).toThrow(/\*quartiles\* must be/);
  expect(() => fenceLimits(x, { k: 0, quartiles: 'type6' })).toThrow(/\*k\* must be/);
});
