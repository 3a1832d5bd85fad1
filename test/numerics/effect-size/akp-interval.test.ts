import { describe, expect, it } from 'vitest';
import { percentileInference } from '../../../src/numerics/bootstrap-limits.ts';
import { akpInterval, akpIntervalPaired } from '../../../src/numerics/effect-size/akp-interval.ts';
import { akpRobustD, akpRobustDPaired } from '../../../src/numerics/effect-size/akp-robust-d.ts';
import { sorted } from '../../../src/numerics/order.ts';
import { resample } from '../../../src/numerics/resample.ts';
import { close, darwin, scores, soybean, sunflower } from '../samples.ts';

function drawn(s: Float64Array, counts: Int32Array): Float64Array {
  const out = Float64Array.from([...counts].flatMap((times, i) => Array(times).fill(s[i]) as number[]));
  counts.fill(0);
  return out;
}

describe('interval of the robust standardized difference', () => {
  it('agrees with computing it anew in every resample (rtol 1e-10, seed 4)', () => {
    const [s, t] = [sorted(sunflower), sorted(soybean)];
    const values = new Float64Array(399);
    resample([s.length, t.length], 399, 4, ([a, b], i) => {
      values[i] = akpRobustD(drawn(s, a as Int32Array), drawn(t, b as Int32Array)).value as number;
    });
    const plain = percentileInference(values, 0, 0.95, 'two-sided').interval;
    const own = akpInterval(sunflower, soybean, { seed: 4, B: 399 }).interval;
    expect(close(own?.[0], plain?.[0] as number, 1e-10) && close(own?.[1], plain?.[1] as number, 1e-10)).toBe(true);
  });
  it('by hand: the value is the plain one', () => {
    expect(akpInterval(sunflower, soybean, { seed: 1, B: 99 }).value).toBe(akpRobustD(sunflower, soybean).value);
    expect(akpIntervalPaired(darwin, { seed: 1, B: 99 }).value).toBe(akpRobustDPaired(darwin).value);
  });
  it('theory: the limits hold the value; one direction, one limit', () => {
    const own = akpIntervalPaired(darwin, { seed: 2, B: 999 });
    const [low, high] = own.interval as [number, number];
    expect(low < (own.value as number) && (own.value as number) < high).toBe(true);
    expect(akpIntervalPaired(darwin, { seed: 2, B: 999, alternative: 'greater' }).interval?.[1]).toBe(null);
  });
  it('invariance: unit and offset', () => {
    const own = akpInterval(sunflower, soybean, { seed: 3, B: 299 }).interval;
    const moved = akpInterval(
      sunflower.map((x) => 4 * x + 64),
      soybean.map((x) => 4 * x + 64),
      { seed: 3, B: 299 },
    ).interval;
    expect(close(moved?.[0], own?.[0] as number, 1e-10)).toBe(true);
  });
  it('degenerate: no spread in the scores or in some resample', () => {
    const flat = scores(1, 5, 5, 5, 9);
    expect(akpInterval(flat, flat, { seed: 1 }).interval).toBe(null);
    expect(akpIntervalPaired(scores(1, 2, 3), { seed: 1, trim: 0, B: 500 })).toMatchObject({
      interval: null,
      reason: 'some resamples have no spread',
    });
    expect(akpIntervalPaired(darwin, { seed: 1, B: 9 }).reason).toBe('too few resamples for this level');
  });
  it('refuses no scores and odd seeds', () => {
    expect(() => akpIntervalPaired(scores(), { seed: 1 })).toThrow(RangeError);
    expect(() => akpInterval(sunflower, soybean, { seed: -1 })).toThrow('*seed* must be');
  });
});
