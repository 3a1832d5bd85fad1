import { describe, expect, it } from 'vitest';
import { bootstrapOneSample, bootstrapPaired } from '../../src/numerics/bootstrap.ts';
import { yuenPaired } from '../../src/numerics/yuen-paired.ts';
import { close, drugOne, drugTwo, scores } from './samples.ts';

const change = drugTwo.map((hours, i) => hours - (drugOne[i] as number));

describe('bootstrap of margins', () => {
  it('by hand: the estimate is the difference of the margins', () => {
    expect(close(bootstrapPaired(drugTwo, drugOne, 'trimmed-mean', { seed: 1, B: 99 }).estimate, 5 / 3, 1e-12)).toBe(
      true,
    );
    expect(close(bootstrapPaired(drugTwo, drugOne, 'median', { seed: 1, B: 99 }).estimate, 1.4, 1e-12)).toBe(true);
  });
  it('agrees with the bootstrap of the differences for the mean, whose pairs are drawn in another order (within 3.5 SE, seed 5)', () => {
    const margins = bootstrapPaired(drugTwo, drugOne, 'mean', { seed: 5, B: 20_000 });
    const differences = bootstrapOneSample(change, 'mean', { seed: 6, B: 20_000 });
    const tolerance = 3.5 * (differences.se as number) * Math.sqrt((2 * 1.25) / 20_000);
    expect(Math.abs((margins.se as number) - (differences.se as number))).toBeLessThan(tolerance);
    expect(Math.abs((margins.interval?.[0] as number) - (differences.interval?.[0] as number))).toBeLessThan(0.05);
  });
  it('agrees exactly with the bootstrap of the differences when these are sorted by pair', () => {
    // Pairs in order of their differences: both draw the same ranks.
    const order = [...change.keys()].sort((i, j) => (change[i] as number) - (change[j] as number));
    const x = Float64Array.from(order, (i) => drugTwo[i] as number);
    const y = Float64Array.from(order, (i) => drugOne[i] as number);
    for (const method of ['percentile', 'bca', 't-symmetric', 't-equal-tailed'] as const) {
      const margins = bootstrapPaired(x, y, 'mean', { seed: 7, B: 499, method });
      const differences = bootstrapOneSample(change, 'mean', { seed: 7, B: 499, method });
      expect(close(margins.se, differences.se as number, 1e-10)).toBe(true);
      expect(close(margins.p, differences.p as number, 1e-9)).toBe(true);
      expect(close(margins.interval?.[1], differences.interval?.[1] as number, 1e-9)).toBe(true);
    }
  });
  it('theory: on the sample itself the studentized value is Yuen for pairs', () => {
    // The symmetric interval is estimate -+ critical |T| times Yuen's standard error: its half width is a multiple of it.
    const own = bootstrapPaired(drugTwo, drugOne, 'trimmed-mean', { seed: 8, B: 999, method: 't-symmetric' });
    const yuen = yuenPaired(drugTwo, drugOne);
    const half = ((own.interval?.[1] as number) - (own.interval?.[0] as number)) / 2;
    const critical = half / (yuen.se as number);
    expect(critical > 2 && critical < 12).toBe(true);
    expect(close(own.estimate, yuen.estimate as number, 1e-12)).toBe(true);
  });
  it('invariance: exchange of the conditions turns the result (same draws)', () => {
    const one = bootstrapPaired(drugTwo, drugOne, 'mom', { seed: 3, B: 499 });
    const turned = bootstrapPaired(drugOne, drugTwo, 'mom', { seed: 3, B: 499 });
    expect(close(turned.interval?.[0], -(one.interval?.[1] as number), 1e-10)).toBe(true);
    expect([close(turned.se, one.se as number, 1e-12), turned.p]).toEqual([true, one.p]);
  });
  it('degenerate: a constant shift, one pair, a statistic without a standard error', () => {
    const moved = drugOne.map((x) => x + 1);
    expect(bootstrapPaired(moved, drugOne, 'mean', { seed: 1, B: 99, method: 't-symmetric' }).reason).toBe(
      'the scores have no spread left',
    );
    expect(bootstrapPaired(scores(1), scores(2), 'mean', { seed: 1 }).reason).toBe('a condition has only one score');
    expect(bootstrapPaired(drugOne, drugTwo, 'median', { seed: 1, method: 't-symmetric' }).reason).toBe(
      'the bootstrap-t needs a standard error of the estimate',
    );
  });
  it('refuses unequal lengths', () => {
    expect(() => bootstrapPaired(drugOne, scores(1), 'mean', { seed: 1 })).toThrow('*y* must be as long');
  });
});
