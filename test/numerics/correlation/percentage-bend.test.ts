import { expect, test } from 'vitest';
import { percentageBendCorrelation } from '../../../src/numerics/correlation/percentage-bend.ts';
import { lightness, quality } from './tuna.ts';

test('by hand: 1..5 bend at omega 2 and phi 3: A = -1, -.5, 0, .5, 1', () => {
  const found = percentageBendCorrelation(Float64Array.of(1, 2, 3, 4, 5), Float64Array.of(2, 1, 4, 3, 5));
  // floor(.8 * 5 + .5) = 4: omega = 2 for both; A = (-1, -.5, 0, .5, 1), B = (-.5, -1, .5, 0, 1): 2 / 2.5.
  expect(found.r).toBeCloseTo(0.8, 15);
  expect(found.df).toBe(3);
});

test('agrees with a transcription in R 4.2 of Wilcox 1994: .7556884', () => {
  expect(percentageBendCorrelation(lightness, quality).r).toBeCloseTo(0.7556884183899295, 13);
});

test('theory: identical vectors correlate 1', () => {
  const same = percentageBendCorrelation(quality, quality);
  expect(same.r).toBeCloseTo(1, 14);
  expect(same).toMatchObject({ t: null, p: 0 });
});

test('invariance: units and the size of one wild score do not matter', () => {
  const plain = percentageBendCorrelation(lightness, quality).r as number;
  expect(
    percentageBendCorrelation(
      lightness.map((v) => 3 * v - 9),
      quality,
    ).r,
  ).toBeCloseTo(plain, 12);
  const wild = lightness.map((v) => (v === 60.1 ? 1e6 : v));
  expect(percentageBendCorrelation(wild, quality).r).toBeCloseTo(plain, 12);
});

test('degenerate: few pairs, and a bend distance of 0 (case anscombe/080)', () => {
  expect(percentageBendCorrelation(Float64Array.of(1, 2), Float64Array.of(2, 1)).reason).toBe('fewer than 3 pairs');
  const x = Float64Array.of(8, 8, 8, 8, 8, 8, 8, 19, 8, 8, 8);
  const y = Float64Array.from({ length: 11 }, (_, i) => i);
  expect(percentageBendCorrelation(x, y)).toMatchObject({
    r: null,
    reason: expect.stringContaining('bend distance = 0'),
  });
});

test('refuses a beta of 0 and unequal lengths', () => {
  expect(() => percentageBendCorrelation(lightness, quality, { beta: 0 })).toThrow(/\*beta\* must be/);
  expect(() => percentageBendCorrelation(lightness, Float64Array.of(1))).toThrow(/must be as long as/);
});
