import { expect, test } from 'vitest';
import {
  correlationTest,
  fisherInterval,
  noCorrelation,
  productMoment,
} from '../../../src/numerics/correlation/correlation-test.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: r of (1, 2, 3) with (1, 3, 2) is 1/2', () => {
  expect(productMoment(Float64Array.of(1, 2, 3), Float64Array.of(1, 3, 2)).r).toBeCloseTo(0.5, 15);
});

test('agrees with R 4.2 cor.test: t and p of r = .5711815575638287 with 9 pairs', () => {
  const found = correlationTest(0.5711815575638287, 9, 7);
  expect(found.t).toBeCloseTo(1.841082638115338, 12);
  expect(found.p).toBeCloseTo(0.1081730543494938, 12);
  const [low, high] = fisherInterval(0.5711815575638287, 9);
  expect(low).toBeCloseTo(-0.1497426330367572, 12);
  expect(high).toBeCloseTo(0.8955794618387393, 12);
});

test('theory: one-sided p values add up to 1, the two-sided is twice the smaller', () => {
  const up = correlationTest(0.4, 12, 10, 'greater').p as number;
  const down = correlationTest(0.4, 12, 10, 'less').p as number;
  expect(up + down).toBeCloseTo(1, 14);
  expect(correlationTest(0.4, 12, 10).p).toBeCloseTo(2 * up, 14);
});

test('invariance: r keeps its digits far from zero', () => {
  const shifted = productMoment(
    lightness.map((v) => v * 8 + 2 ** 30),
    quality,
  );
  expect(shifted.r).toBeCloseTo(productMoment(lightness, quality).r as number, 9);
});

test('degenerate: a flat vector is named, |r| = 1 has a limit p and no t', () => {
  expect(productMoment(lightness, new Float64Array(9).fill(0.1))).toEqual({ r: null, flat: 'y' });
  expect(correlationTest(1, 6, 4)).toMatchObject({ t: null, p: 0, reason: expect.stringContaining('on a line') });
  expect(correlationTest(-1, 6, 4, 'greater').p).toBe(1);
  expect(noCorrelation(2, 'few')).toEqual({ r: null, n: 2, t: null, df: null, p: null, reason: 'few' });
});

test('refuses unequal lengths and a wrong level', () => {
  expect(() => productMoment(lightness, Float64Array.of(1, 2))).toThrow(/must be as long as/);
  expect(() => fisherInterval(0.3, 9, { level: 1 })).toThrow(/\*level\* must be between 0 and 1/);
});
