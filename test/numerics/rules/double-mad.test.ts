import { expect, test } from 'vitest';
import { doubleMadLimits } from '../../../src/numerics/rules/double-mad.ts';
import { madLimits } from '../../../src/numerics/rules/mad.ts';

test('by hand: 1, 2, 3, 7, 15 has median 3, MAD 1 below and 4 above', () => {
  const found = doubleMadLimits(Float64Array.of(15, 1, 3, 2, 7), { cutoff: 2, constant: 1 });
  expect(found).toEqual({ lower: 1, upper: 11, center: 3, spreadBelow: 1, spreadAbove: 4 });
});

test('agrees with R 4.2 medians of each side of 3, 1, 4, 1, 5, 9, 2, 6, 5, 30', () => {
  // R: m <- median(x) 4.5; median((m - x)[x <= m]) 2.5; median((x - m)[x >= m]) 1.5
  const found = doubleMadLimits(Float64Array.of(3, 1, 4, 1, 5, 9, 2, 6, 5, 30), { cutoff: 2.5 });
  expect(found.lower).toBeCloseTo(4.5 - 2.5 * 1.4826 * 2.5, 13);
  expect(found.upper).toBeCloseTo(4.5 + 2.5 * 1.4826 * 1.5, 13);
});

test('theory: symmetric scores without a score at the median get the limits of the plain rule', () => {
  const x = Float64Array.of(-7, -4, -2, -1, 1, 2, 4, 7);
  const plain = madLimits(x, { cutoff: 3 });
  const found = doubleMadLimits(x, { cutoff: 3 });
  expect(found.lower).toBeCloseTo(plain.lower as number, 13);
  expect(found.upper).toBeCloseTo(plain.upper as number, 13);
});

test('invariance: mirrored scores have mirrored limits', () => {
  const x = Float64Array.of(1, 2, 4, 8, 16, 32);
  const a = doubleMadLimits(x, { cutoff: 2 });
  const b = doubleMadLimits(
    x.map((score) => -score),
    { cutoff: 2 },
  );
  expect(b.lower).toBeCloseTo(-(a.upper as number), 13);
  expect(b.upper).toBeCloseTo(-(a.lower as number), 13);
});

test('degenerate: a side without spread has no limit, and says which', () => {
  const found = doubleMadLimits(Float64Array.of(-2, -1, 0, 0, 0, 1, 2, 3, 4), { cutoff: 2, constant: 1 });
  expect(found.lower).toBe(null);
  expect(found.upper).toBe(2);
  expect(found.reason).toBe('no spread below the median (MAD of that side = 0)');
  expect(doubleMadLimits(Float64Array.of(3, 3), { cutoff: 2 }).reason).toBe('all scores are equal');
  expect(doubleMadLimits(new Float64Array(0), { cutoff: 2 }).reason).toBe('there are no scores');
});

test('refuses a cutoff of 0', () => {
  expect(() => doubleMadLimits(Float64Array.of(1, 2), { cutoff: 0 })).toThrow(/\*cutoff\* must be/);
});
