import { describe, expect, it } from 'vitest';
import { participantMeans, repeatedMeasuresAnova } from '../../../src/numerics/anova/repeated-measures.ts';
import { expectAll, expectClose } from './expect-close.ts';
import { orangeTrees, threeLevels } from './published-scores.ts';

describe('repeatedMeasuresAnova', () => {
  // means 2 4 6 about 4: 24 on 2 df; participants 3 (1 + 0 + 1) = 6; total 34, error 4 on 4 df: F = 12, p = 7^-2;
  // covariances 1 2 4 and 0: factor .5, so F(1, 2) = 12: p = 1 - sqrt(12/14)
  it('by hand: three participants, three levels (1e-13)', () => {
    const anova = repeatedMeasuresAnova(threeLevels);
    expectAll(anova, { F: 12, df1: 2, df2: 4, p: 1 / 49, ssEffect: 24, ssError: 4, ssSubjects: 6 }, 1e-13);
    expectAll(anova, { ggEpsilon: 0.5, hfEpsilon: 0.5, pGg: 1 - Math.sqrt(12 / 14) }, 1e-13);
    expectAll(anova, { partialEta2: 24 / 28, generalizedEta2: 24 / 34, n: 3, k: 3 }, 1e-13);
    expect(anova.mauchly!.reason).toBe('the differences between levels determine each other');
    expect([...participantMeans(threeLevels)]).toEqual([3, 4, 5]);
  });

  // R 4.2.2 aov(Error), anova.mlm(test = 'Spherical'), mauchly.test
  it('agrees with R on four ages of the orange trees (1e-11)', () => {
    const anova = repeatedMeasuresAnova(orangeTrees);
    expectAll(anova, { F: 77.21245256319533, p: 4.0974236507712504e-8, ssError: 1554.7000000000023 }, 1e-11);
    expectAll(anova, { pGg: 0.00047362733183198193, pHf: 0.0002290213586250605 }, 1e-10);
    expectClose(anova.mauchly!.W, 0.0027267207905138477, 1e-11);
  });

  // common practice: two levels give the square of the paired t; the sleep data (Student 1908): t 4.0621, p .00283289
  it('theory: two levels are the paired t test (1e-12)', () => {
    const first = Float64Array.of(0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2);
    const second = Float64Array.of(1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4);
    const anova = repeatedMeasuresAnova([first, second]);
    expectAll(anova, { F: 4.06212768338204 ** 2, p: 0.00283289019738427, pGg: 0.00283289019738427 }, 1e-11);
    expect(anova.mauchly!.reason).toBe('with two levels sphericity always holds');
  });

  it('invariance: order of levels and participants, a constant for each participant, 1e9 added (1e-6 for its digits)', () => {
    const { F, ggEpsilon } = repeatedMeasuresAnova(orangeTrees);
    const mixed = [2, 0, 3, 1].map((j) => orangeTrees[j]!.slice().reverse());
    expectAll(repeatedMeasuresAnova(mixed), { F: F!, ggEpsilon: ggEpsilon! }, 1e-11);
    const lifted = orangeTrees.map((level) => level.map((score, i) => score + 50 * i));
    expectClose(repeatedMeasuresAnova(lifted).F, F!, 1e-11);
    expectClose(repeatedMeasuresAnova(orangeTrees.map((level) => level.map((score) => score + 1e9))).F, F!, 1e-6);
  });

  it('degenerate: no participants, one, or the same differences for all', () => {
    expect(repeatedMeasuresAnova([new Float64Array(0), new Float64Array(0)]).reason).toMatch(
      '0 participants with a score',
    );
    expect(repeatedMeasuresAnova([Float64Array.of(1), Float64Array.of(2)]).reason).toMatch(
      '1 participant with a score',
    );
    const same = repeatedMeasuresAnova([Float64Array.of(0.1, 0.4), Float64Array.of(0.3, 0.6)]);
    expect([same.F, same.reason]).toEqual([null, 'differences between levels do not vary between participants']);
  });

  it('refuses one level and unequal lengths', () => {
    expect(() => repeatedMeasuresAnova(orangeTrees.slice(0, 1))).toThrow(RangeError);
    expect(() => repeatedMeasuresAnova([Float64Array.of(1, 2), Float64Array.of(1)])).toThrow(RangeError);
  });
});
