import { expect, test } from 'vitest';
import { andersonDarling } from '../../../src/numerics/checks/anderson-darling.ts';
import { normalLower, normalQuantile } from '../../../src/numerics/tails/normal.ts';
import { stopping } from './stopping.ts';

test('by hand: -1, 0, 1 has z = -1, 0, 1', () => {
  const f = normalLower(-1);
  const total = 2 * Math.log(f) + 6 * Math.log(0.5) + 10 * Math.log(1 - f);
  expect(andersonDarling(Float64Array.of(-1, 0, 1)).a2).toBeCloseTo(-3 - total / 3, 13);
});

test('agrees with SciPy 1.10 anderson: .7406694294973306', () => {
  const found = andersonDarling(stopping);
  expect(found.a2).toBeCloseTo(0.7406694294973306, 12);
  const star = 0.7406694294973306 * (1 + 0.75 / 50 + 2.25 / 2500);
  expect(found.p).toBeCloseTo(Math.exp(1.2937 - 5.709 * star + 0.0186 * star * star), 12);
});

test('theory: the p formula joins within .01 at .2, .34 and .6 and falls', () => {
  // Bend normal quantiles step by step, so that A2 runs over the joints.
  let last = 1.1;
  for (let bend = 0; bend < 1.2; bend += 0.01) {
    const z = Float64Array.from({ length: 40 }, (_, i) => normalQuantile((i + 0.5) / 40));
    const found = andersonDarling(z.map((v) => v + bend * v * v));
    if (found.p === null) break;
    expect(found.p).toBeLessThan(last + 0.01);
    last = found.p;
  }
  expect(last).toBeLessThan(0.001);
});

test('invariance: unit and mirror do not matter', () => {
  expect(andersonDarling(stopping.map((v) => 7 - 3 * v)).a2).toBeCloseTo(0.7406694294973306, 11);
});

test('degenerate: few and equal scores give a reason; far from normal p is withheld, A2 stays finite', () => {
  expect(andersonDarling(Float64Array.of(1, 2)).reason).toBe('fewer than 3 scores');
  expect(andersonDarling(Float64Array.of(2, 2, 2)).reason).toBe('all scores are equal');
  const spike = Float64Array.from({ length: 2000 }, (_, i) => (i === 0 ? 1e6 : i % 7));
  const found = andersonDarling(spike);
  expect(Number.isFinite(found.a2)).toBe(true);
  expect(found).toMatchObject({ p: null, reason: expect.stringContaining('too far from normal') });
});

test('refuses NaN', () => {
  expect(() => andersonDarling(Float64Array.of(1, Number.NaN, 2))).toThrow(/\*x\* must hold finite/);
});
