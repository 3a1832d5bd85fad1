import { expect, test } from 'vitest';
import { pearsonCorrelation } from '../../../src/numerics/correlation/pearson.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: r of (1, 2, 3, 4) with (2, 1, 4, 3) is .6, t = .6 sqrt(2 / .64)', () => {
  const found = pearsonCorrelation(Float64Array.of(1, 2, 3, 4), Float64Array.of(2, 1, 4, 3));
  expect(found.r).toBeCloseTo(0.6, 15);
  expect(found.t).toBeCloseTo(0.6 * Math.sqrt(2 / 0.64), 14);
});

test('agrees with R 4.2 cor.test', () => {
  const found = pearsonCorrelation(lightness, quality);
  expect(found.r).toBeCloseTo(0.5711815575638287, 13);
  expect(found.p).toBeCloseTo(0.1081730543494938, 12);
  expect(found.interval?.[0]).toBeCloseTo(-0.1497426330367572, 12);
  expect(found.interval?.[1]).toBeCloseTo(0.8955794618387393, 12);
  const greater = pearsonCorrelation(lightness, quality, { alternative: 'greater' });
  expect(greater.p).toBeCloseTo(0.05408652717474689, 12);
  expect(greater.interval?.[0]).toBeCloseTo(-0.02223022750451164, 12);
  expect(greater.interval?.[1]).toBe(null);
});

test('theory: a higher level gives a wider interval around r', () => {
  const [a, b] = pearsonCorrelation(lightness, quality, { level: 0.8 }).interval as [number, number];
  const [c, d] = pearsonCorrelation(lightness, quality, { level: 0.99 }).interval as [number, number];
  expect(c).toBeLessThan(a);
  expect(d).toBeGreaterThan(b);
});

test('invariance: exchanging the vectors changes nothing, mirroring one the sign', () => {
  const plain = pearsonCorrelation(lightness, quality);
  expect(pearsonCorrelation(quality, lightness).r).toBeCloseTo(plain.r as number, 14);
  expect(
    pearsonCorrelation(
      lightness.map((v) => -v),
      quality,
    ).r,
  ).toBeCloseTo(-(plain.r as number), 14);
});

test('degenerate: few pairs, a flat vector and points on a line', () => {
  expect(pearsonCorrelation(Float64Array.of(1, 2), Float64Array.of(2, 1)).reason).toBe('fewer than 3 pairs');
  expect(pearsonCorrelation(Float64Array.of(1, 1, 1), Float64Array.of(1, 2, 3)).reason).toBe('x does not vary');
  const three = pearsonCorrelation(Float64Array.of(1, 2, 3), Float64Array.of(1, 3, 2));
  expect(three).toMatchObject({ interval: null, reason: 'fewer than 4 pairs: no interval' });
  const line = pearsonCorrelation(Float64Array.of(1, 2, 3, 4), Float64Array.of(2, 4, 6, 8));
  expect(line).toMatchObject({ r: 1, t: null, p: 0, interval: null });
});

test('refuses NaN, unequal lengths and a level of 0', () => {
  expect(() => pearsonCorrelation(Float64Array.of(1, Number.NaN, 2), Float64Array.of(1, 2, 3))).toThrow(
    /\*x\* must hold/,
  );
  expect(() => pearsonCorrelation(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
  expect(() => pearsonCorrelation(lightness, quality, { level: 0 })).toThrow(/\*level\* must be/);
});
