import { describe, expect, it } from 'vitest';
import {
  acceleration,
  bcaInference,
  bootstrapTInference,
  percentileInference,
} from '../../src/numerics/bootstrap-limits.ts';
import { close, scores, uneven } from './samples.ts';

const hundred = Float64Array.from({ length: 99 }, (_, i) => i + 1);

describe('limits from bootstrap values', () => {
  it('by hand: 99 values, 90 %: the 5th from each end; p = 2 (b + 1) / 100', () => {
    const own = percentileInference(hundred, 3, 0.9, 'two-sided');
    // Below 3 lie two values, one is equal: b = 2.5
    expect(own).toEqual({ p: 0.07, interval: [5, 95] });
    expect(percentileInference(hundred, 3, 0.95, 'greater')).toEqual({ p: 0.035, interval: [5, null] });
    expect(percentileInference(hundred, 97, 0.95, 'less')).toEqual({ p: 0.035, interval: [null, 95] });
  });
  it('by hand: (B + 1) alpha / 2 of 1,999 and 599 values is 50 and 15 in spite of rounding', () => {
    const first = (B: number) =>
      percentileInference(
        Float64Array.from({ length: B }, (_, i) => i + 1),
        0,
        0.95,
        'two-sided',
      ).interval?.[0];
    expect([first(1999), first(599)]).toEqual([50, 15]);
  });
  it('by hand: symmetric and equal-tailed bootstrap-t of 19 values, 90 %', () => {
    const ts = Float64Array.from({ length: 19 }, (_, i) => i - 8);
    // |T| sorted: 0 1 1 ... 8 8 9 10; the 18th is 9
    expect(bootstrapTInference(ts, 100, 2, 82, 0.9, 'two-sided', 'symmetric')).toEqual({
      p: 3 / 20,
      interval: [82, 118],
    });
    // T from -8 to 10: lower limit from the largest T, upper from the smallest
    expect(bootstrapTInference(ts, 100, 2, 80, 0.9, 'two-sided', 'equal-tailed')).toEqual({
      p: 0.2,
      interval: [80, 116],
    });
    expect(bootstrapTInference(ts, 100, 2, 80, 0.95, 'greater', 'equal-tailed')).toEqual({
      p: 0.1,
      interval: [80, null],
    });
    expect(bootstrapTInference(ts, 100, 2, 80, 0.95, 'less', 'equal-tailed')).toEqual({ p: 1, interval: [null, 116] });
  });
  it('by hand: acceleration of 1, 1, -2 is -6 / (6 * 6^1.5)', () => {
    expect(close(acceleration(scores(1, 1, -2)), -6 / (6 * 6 ** 1.5), 1e-13)).toBe(true);
    expect(close(acceleration(scores(1e-200, 1e-200, -2e-200)), -6 / (6 * 6 ** 1.5), 1e-13)).toBe(true);
  });
  it('agrees with percentile where nothing has to be corrected: z0 = a = 0', () => {
    const values = Float64Array.from({ length: 1000 }, (_, i) => i - 499.5);
    const plain = percentileInference(values, -450.2, 0.9, 'two-sided');
    const own = bcaInference(values, 0, 0, -450.2, 0.9, 'two-sided');
    expect(own.interval).toEqual(plain.interval);
    expect(close(own.p, plain.p as number, 1e-9)).toBe(true);
  });
  it('by hand: BCa levels with z0 = Phi^-1(.6), a = .05, 90 %', () => {
    const values = Float64Array.from({ length: 9999 }, (_, i) => i + 1);
    // z0 = .2533471, z = -+1.6448536: Phi(z0 + (z0 + z)/(1 - a(z0 + z))) = .14614 and .98853 (from memory of the formula)
    const z0 = 0.2533471031357997;
    const level = (z: number) => z0 + (z0 + z) / (1 - 0.05 * (z0 + z));
    const phi = (z: number) => {
      // Trapezoid over the density: independent of the tail functions, good to 1e-6.
      let total = 0;
      const step = (z + 9) / 20_000;
      for (let i = 0; i <= 20_000; i++) total += (i % 20_000 === 0 ? 0.5 : 1) * Math.exp(-((-9 + i * step) ** 2) / 2);
      return (total * step) / Math.sqrt(2 * Math.PI);
    };
    const own = bcaInference(values, 6000.4, 0.05, 0, 0.9, 'two-sided').interval as [number, number];
    expect(Math.abs(own[0] - 10_000 * phi(level(-1.6448536)))).toBeLessThan(2);
    expect(Math.abs(own[1] - 10_000 * phi(level(1.6448536)))).toBeLessThan(2);
  });
  it('theory: p <= alpha exactly when the null value lies outside (percentile, both bootstrap-t, BCa)', () => {
    const values = uneven(199).map((v, i) => v + i / 7);
    for (let nullValue = -2; nullValue < 90; nullValue += 0.37) {
      for (const alternative of ['two-sided', 'greater', 'less'] as const) {
        const all = [
          percentileInference(values, nullValue, 0.9, alternative),
          bootstrapTInference(
            values.map((v) => (v - 40) / 20),
            40,
            3,
            nullValue,
            0.9,
            alternative,
            'equal-tailed',
          ),
          bootstrapTInference(
            values.map((v) => (v - 40) / 20),
            40,
            3,
            nullValue,
            0.9,
            alternative,
            'symmetric',
          ),
        ];
        for (const { p, interval } of all) {
          const [low, high] = interval as [number | null, number | null];
          const outside = (low !== null && nullValue < low) || (high !== null && nullValue > high);
          expect(outside).toBe((p as number) <= 0.1 + 1e-12);
        }
      }
    }
  });
  it('invariance: order of the values', () => {
    const values = uneven(99);
    expect(percentileInference(values.toReversed(), 3, 0.9, 'two-sided')).toEqual(
      percentileInference(values, 3, 0.9, 'two-sided'),
    );
  });
  it('degenerate: too few values, all on one side, infinite studentized values, no spread of influences', () => {
    expect(percentileInference(scores(1, 2, 3), 0, 0.95, 'two-sided')).toEqual({
      p: 0.5,
      interval: null,
      reason: 'too few resamples for this level',
    });
    expect(bcaInference(scores(1, 2, 3), 0, 0, 0, 0.95, 'two-sided').reason).toBe(
      'all resamples lie on one side of the estimate',
    );
    const ts = Float64Array.from({ length: 19 }, (_, i) => (i > 15 ? Infinity : i));
    expect(bootstrapTInference(ts, 0, 1, 0, 0.9, 'two-sided', 'symmetric').reason).toBe(
      'too many resamples have no spread',
    );
    expect(bootstrapTInference(scores(1, 2), 0, 1, 0, 0.9, 'two-sided', 'symmetric').interval).toBe(null);
    expect(acceleration(scores(0, 0))).toBe(0);
  });
  it('degenerate: BCa p is never below what the resamples can tell', () => {
    const values = Float64Array.from({ length: 999 }, (_, i) => 10 + Math.sin(i));
    expect(bcaInference(values, 10.001, 0.1, 0, 0.95, 'two-sided').p).toBe(0.002);
  });
  it('refuses levels outside 0 to 1', () => {
    expect(() => percentileInference(hundred, 0, 1, 'two-sided')).toThrow('*level* must be');
  });
});
