import { expect } from 'vitest';

/** Fails unless actual lies within tolerance * |expected| of expected. */
export function expectRelative(actual: number, expected: number, tolerance: number): void {
  const error = expected === 0 ? Math.abs(actual) : Math.abs(actual - expected) / Math.abs(expected);
  expect(error, `${actual} against ${expected}`).toBeLessThanOrEqual(tolerance);
}
