import { expect, test } from 'vitest';
import { repeatedMedians } from '../../../src/numerics/regression/repeated-medians.ts';
import { lightness, quality } from '../correlation/tuna.ts';

test('by hand: (0, 0), (1, 2), (2, 3), (3, 30): medians 2, 2, 1.5, 14, slope 2', () => {
  const found = repeatedMedians(Float64Array.of(0, 1, 2, 3), Float64Array.of(0, 2, 3, 30));
  expect(found.slope).toBe(2);
  // y - 2x: 0, 0, -1, 24.
  expect(found.intercept).toBe(0);
});

test('agrees with R 4.2 medians of medians: .18465, -5.23680', () => {
  const found = repeatedMedians(lightness, quality);
  expect(found.slope).toBeCloseTo(0.1846491228070176, 13);
  expect(found.intercept).toBeCloseTo(-5.236798245614035, 12);
});

test('theory: four of nine points moved anywhere leave the line of the other five', () => {
  const x = Float64Array.of(1, 2, 3, 4, 5, 6, 7, 8, 9);
  const y = Float64Array.of(2, 4, 6, 8, 10, 1000, -900, 50, 7000);
  expect(repeatedMedians(x, y).slope).toBeCloseTo(2, 12);
});

test('invariance: adding a line adds its slope', () => {
  const tilted = repeatedMedians(
    lightness,
    quality.map((v, i) => v - 3 * (lightness[i] as number)),
  );
  expect(tilted.slope).toBeCloseTo((repeatedMedians(lightness, quality).slope as number) - 3, 12);
});

test('degenerate: x that does not vary', () => {
  expect(repeatedMedians(Float64Array.of(1, 1), Float64Array.of(1, 2)).reason).toBe('x does not vary');
  expect(repeatedMedians(new Float64Array(0), new Float64Array(0)).slope).toBe(null);
});

test('refuses unequal lengths', () => {
  expect(() => repeatedMedians(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
});
