import { expect, test } from 'vitest';
import { pearsonCorrelation } from '../../../src/numerics/correlation/pearson.ts';
import { winsorizedCorrelation } from '../../../src/numerics/correlation/winsorized-correlation.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: 20 % of five pairs moves one score at each end: (2, 2, 3, 4, 4) with (2, 2, 4, 3, 4)', () => {
  const found = winsorizedCorrelation(Float64Array.of(1, 2, 3, 4, 5), Float64Array.of(2, 1, 4, 3, 5));
  // Deviations (-1, -1, 0, 1, 1) and (-1, -1, 1, 0, 1): 3 / sqrt(4 * 4).
  expect(found.r).toBeCloseTo(0.75, 15);
  expect(found.df).toBe(1);
  expect(found.t).toBeCloseTo(0.75 * Math.sqrt(3 / (1 - 0.5625)), 14);
});

test('agrees with a transcription in R 4.2: r .72671, t 2.79895, p .03804', () => {
  const found = winsorizedCorrelation(lightness, quality);
  expect(found.r).toBeCloseTo(0.7267146738039383, 13);
  expect(found.t).toBeCloseTo(2.79894589268082, 12);
  expect(found.p).toBeCloseTo(0.03804091278516133, 12);
});

test('theory: nothing winsorized is the product-moment correlation', () => {
  const plain = pearsonCorrelation(lightness, quality);
  expect(winsorizedCorrelation(lightness, quality, { trim: 0 }).p).toBeCloseTo(plain.p as number, 14);
});

test('invariance: the size of one wild score does not matter', () => {
  const wild = lightness.map((v) => (v === 60.1 ? 1e6 : v));
  expect(winsorizedCorrelation(wild, quality)).toEqual(winsorizedCorrelation(lightness, quality));
});

test('degenerate: few pairs, nothing left to vary, too few left for a test', () => {
  expect(winsorizedCorrelation(Float64Array.of(1, 2), Float64Array.of(2, 1)).reason).toBe('fewer than 3 pairs');
  const flat = winsorizedCorrelation(Float64Array.of(0, 5, 5, 5, 9), Float64Array.of(1, 2, 3, 4, 5));
  expect(flat.reason).toBe('x does not vary after winsorizing');
  const few = winsorizedCorrelation(Float64Array.of(1, 2, 3, 4), Float64Array.of(1, 3, 2, 4), { trim: 25 });
  expect(few).toMatchObject({ t: null, p: null, reason: '2 of 4 pairs left after winsorizing' });
});

test('refuses a trim of 50 and unequal lengths', () => {
  expect(() => winsorizedCorrelation(lightness, quality, { trim: 50 })).toThrow(/\*trim\* must be/);
  expect(() => winsorizedCorrelation(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
});
