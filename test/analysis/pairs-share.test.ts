import { describe, expect, it } from 'vitest';
import { pairsEffect, shareOfPairs } from '../../src/analysis/pairs-share.ts';
import { betaLower } from '../../src/numerics/tails/beta.ts';
import { sleepSamples } from '../support/samples.ts';

const samples = { ...sleepSamples, x: Float64Array.of(1, 2, 3, 4), y: Float64Array.of(2, 2, 1, 9) };

describe('shareOfPairs', () => {
  it('by hand: two of four are lower and one is equal: 2.5 of 4; higher is the complement', () => {
    expect(shareOfPairs(samples, true, 'two-sided', 0.95).value).toBe(0.625);
    expect(shareOfPairs(samples, false, 'two-sided', 0.95).value).toBe(0.375);
  });

  it('theory: the limits are the Clopper-Pearson beta quantiles, 10 digits', () => {
    const [low, high] = shareOfPairs(samples, true, 'two-sided', 0.95).interval as [number, number];
    expect(betaLower(low, 2.5, 2.5)).toBeCloseTo(0.025, 10);
    expect(betaLower(high, 3.5, 1.5)).toBeCloseTo(0.975, 10);
  });

  it('degenerate: all lower: the upper limit is 1', () => {
    const all = { ...samples, y: Float64Array.of(9, 9, 9, 9) };
    expect(shareOfPairs(all, true, 'two-sided', 0.95).interval?.[1]).toBe(1);
  });

  it('by hand: the effect size is named by the direction that is better', () => {
    const context = {
      trim: 0,
      alternative: 'two-sided',
      level: 0.95,
      resamples: 99,
      seed: 1,
      unit: '',
      first: 'a',
      second: 'b',
    } as const;
    expect(pairsEffect(samples, { ...context, direction: 'lower' }).name).toBe('P(a lower) within pairs');
    expect(pairsEffect(samples, { ...context, direction: 'higher' }).name).toBe('P(a higher) within pairs');
  });
});
