import { describe, expect, test } from 'vitest';
import { normalRangeUpper } from '../../../src/numerics/tails/normal-range.ts';
import {
  studentizedRangeLower,
  studentizedRangeQuantile,
  studentizedRangeUpper,
} from '../../../src/numerics/tails/studentized-range.ts';
import { tTwoSided } from '../../../src/numerics/tails/t.ts';
import { expectRelative } from './expect-relative.ts';

describe('studentized range', () => {
  test('theory: two means are a t test with q = t sqrt 2, at any degrees of freedom, 1e-12', () => {
    for (const df of [0.8, 2, 13.5, 500, 1e12, Infinity]) {
      for (const q of [0.01, 1, 4, 18])
        expectRelative(studentizedRangeUpper(q, 2, df), tTwoSided(q / Math.SQRT2, df), 1e-12);
    }
  });

  // Source: common practice, printed table of 5 % points: 3 means and 10 df 3.877; 4 and 20: 3.958; 5 and infinity: 3.858.
  test('agrees with printed values, 2e-4', () => {
    expectRelative(studentizedRangeQuantile(0.95, 3, 10), 3.877, 2e-4);
    expectRelative(studentizedRangeQuantile(0.95, 4, 20), 3.958, 2e-4);
    expectRelative(studentizedRangeQuantile(0.95, 5, Infinity), 3.858, 2e-4);
  });

  test('theory: lower + upper = 1; more means make a larger range, 1e-13', () => {
    let previous = 0;
    for (const k of [2, 3, 8, 30]) {
      const upper = studentizedRangeUpper(3.3, k, 17.2);
      expect(Math.abs(studentizedRangeLower(3.3, k, 17.2) + upper - 1)).toBeLessThanOrEqual(1e-13);
      expect(upper).toBeGreaterThan(previous);
      previous = upper;
    }
  });

  test('theory: infinite degrees of freedom are the limit, 1e-9', () => {
    expectRelative(studentizedRangeUpper(4, 3, 1e11), normalRangeUpper(4, 3), 1e-9);
    expect(studentizedRangeUpper(4, 3, Infinity)).toBe(normalRangeUpper(4, 3));
  });

  test('invariance: the quantile inverts the lower tail, 1e-11', () => {
    for (const p of [0.001, 0.5, 0.99])
      expectRelative(studentizedRangeLower(studentizedRangeQuantile(p, 4, 9.5), 4, 9.5), p, 1e-11);
  });

  test('degenerate: ends', () => {
    expect([
      studentizedRangeLower(0, 3, 5),
      studentizedRangeUpper(-1, 3, 5),
      studentizedRangeUpper(Infinity, 3, 5),
    ]).toEqual([0, 1, 0]);
    expect([studentizedRangeQuantile(0, 3, 5), studentizedRangeQuantile(1, 3, 5)]).toEqual([0, Infinity]);
  });

  test('refuses wrong arguments', () => {
    expect(() => studentizedRangeLower(1, 1, 5)).toThrow('*k* must be a whole number of at least 2; got 1');
    expect(() => studentizedRangeUpper(1, 3, 0)).toThrow('*df* must be above 0; got 0');
    expect(() => studentizedRangeUpper(Number.NaN, 3, 5)).toThrow('*q* must be a number; got NaN');
    expect(() => studentizedRangeQuantile(1.5, 3, 5)).toThrow(RangeError);
  });
});
