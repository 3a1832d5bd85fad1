import { expect, test } from 'vitest';
import { flagOutside } from '../../../src/numerics/rules/limits.ts';
import { largestZ, zScoreLimits } from '../../../src/numerics/rules/z-score.ts';

test('by hand: 2, 4, 4, 4, 5, 5, 7, 9 has mean 5 and SD sqrt(32/7)', () => {
  const found = zScoreLimits(Float64Array.of(2, 4, 4, 4, 5, 5, 7, 9), { cutoff: 2 });
  expect(found.center).toBe(5);
  expect(found.spread).toBeCloseTo(Math.sqrt(32 / 7), 14);
  expect(found.lower).toBeCloseTo(5 - 2 * Math.sqrt(32 / 7), 13);
  expect(found.upper).toBeCloseTo(5 + 2 * Math.sqrt(32 / 7), 13);
});

test('agrees with R 4.2 mean and sd on ozone of May 1973 (case airquality, first five)', () => {
  // R: mean(c(41,36,12,18,28)) = 27, sd = 12.08304597359457
  const found = zScoreLimits(Float64Array.of(41, 36, 12, 18, 28), { cutoff: 1 });
  expect(found.upper).toBeCloseTo(39.08304597359457, 12);
});

test('theory: no score of ten can lie beyond 3 SD, one of eleven can (Shiffler 1988)', () => {
  expect(largestZ(10)).toBeCloseTo(9 / Math.sqrt(10), 15);
  const spike = (n: number) => Float64Array.from({ length: n }, (_, i) => (i === 0 ? 1000 : 0));
  const flagged = (n: number) => flagOutside(spike(n), zScoreLimits(spike(n), { cutoff: 3 }))[0];
  expect(flagged(10)).toBe(0);
  expect(flagged(11)).toBe(1);
  expect(largestZ(1)).toBe(0);
});

test('invariance: limits move with the unit', () => {
  const x = Float64Array.of(3, 1, 4, 1, 5, 9, 2, 6);
  const a = zScoreLimits(x, { cutoff: 2.5 });
  const b = zScoreLimits(
    x.map((score) => 10 + 3 * score),
    { cutoff: 2.5 },
  );
  expect(b.lower).toBeCloseTo(10 + 3 * (a.lower as number), 11);
  expect(b.upper).toBeCloseTo(10 + 3 * (a.upper as number), 11);
});

test('degenerate: no, one and equal scores give a reason', () => {
  expect(zScoreLimits(new Float64Array(0), { cutoff: 2 }).reason).toBe('there are no scores');
  expect(zScoreLimits(Float64Array.of(5), { cutoff: 2 })).toMatchObject({
    lower: null,
    reason: 'one score has no spread',
  });
  expect(zScoreLimits(Float64Array.of(0.1, 0.1, 0.1), { cutoff: 2 })).toMatchObject({
    lower: null,
    upper: null,
    center: 0.1,
    reason: 'all scores are equal',
  });
});

test('refuses a cutoff of 0 and NaN scores', () => {
  expect(() => zScoreLimits(Float64Array.of(1, 2), { cutoff: 0 })).toThrow(/\*cutoff\* must be/);
  expect(() => zScoreLimits(Float64Array.of(1, Number.NaN), { cutoff: 2 })).toThrow(/\*x\* must hold finite/);
  expect(() => largestZ(0)).toThrow(/\*n\* must be a whole number/);
});
