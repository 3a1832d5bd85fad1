import { expect, test } from 'vitest';
import { biweightMidcorrelation } from '../../../src/numerics/correlation/biweight-midcorrelation.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: -1, 0, 1 with itself shifted in order', () => {
  // MAD 1, u = -1/9, 0, 1/9: weights equal for both ends, so r = sum ab / sum a^2 = -1/2 of (-1, 0, 1) with (0, 1, -1).
  expect(biweightMidcorrelation(Float64Array.of(-1, 0, 1), Float64Array.of(0, 1, -1)).r).toBeCloseTo(-0.5, 15);
});

test('agrees with a transcription in R 4.2: .7112857', () => {
  expect(biweightMidcorrelation(lightness, quality).r).toBeCloseTo(0.7112856659440984, 13);
});

test('theory: identical vectors correlate 1', () => {
  expect(biweightMidcorrelation(quality, quality).r).toBeCloseTo(1, 14);
});

test('invariance: units do not matter, and a score beyond nine MADs does not count', () => {
  const plain = biweightMidcorrelation(lightness, quality).r as number;
  expect(
    biweightMidcorrelation(
      lightness.map((v) => 5 - 2 * v),
      quality,
    ).r,
  ).toBeCloseTo(-plain, 12);
  const far = (size: number) =>
    biweightMidcorrelation(
      lightness.map((v) => (v === 60.1 ? size : v)),
      quality,
    ).r;
  expect(far(1e4)).toBe(far(1e8));
});

test('degenerate: a MAD of 0 and one pair', () => {
  const found = biweightMidcorrelation(Float64Array.of(1, 1, 1, 5), Float64Array.of(1, 2, 3, 4));
  expect(found.reason).toBe('at least half the scores of x are identical (MAD = 0)');
  expect(biweightMidcorrelation(Float64Array.of(1), Float64Array.of(1)).reason).toBe('fewer than 2 pairs');
});

test('refuses a c of 0', () => {
  expect(() => biweightMidcorrelation(lightness, quality, { c: 0 })).toThrow(/\*c\* must be/);
});
