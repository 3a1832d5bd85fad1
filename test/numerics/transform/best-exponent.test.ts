import { expect, test } from 'vitest';
import { bestExponent, normalLogLikelihood } from '../../../src/numerics/transform/best-exponent.ts';

const parabola = (top: number) => ({
  logLikelihood: (l: number) => 3 - (l - top) ** 2,
  score: (l: number) => -2 * (l - top),
});

test('by hand: parabolas with their tops on and between grid points', () => {
  for (const top of [-7.125, -1, 0, 0.4, 1, 12.3]) {
    const found = bestExponent(parabola(top));
    expect(found.lambda).toBeCloseTo(top, 12);
    expect(found.logLikelihood).toBeCloseTo(3, 12);
  }
});

test('by hand: 1, 3 has mean squared deviation 1, so log likelihood 0', () => {
  expect(normalLogLikelihood(Float64Array.of(1, 3)) + 0).toBe(0);
});

test('agrees with the closed form -n/2 log(mean squared deviation)', () => {
  expect(normalLogLikelihood(Float64Array.of(2, 4, 9))).toBeCloseTo(-1.5 * Math.log(26 / 3), 14);
});

test('theory: a steeper likelihood has the same top', () => {
  const steep = { logLikelihood: (l: number) => -9 * (l - 2.2) ** 2, score: (l: number) => -18 * (l - 2.2) };
  expect(bestExponent(steep).lambda).toBeCloseTo(2.2, 12);
});

test('invariance: a constant added to the likelihood moves only its value', () => {
  const { logLikelihood, score } = parabola(0.7);
  const found = bestExponent({ logLikelihood: (l) => logLikelihood(l) + 100, score });
  expect(found.lambda).toBeCloseTo(0.7, 12);
  expect(found.logLikelihood).toBeCloseTo(103, 11);
});

test('degenerate: a likelihood that only rises has no top; powers out of range count as unlikely', () => {
  expect(bestExponent({ logLikelihood: (l) => l, score: () => 1 }).reason).toContain('no exponent between');
  expect(normalLogLikelihood(Float64Array.of(1, Number.POSITIVE_INFINITY))).toBe(Number.NEGATIVE_INFINITY);
  expect(normalLogLikelihood(Float64Array.of(2, 2))).toBe(Number.NEGATIVE_INFINITY);
});

test('refuses no scores', () => {
  expect(() => normalLogLikelihood(new Float64Array(0))).toThrow(/at least 1 score/);
});
