import { describe, expect, it } from 'vitest';
import { leveneTest } from '../../src/numerics/levene.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { plantGrowth } from './anova/published-scores.ts';

const two = [Float64Array.of(1, 2, 6), Float64Array.of(1, 5, 9)];

describe('leveneTest', () => {
  // distances from the medians 1 0 4 and 4 0 4: means 5/3, 8/3; between 1.5, within 174/9 on 4 df: F = 9/29
  it('by hand: about the median (1e-14)', () => {
    // p by R 4.2: pf(9/29, 1, 4, lower = FALSE)
    expectAll(leveneTest(two), { F: 9 / 29, df1: 1, df2: 4, p: 0.607167577712837 }, 1e-13);
  });

  // R 4.2.2 anova(lm) on |y - centre|
  it('agrees with R on PlantGrowth about mean, median and 20 % trimmed mean (1e-12)', () => {
    expectAll(leveneTest(plantGrowth, { center: 'mean' }), { F: 1.2369629544697838, p: 0.30619492299144746 }, 1e-12);
    expectAll(leveneTest(plantGrowth), { F: 1.1191856948703902, p: 0.34122662412547383 }, 1e-12);
    expectClose(leveneTest(plantGrowth, { center: 'trimmed', trim: 20 }).F, 1.2371695210880385, 1e-12);
  });

  it('theory: a trimmed mean that trims nothing is the mean, one that trims all but the middle the median (1e-13)', () => {
    const mean = leveneTest(plantGrowth, { center: 'mean' });
    expectClose(leveneTest(plantGrowth, { center: 'trimmed', trim: 0 }).F, mean.F!, 1e-13);
    expectClose(leveneTest(plantGrowth, { center: 'trimmed', trim: 40 }).F, leveneTest(plantGrowth).F!, 1e-12);
  });

  it('invariance: a shift of one condition and a reflection change nothing (1e-12)', () => {
    const shifted = plantGrowth.map((scores, j) => scores.map((score) => 10 * j - score));
    expectClose(leveneTest(shifted).F, leveneTest(plantGrowth).F!, 1e-12);
  });

  it('degenerate: distances that do not vary', () => {
    const pairs = [Float64Array.of(1, 3), Float64Array.of(2, 8)];
    expect(leveneTest(pairs).reason).toBe('distances from the centre do not vary within conditions');
    expect(leveneTest([Float64Array.of(1), Float64Array.of(2)]).reason).toBe('no condition holds two scores');
    expect(leveneTest([Float64Array.of(1, 2), new Float64Array(0)]).F).toBeNull();
  });

  it('refuses one condition and a trim out of range', () => {
    expect(() => leveneTest(two.slice(0, 1))).toThrow(RangeError);
    expect(() => leveneTest(two, { center: 'trimmed', trim: -1 })).toThrow(RangeError);
  });
});
