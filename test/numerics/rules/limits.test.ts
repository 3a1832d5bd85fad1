import { expect, test } from 'vitest';
import {
  flagOutside,
  limitsAround,
  noLimits,
  requirePositive,
  zeroSpreadReason,
} from '../../../src/numerics/rules/limits.ts';

const x = Float64Array.of(1, 2, 3, 4, 10);

test('by hand: strictly outside is flagged, exactly on a limit is kept', () => {
  expect([...flagOutside(x, { lower: 2, upper: 4 })]).toEqual([1, 0, 0, 0, 1]);
});

test('by hand: one side only, and a null limit flags nothing', () => {
  expect([...flagOutside(x, { lower: 2, upper: 4 }, 'above')]).toEqual([0, 0, 0, 0, 1]);
  expect([...flagOutside(x, { lower: 2, upper: 4 }, 'below')]).toEqual([1, 0, 0, 0, 0]);
  expect([...flagOutside(x, noLimits('none'))]).toEqual([0, 0, 0, 0, 0]);
});

test('by hand: limits around a middle', () => {
  expect(limitsAround(x, 3, 2, 1.5, 'none')).toEqual({ lower: 0, upper: 6, center: 3, spread: 2 });
});

test('theory: both sides together flag what each flags alone', () => {
  const limits = { lower: 2.5, upper: 3.5 };
  const above = flagOutside(x, limits, 'above');
  const below = flagOutside(x, limits, 'below');
  expect([...flagOutside(x, limits)]).toEqual([...above].map((mark, i) => mark + (below[i] as number)));
});

test('invariance: the scores are left as they were', () => {
  const copy = x.slice();
  flagOutside(x, { lower: 2, upper: 4 });
  expect([...x]).toEqual([...copy]);
});

test('degenerate: a spread of rounding size counts as none, with a reason', () => {
  const same = Float64Array.of(0.1 + 0.2, 0.3, 0.3);
  expect(limitsAround(same, 0.3, 5e-17, 3, 'MAD = 0')).toEqual({
    lower: null,
    upper: null,
    center: 0.3,
    spread: 0,
    reason: 'MAD = 0',
  });
  expect(zeroSpreadReason(Float64Array.of(4), 'x')).toBe('one score has no spread');
  expect(zeroSpreadReason(Float64Array.of(4, 4), 'x')).toBe('all scores are equal');
  expect(zeroSpreadReason(Float64Array.of(4, 4, 5), 'x')).toBe('x');
});

test('refuses NaN scores and numbers that are not above 0', () => {
  expect(() => flagOutside(Float64Array.of(1, Number.NaN), { lower: 0, upper: 1 })).toThrow(/\*x\* must hold finite/);
  for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
    expect(() => requirePositive(bad, 'cutoff')).toThrow(/\*cutoff\* must be a finite number above 0/);
  }
});
