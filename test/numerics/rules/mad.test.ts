import { expect, test } from 'vitest';
import { madLimits } from '../../../src/numerics/rules/mad.ts';

// Example of Leys et al. 2013 (from memory): 1, 3, 3, 6, 8, 10, 10, 1000 has median 7 and raw MAD 3.5.
const leys = Float64Array.of(1, 3, 3, 6, 8, 10, 10, 1000);

test('by hand: median 7, raw MAD 3.5, limits at 3', () => {
  const found = madLimits(leys, { cutoff: 3 });
  expect(found.center).toBe(7);
  expect(found.spread).toBeCloseTo(1.4826 * 3.5, 14);
  expect(found.lower).toBeCloseTo(7 - 3 * 1.4826 * 3.5, 12);
  expect(found.upper).toBeCloseTo(7 + 3 * 1.4826 * 3.5, 12);
});

test('agrees with R 4.2 median and mad(constant = 1.4826) on the ten drug1 differences of sleep', () => {
  // R: x <- sleep$extra[1:10]; median 0.35, mad 1.55673
  const found = madLimits(Float64Array.of(0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2), { cutoff: 1 });
  expect(found.center).toBeCloseTo(0.35, 14);
  expect(found.spread).toBeCloseTo(1.55673, 12);
});

test('theory: the factor scales the distance, not the middle', () => {
  const raw = madLimits(leys, { cutoff: 2, constant: 1 });
  expect(raw.upper).toBe(14);
  expect(raw.lower).toBe(0);
});

test('invariance: one wild score does not move the limits', () => {
  const wilder = Float64Array.from(leys, (score) => (score === 1000 ? 1e9 : score));
  expect(madLimits(wilder, { cutoff: 2.5 })).toEqual(madLimits(leys, { cutoff: 2.5 }));
});

test('degenerate: identical scores in the majority give a reason and the middle', () => {
  expect(madLimits(Float64Array.of(5, 5, 5, 9), { cutoff: 3 })).toEqual({
    lower: null,
    upper: null,
    center: 5,
    spread: 0,
    reason: 'at least half the scores are identical (MAD = 0)',
  });
  expect(madLimits(Float64Array.of(5, 5), { cutoff: 3 }).reason).toBe('all scores are equal');
  expect(madLimits(new Float64Array(0), { cutoff: 3 }).center).toBe(null);
});

test('refuses a cutoff or constant that is not above 0', () => {
  expect(() => madLimits(leys, { cutoff: -1 })).toThrow(/\*cutoff\* must be/);
  expect(() => madLimits(leys, { cutoff: 3, constant: 0 })).toThrow(/\*constant\* must be/);
});
