import { describe, expect, it } from 'vitest';
import { welchT } from '../../src/numerics/welch.ts';
import { yuenPooled, yuenWelch } from '../../src/numerics/yuen.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('Yuen', () => {
  it('by hand: 1..5 against 2, 4, 6, 8, 10 at 20 %', () => {
    // Winsorized sums of squares 4 and 16, h = 3: d = 4/6 and 16/6, df = (20/6)^2 / ((16 + 256)/36/2)
    const test = yuenWelch(scores(1, 2, 3, 4, 5), scores(2, 4, 6, 8, 10));
    expect([test.trimmedMeans, test.h, test.g]).toEqual([
      [3, 6],
      [3, 3],
      [1, 1],
    ]);
    expect(close(test.se, Math.sqrt(20 / 6), 1e-13) && close(test.df, 400 / 136, 1e-13)).toBe(true);
    const pooled = yuenPooled(scores(1, 2, 3, 4, 5), scores(2, 4, 6, 8, 10));
    expect(close(pooled.se, Math.sqrt((20 / 4) * (2 / 3)), 1e-13)).toBe(true);
    expect(pooled.df).toBe(4);
  });
  it('agrees with SciPy 1.10 ttest_ind(trim=.2), separate and pooled (rtol 1e-11)', () => {
    const test = yuenWelch(sunflower, soybean);
    expect(close(test.t, 4.2023834066173675, 1e-12) && close(test.p, 0.0010955292014562816, 1e-11)).toBe(true);
    const pooled = yuenPooled(sunflower, soybean);
    expect(close(pooled.t, 3.8712383282628133, 1e-12) && close(pooled.p, 0.001353356877900001, 1e-11)).toBe(true);
  });
  it('agrees with the published formulas written out: limits 38.699 and 121.051 (methods 3.1; absolute 5e-4)', () => {
    const [low, high] = yuenWelch(sunflower, soybean).interval as [number, number];
    expect(Math.abs(low - 38.699) < 5e-4 && Math.abs(high - 121.051) < 5e-4).toBe(true);
  });
  it('theory: at 0 % it is Welch', () => {
    expect(yuenWelch(sunflower, soybean, { trim: 0 }).p).toBe(welchT(sunflower, soybean).p);
  });
  it('invariance: scores beyond the trim may lie anywhere', () => {
    const far = sunflower.map((x) => (x === 423 ? 1e9 : x));
    expect(yuenWelch(far, soybean).p).toBe(yuenWelch(sunflower, soybean).p);
  });
  it('degenerate: no spread after winsorizing, too few left', () => {
    const flat = scores(1, 5, 5, 5, 9);
    expect(yuenWelch(flat, flat).reason).toBe('all scores within each condition are equal after winsorizing');
    expect(yuenPooled(flat, flat).reason).toBe('all scores within each condition are equal after winsorizing');
    expect(yuenWelch(scores(1, 2, 3), flat, { trim: 40 }).reason).toBe(
      'a condition has fewer than two scores left after trimming',
    );
  });
  it('refuses an empty group and odd trims', () => {
    expect(() => yuenWelch(scores(), soybean)).toThrow(RangeError);
    expect(() => yuenPooled(sunflower, soybean, { trim: 20.5 })).toThrow('*trim* must be');
  });
});
