import { describe, expect, test } from 'vitest';
import {
  kolmogorovLimitLower,
  kolmogorovLimitUpper,
  kolmogorovOneSampleLower,
  kolmogorovTwoSampleLower,
  kolmogorovTwoSampleUpper,
} from '../../../src/numerics/tails/kolmogorov.ts';
import { expectRelative } from './expect-relative.ts';

describe('Kolmogorov limit', () => {
  // Source: common practice, the 5 % and 1 % points 1.3581 and 1.6276.
  test('agrees with printed values, 1e-4', () => {
    expectRelative(kolmogorovLimitUpper(1.3581), 0.05, 1e-4);
    expectRelative(kolmogorovLimitUpper(1.6276), 0.01, 3e-4);
  });

  test('theory: both series give one function around the switch, 1e-13', () => {
    for (const x of [0.5, 0.999999999, 1, 1.000000001, 2])
      expect(Math.abs(kolmogorovLimitLower(x) + kolmogorovLimitUpper(x) - 1)).toBeLessThanOrEqual(2.3e-16);
    expectRelative(kolmogorovLimitUpper(1 - 1e-15), kolmogorovLimitUpper(1), 1e-13);
  });

  test('degenerate: ends', () => {
    expect([
      kolmogorovLimitLower(0),
      kolmogorovLimitUpper(-1),
      kolmogorovLimitLower(Infinity),
      kolmogorovLimitUpper(Infinity),
    ]).toEqual([0, 1, 1, 0]);
    expect(kolmogorovLimitLower(1e-5)).toBe(0);
  });

  test('refuses NaN', () => {
    expect(() => kolmogorovLimitLower(Number.NaN)).toThrow('*x* must be a number; got NaN');
    expect(() => kolmogorovLimitUpper(Number.NaN)).toThrow(RangeError);
  });

  test('theory: the one-sample distribution tends to it, 2e-2', () => {
    expectRelative(kolmogorovOneSampleLower(1 / Math.sqrt(900), 900), kolmogorovLimitLower(1), 2e-2);
  });
});

describe('Kolmogorov two-sample', () => {
  test('by hand: of the six paths of 2 + 2 two reach distance 1 and all reach one half, 1e-15', () => {
    expectRelative(kolmogorovTwoSampleUpper(1, 2, 2), 2 / 6, 1e-15);
    expectRelative(kolmogorovTwoSampleLower(1, 2, 2), 4 / 6, 1e-15);
    expect([kolmogorovTwoSampleLower(0.5, 2, 2), kolmogorovTwoSampleUpper(0.5, 2, 2)]).toEqual([0, 1]);
  });

  test('theory: separated samples have probability 2 over all splits, 1e-13', () => {
    expectRelative(kolmogorovTwoSampleUpper(1, 20, 20), 2 / 137846528820, 1e-13);
  });

  test('theory: lower + upper = 1 and the samples are interchangeable, 1e-14', () => {
    for (const d of [0.2, 0.35, 1 / 3, 0.7]) {
      expect(Math.abs(kolmogorovTwoSampleLower(d, 9, 15) + kolmogorovTwoSampleUpper(d, 9, 15) - 1)).toBeLessThanOrEqual(
        1e-14,
      );
      expectRelative(kolmogorovTwoSampleUpper(d, 9, 15), kolmogorovTwoSampleUpper(d, 15, 9), 1e-14);
    }
  });

  test('invariance: a distance that was rounded still counts as reached', () => {
    expect(kolmogorovTwoSampleUpper(0.1 + 0.2, 10, 10)).toBe(kolmogorovTwoSampleUpper(0.3, 10, 10));
  });

  test('degenerate: ends', () => {
    expect([kolmogorovTwoSampleLower(0, 3, 4), kolmogorovTwoSampleUpper(-1, 3, 4)]).toEqual([0, 1]);
    expect([kolmogorovTwoSampleLower(1.1, 3, 4), kolmogorovTwoSampleUpper(1.1, 3, 4)]).toEqual([1, 0]);
  });

  test('refuses wrong arguments', () => {
    expect(() => kolmogorovTwoSampleLower(0.5, 0, 2)).toThrow('*n1* must be a whole number of at least 1; got 0');
    expect(() => kolmogorovTwoSampleUpper(Number.NaN, 2, 2)).toThrow('*d*');
    expect(() => kolmogorovTwoSampleUpper(0.5, 1e5, 1e5)).toThrow('*n1 n2*');
  });
});
