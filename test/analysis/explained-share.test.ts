import { describe, expect, it } from 'vitest';
import { bootstrapLayout, explainedShare } from '../../src/analysis/explained-share.ts';
import type { Layout } from '../../src/analysis/layout.ts';
import { takeLayout } from '../../src/analysis/layout.ts';
import { repeatedMeasuresAnova } from '../../src/numerics/anova/repeated-measures.ts';
import { expectedOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { everyLevel } from '../support/omnibus.ts';

const context = { trim: 0, alpha: 0.05, resamples: 999, seed: 3 };
const between = (groups: readonly (readonly number[])[]): Layout => ({
  between: [{ factor: 'g', levels: groups.map((_, i) => `g${i}`), inEffect: true }],
  within: [],
  groups: groups.map((scores, i) => ({ levels: [i], scores: [Float64Array.from(scores)] })),
  left: [],
});

describe('explainedShare', () => {
  it('by hand: means 2 and 6 with variances 1 and 1: 4 / (4 + 1)', () => {
    expect(
      explainedShare(
        between([
          [1, 2, 3],
          [5, 6, 7],
        ]),
        context,
      ).value,
    ).toBeCloseTo(0.8, 12);
  });

  it('by hand: within participants, from the sums of squares of the analysis of variance, 12 digits', () => {
    const visits = scoresOf('epilepsy_visits', { participant: 'id', within: ['visit'], outcome: 'seizures' });
    const layout = takeLayout(visits, everyLevel('visit'));
    const anova = repeatedMeasuresAnova(layout.groups[0]?.scores ?? []);
    const A = (anova.ssEffect as number) / (anova.n * anova.k);
    const E = (anova.ssError as number) / ((anova.n - 1) * (anova.k - 1));
    expect(explainedShare(layout, context).value).toBeCloseTo(A / (A + E), 12);
  });

  it('agrees with the reference case explanatory_effect_size of plant_growth: the variance of the trimmed means', () => {
    const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
    const own = expectedOf('plant_growth', 'explanatory_effect_size', { trim: 0.2, levels: undefined });
    const share = explainedShare(takeLayout(plants, everyLevel('group')), { ...context, trim: 20 }).value as number;
    // There the spread is that of the pooled scores, here the mean of the groups' own: the numerators are equal up to k.
    const numerator = ((own.xi_squared as number) * (own.rescaled_winsorized_variance as number) * 2) / 3;
    const spread = numerator / share - numerator;
    expect(spread).toBeGreaterThan(0.2);
    expect(spread).toBeLessThan(own.rescaled_winsorized_variance as number);
  });

  it('invariance: a shift, a change of unit and another order of the groups leave the share, 10 digits', () => {
    const groups = [
      [3, 8, 1, 9],
      [4, 4, 7, 12],
      [20, 3, 6, 8],
    ];
    const value = explainedShare(between(groups), { ...context, trim: 25 }).value as number;
    const moved = groups.map((scores) => scores.map((score) => -7 * score + 100));
    expect(explainedShare(between(moved), { ...context, trim: 25 }).value).toBeCloseTo(value, 10);
    expect(explainedShare(between([...groups].reverse()), { ...context, trim: 25 }).value).toBeCloseTo(value, 10);
  });

  it('theory: the same seed gives the same interval, around the share', () => {
    const layout = between([
      [3, 8, 1, 9, 5],
      [4, 4, 7, 12, 6],
      [20, 13, 16, 8, 11],
    ]);
    const one = explainedShare(layout, context);
    expect(explainedShare(layout, context)).toEqual(one);
    expect(one.interval?.[0]).toBeLessThan(one.value as number);
    expect(one.interval?.[1]).toBeGreaterThan(one.value as number);
  });

  it('degenerate: scores that do not vary give no share, no resamples no interval', () => {
    expect(
      explainedShare(
        between([
          [2, 2],
          [2, 2],
        ]),
        context,
      ),
    ).toMatchObject({ value: null, reason: 'the scores do not vary' });
    expect(
      explainedShare(
        between([
          [2, 3],
          [4, 2],
        ]),
        { ...context, resamples: 0 },
      ),
    ).toMatchObject({ interval: null });
    expect(explainedShare(between([[2], [4, 2]]), context).reason).toMatch(/fewer than 2/);
  });

  it('refuses a group without participants', () => {
    expect(bootstrapLayout(between([[], [1, 2]]), context, () => 1)).toMatchObject({ interval: null });
  });
});
