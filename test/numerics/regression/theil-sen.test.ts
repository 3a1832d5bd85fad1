import { expect, test } from 'vitest';
import { theilSen } from '../../../src/numerics/regression/theil-sen.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: (0, 0), (1, 2), (2, 3), (3, 30) has slopes 1, 1.5, 2, 10, 14, 27', () => {
  const found = theilSen(Float64Array.of(0, 1, 2, 3), Float64Array.of(0, 2, 3, 30));
  expect(found.slope).toBe(6);
  expect(found.intercept).toBe(2.5 - 6 * 1.5);
});

test('agrees with R 4.2 on all 36 slopes: .12935, ranks 9 and 28 for the interval', () => {
  const found = theilSen(lightness, quality);
  expect(found.slope).toBeCloseTo(0.1293478260869566, 13);
  expect(found.intercept).toBeCloseTo(-2.246521739130437, 12);
  expect(found.interval?.[0]).toBeCloseTo(-0.07692307692307716, 13);
  expect(found.interval?.[1]).toBeCloseTo(0.3068181818181817, 13);
});

test('theory: points on a line give that line', () => {
  const x = Float64Array.of(1, 5, 2, 8, 4, 4);
  const found = theilSen(
    x,
    x.map((v) => 2 * v - 3),
  );
  expect(found.slope).toBe(2);
  expect(found.intercept).toBe(-3);
});

test('invariance: adding a line adds its slope', () => {
  const tilted = theilSen(
    lightness,
    quality.map((v, i) => v + 2 * (lightness[i] as number)),
  );
  expect(tilted.slope).toBeCloseTo((theilSen(lightness, quality).slope as number) + 2, 12);
});

test('degenerate: x that does not vary, and no points', () => {
  expect(theilSen(Float64Array.of(1, 1), Float64Array.of(1, 2)).reason).toBe('x does not vary');
  expect(theilSen(new Float64Array(0), new Float64Array(0)).slope).toBe(null);
});

test('refuses a level of 0 and unequal lengths', () => {
  expect(() => theilSen(lightness, quality, { level: 0 })).toThrow(/\*level\* must be/);
  expect(() => theilSen(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
});
