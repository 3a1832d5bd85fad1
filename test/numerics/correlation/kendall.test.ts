import { expect, test } from 'vitest';
import { concordance, kendallTau } from '../../../src/numerics/correlation/kendall.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: 1, 2, 3 against 1, 3, 2 has two concordant pairs and one discordant', () => {
  expect(concordance(Float64Array.of(1, 2, 3), Float64Array.of(1, 3, 2))).toBe(1);
  expect(kendallTau(Float64Array.of(1, 2, 3), Float64Array.of(1, 3, 2)).tau).toBeCloseTo(1 / 3, 15);
});

test('agrees with R 4.2 cor.test: tau .4444, exact p .1194, z 1.6681', () => {
  const exact = kendallTau(lightness, quality, { method: 'exact' });
  expect(exact.tau).toBeCloseTo(4 / 9, 14);
  expect(exact.p).toBeCloseTo(0.1194389329805996, 12);
  const normal = kendallTau(lightness, quality);
  expect(normal.z).toBeCloseTo(1.668115312456599, 12);
  expect(normal.p).toBeCloseTo(0.09529283802345655, 12);
});

test('agrees with R 4.2 cor.test with ties in both vectors', () => {
  const found = kendallTau(Float64Array.of(1, 2, 2, 3, 4, 4, 4, 5), Float64Array.of(2, 1, 3, 3, 5, 4, 6, 6));
  expect(found.tau).toBeCloseTo(0.8006407690254358, 13);
  expect(found.z).toBeCloseTo(2.604829614054488, 12);
  expect(found.p).toBeCloseTo(0.009191995862593743, 13);
});

test('theory: complete agreement of 5 pairs has exact p 2 / 5!', () => {
  const x = Float64Array.of(1, 2, 3, 4, 5);
  expect(kendallTau(x, x, { method: 'exact' }).p).toBeCloseTo(2 / 120, 15);
  expect(kendallTau(x, x, { method: 'exact', alternative: 'less' }).p).toBeCloseTo(1, 14);
  const against = kendallTau(x, Float64Array.of(5, 4, 3, 2, 1), { method: 'exact', alternative: 'greater' });
  expect(against.p).toBe(1);
});

test('invariance: the order of the pairs does not matter', () => {
  const plain = kendallTau(lightness, quality);
  expect(kendallTau(lightness.slice().reverse(), quality.slice().reverse())).toEqual(plain);
});

test('degenerate: few pairs, a flat vector, ties with the exact p', () => {
  expect(kendallTau(Float64Array.of(1), Float64Array.of(1)).reason).toBe('fewer than 2 pairs');
  expect(kendallTau(Float64Array.of(1, 2, 3), Float64Array.of(4, 4, 4)).reason).toBe('y does not vary');
  expect(kendallTau(Float64Array.of(1, 1, 2), Float64Array.of(4, 5, 6), { method: 'exact' }).p).toBe(null);
  const many = Float64Array.from({ length: 1001 }, (_, i) => i);
  expect(kendallTau(many, many, { method: 'exact' }).reason).toBe('no exact p beyond 1000 pairs');
});

test('refuses NaN and unequal lengths', () => {
  expect(() => kendallTau(Float64Array.of(1, Number.NaN), Float64Array.of(1, 2))).toThrow(/\*x\* must hold/);
  expect(() => kendallTau(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
});
