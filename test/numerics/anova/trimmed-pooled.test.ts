import { describe, expect, it } from 'vitest';
import { oneWayAnova } from '../../../src/numerics/anova/one-way.ts';
import { trimmedPooledAnova } from '../../../src/numerics/anova/trimmed-pooled.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { plantGrowth } from './published-scores.ts';

const trimmed = [0, 3, 6].map((add) => Float64Array.of(add + 4, add, add + 6, add + 30, add + 5));

describe('trimmedPooledAnova', () => {
  // each keeps 4 5 6 (+ 0, 3, 6): between 3 * 18 / 2 = 27, within 12 / 6 = 2; p = (1 + 2F/6)^-3
  it('by hand: three of five at 20 % (1e-14)', () => {
    expectAll(trimmedPooledAnova(trimmed), { F: 13.5, df1: 2, df2: 6, p: 5.5 ** -3 }, 1e-14);
  });

  // statsmodels 0.13.5 anova_oneway(use_var='equal', trim_frac=0.2)
  it('agrees with statsmodels on PlantGrowth (1e-12)', () => {
    expectAll(trimmedPooledAnova(plantGrowth), { F: 7.044825945413899, df2: 15, p: 0.006960581318858774 }, 1e-12);
  });

  it('theory: nothing trimmed is the ordinary analysis of variance (1e-13)', () => {
    const { F, p } = oneWayAnova(plantGrowth);
    expectAll(trimmedPooledAnova(plantGrowth, { trim: 0 }), { F: F!, p: p! }, 1e-13);
  });

  it('invariance: order of conditions and reflection (1e-12)', () => {
    const { F } = trimmedPooledAnova(plantGrowth);
    expectClose(trimmedPooledAnova([...plantGrowth].reverse()).F, F!, 1e-13);
    expectClose(trimmedPooledAnova(plantGrowth.map((scores) => scores.map((score) => -score))).F, F!, 1e-12);
  });

  it('degenerate: equal scores after winsorizing', () => {
    const flat = [Float64Array.of(1, 3, 3, 3, 9), Float64Array.of(2, 2, 2, 2, 7)];
    expect(trimmedPooledAnova(flat).reason).toBe('winsorized scores do not vary within conditions');
    expect(trimmedPooledAnova([Float64Array.of(1), Float64Array.of(2, 3)]).p).toBeNull();
  });

  it('refuses a trim that is no whole percentage', () => {
    expect(() => trimmedPooledAnova(trimmed, { trim: 12.5 })).toThrow(RangeError);
  });
});
