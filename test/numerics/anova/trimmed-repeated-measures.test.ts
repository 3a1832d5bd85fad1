import { describe, expect, it } from 'vitest';
import { repeatedMeasuresAnova } from '../../../src/numerics/anova/repeated-measures.ts';
import { trimmedRepeatedMeasuresAnova } from '../../../src/numerics/anova/trimmed-repeated-measures.ts';
import { expectAll } from './expect-close.ts';
import { orangeTrees } from './published-scores.ts';

describe('trimmedRepeatedMeasuresAnova', () => {
  // 0 4 5 6 30 winsorizes to 4 4 5 6 6, 8 7 6 5 4 to 7 7 6 5 5: differences 3 3 1 -1 -1, squares 16, halved 8 over h - 1 = 2;
  // trimmed means 5 and 6: 3 (1/4 + 1/4) = 1.5; F = 1.5 / 4 on 1 and 2 df: p = 1 - sqrt(F / (F + 2))
  it('by hand: five participants, two levels, 20 % (1e-14)', () => {
    const anova = trimmedRepeatedMeasuresAnova([Float64Array.of(0, 4, 5, 6, 30), Float64Array.of(8, 7, 6, 5, 4)]);
    expectAll(anova, { F: 0.375, df1: 1, df2: 2, p: 1 - Math.sqrt(0.375 / 2.375), n: 5, h: 3 }, 1e-14);
    expect([...anova.trimmedMeans!]).toEqual([5, 6]);
  });

  // formula written out in R and in Python (test/reference/cases, orange_trees: ages 118, 484, 664)
  it('agrees with R and Python on three ages of the orange trees (1e-11)', () => {
    const anova = trimmedRepeatedMeasuresAnova(orangeTrees.slice(0, 3), { trim: 20 });
    expectAll(anova, { F: 25.721930336641364, df1: 1.1106805687647767, df2: 2.2213611375295534 }, 1e-11);
    expectAll(
      anova,
      { epsilonHat: 0.5271689628150085, epsilonTilde: 0.5553402843823884, p: 0.02940420103283044 },
      1e-11,
    );
  });

  it("theory: nothing trimmed is the ordinary F with Huynh and Feldt's factor (1e-12)", () => {
    const plain = repeatedMeasuresAnova(orangeTrees);
    const anova = trimmedRepeatedMeasuresAnova(orangeTrees, { trim: 0 });
    expectAll(anova, { F: plain.F!, epsilonTilde: plain.hfEpsilon!, p: plain.pHf! }, 1e-12);
  });

  it('invariance: order of levels, reflection (1e-11)', () => {
    const base = trimmedRepeatedMeasuresAnova(orangeTrees);
    const turned = trimmedRepeatedMeasuresAnova(
      [...orangeTrees].reverse().map((level) => level.map((score) => -score)),
    );
    expectAll(turned, { F: base.F!, df1: base.df1!, p: base.p! }, 1e-11);
  });

  it('degenerate: too few kept, no spread, too few participants for the factor', () => {
    const two = [Float64Array.of(1, 2), Float64Array.of(5, 3), Float64Array.of(2, 9)];
    expect(trimmedRepeatedMeasuresAnova([Float64Array.of(1), Float64Array.of(2)]).reason).toMatch('fewer than 2');
    expect(trimmedRepeatedMeasuresAnova(two).reason).toBe('too few participants to estimate the sphericity factor');
    const flat = trimmedRepeatedMeasuresAnova([Float64Array.of(1, 1, 1, 1, 7), Float64Array.of(2, 2, 2, 2, 2)]);
    expect([flat.F, flat.reason]).toEqual([null, 'winsorized differences between levels do not vary']);
  });

  it('refuses half or more trimmed', () => {
    expect(() => trimmedRepeatedMeasuresAnova(orangeTrees, { trim: 50 })).toThrow(RangeError);
  });
});
