import { describe, expect, it } from 'vitest';
import { hodgesLehmannPaired, hodgesLehmannShift } from '../../src/numerics/hodges-lehmann.ts';
import { close, darwin, five, scores, six, soybean, sunflower } from './samples.ts';

describe('Hodges-Lehmann', () => {
  it('by hand: 1, 2, 4 has the averages 1, 1.5, 2, 2.5, 3, 4', () => {
    expect(hodgesLehmannPaired(scores(4, 1, 2)).estimate).toBe(2.25);
    expect(hodgesLehmannShift(scores(5, 9), scores(1, 2)).estimate).toBe(5.5);
  });
  it('agrees with R 4.2 wilcox.test(conf.int = TRUE, exact = TRUE), no ties (rtol 1e-12)', () => {
    const seven = scores(1.1, 2.3, 3.7, 4.1, 5.9, 7.2, 8.8).map((x) => x - 3.05);
    const one = hodgesLehmannPaired(seven);
    expect(close(one.estimate, 1.725, 1e-12)).toBe(true);
    expect(close(one.interval?.[0], -0.75, 1e-12) && close(one.interval?.[1], 4.3, 1e-12)).toBe(true);
    const two = hodgesLehmannShift(six, five);
    expect(close(two.estimate, 1.25, 1e-12)).toBe(true);
    expect(close(two.interval?.[0], -1.8, 1e-12) && close(two.interval?.[1], 4.3, 1e-12)).toBe(true);
  });
  it('agrees with sorting all averages and differences in NumPy and R, ties included', () => {
    const one = hodgesLehmannPaired(darwin);
    // 120 Walsh averages, limits of rank 26 from either end, coverage from psignrank
    expect([one.estimate, one.interval]).toEqual([25, [4, 41.5]]);
    expect(close(one.coverage, 0.95208740234375, 1e-13)).toBe(true);
    const two = hodgesLehmannShift(sunflower, soybean);
    expect([two.estimate, two.interval]).toEqual([81.5, [47, 127]]);
    expect(close(two.coverage, 0.95364610621576562, 1e-12)).toBe(true);
  });
  it('theory: a one-sided interval at level 1 - a is one end of the two-sided at 1 - 2a', () => {
    const both = hodgesLehmannPaired(darwin, { level: 0.9 });
    expect(hodgesLehmannPaired(darwin, { alternative: 'greater' }).interval).toEqual([both.interval?.[0], null]);
    expect(hodgesLehmannPaired(darwin, { alternative: 'less' }).interval).toEqual([null, both.interval?.[1]]);
  });
  it('theory: beyond the size cap the normal ranks give nearly the level', () => {
    const many = Float64Array.from({ length: 400 }, (_, i) => Math.sin(i * i));
    const own = hodgesLehmannPaired(many);
    expect(own.how).toBe('normal');
    expect(Math.abs((own.coverage as number) - 0.95)).toBeLessThan(0.001);
  });
  it('invariance: sign, exchange of groups, unit', () => {
    const one = hodgesLehmannPaired(darwin);
    const turned = hodgesLehmannPaired(darwin.map((x) => -x));
    expect([turned.estimate, turned.interval]).toEqual([-25, [-41.5, -4]]);
    expect(hodgesLehmannShift(soybean, sunflower).interval).toEqual([-127, -47]);
    expect(hodgesLehmannPaired(darwin.map((x) => x * 8)).estimate).toBe(one.estimate * 8);
  });
  it('degenerate: the full range when the level cannot be reached, none for one score', () => {
    const few = hodgesLehmannPaired(scores(1, 2, 3));
    expect(few.interval).toEqual([1, 3]);
    expect(close(few.coverage, 0.75, 1e-13)).toBe(true);
    expect(hodgesLehmannPaired(scores(4))).toMatchObject({
      estimate: 4,
      interval: null,
      reason: 'too few scores for an interval',
    });
    expect(hodgesLehmannPaired(scores(2, 2, 2, 2)).estimate).toBe(2);
  });
  it('refuses empty groups and levels outside 0 to 1', () => {
    expect(() => hodgesLehmannPaired(scores())).toThrow(RangeError);
    expect(() => hodgesLehmannShift(six, scores())).toThrow(RangeError);
    expect(() => hodgesLehmannPaired(darwin, { level: 0 })).toThrow('*level* must be');
  });
});
