import { expect, test } from 'vitest';
import { spearmanCorrelation } from '../../../src/numerics/correlation/spearman.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: ranks 1, 2, 3 against 1, 3, 2 have S = 2 and rho = 1/2', () => {
  const found = spearmanCorrelation(Float64Array.of(10, 20, 30), Float64Array.of(1, 9, 4));
  expect(found.s).toBe(2);
  expect(found.rho).toBeCloseTo(0.5, 15);
});

test('agrees with R 4.2 cor.test: S = 48, rho = .6, exact p .0967978, t p .0876228', () => {
  const exact = spearmanCorrelation(lightness, quality, { method: 'exact' });
  expect(exact.s).toBe(48);
  expect(exact.rho).toBeCloseTo(0.6, 14);
  expect(exact.p).toBeCloseTo(0.09679783950617284, 12);
  expect(exact.pHow).toBe('counted');
  expect(spearmanCorrelation(lightness, quality).p).toBeCloseTo(0.08762282904140234, 12);
});

test('theory: complete agreement of 6 pairs has exact p 2 / 6!', () => {
  const x = Float64Array.of(1, 2, 3, 4, 5, 6);
  expect(spearmanCorrelation(x, x, { method: 'exact' }).p).toBeCloseTo(2 / 720, 15);
  expect(spearmanCorrelation(x, x, { method: 'exact', alternative: 'greater' }).p).toBeCloseTo(1 / 720, 15);
  expect(spearmanCorrelation(x, x, { method: 'exact', alternative: 'less' }).p).toBeCloseTo(1, 14);
});

test('agrees with R 4.2 cor.test(exact = TRUE) beyond 9 pairs, where both use the Edgeworth series', () => {
  // Set 1 of Anscombe 1973: rho .8181818, p .0037344705533185604.
  const x = Float64Array.of(10, 8, 13, 9, 11, 14, 6, 4, 12, 7, 5);
  const y = Float64Array.of(8.04, 6.95, 7.58, 8.81, 8.33, 9.96, 7.24, 4.26, 10.84, 4.82, 5.68);
  const found = spearmanCorrelation(x, y, { method: 'exact' });
  expect(found.pHow).toBe('series');
  expect(found.p).toBeCloseTo(0.00373447055331856, 12);
});

test('invariance: any increasing transformation leaves rho and p', () => {
  const plain = spearmanCorrelation(lightness, quality);
  expect(
    spearmanCorrelation(
      lightness.map(Math.log),
      quality.map((v) => v ** 3),
    ),
  ).toEqual(plain);
});

test('degenerate: few pairs, a flat vector, ties with the exact p', () => {
  expect(spearmanCorrelation(Float64Array.of(1, 2), Float64Array.of(2, 1)).reason).toBe('fewer than 3 pairs');
  expect(spearmanCorrelation(Float64Array.of(1, 2, 3), Float64Array.of(4, 4, 4)).reason).toBe('y does not vary');
  const tied = spearmanCorrelation(Float64Array.of(1, 2, 2), Float64Array.of(1, 2, 3), { method: 'exact' });
  expect(tied).toMatchObject({ p: null, reason: 'no exact p with ties' });
});

test('refuses NaN and unequal lengths', () => {
  expect(() => spearmanCorrelation(Float64Array.of(1, Number.NaN), Float64Array.of(1, 2))).toThrow(/\*x\* must hold/);
  expect(() => spearmanCorrelation(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
});
