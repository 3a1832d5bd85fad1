import { describe, expect, it } from 'vitest';
import { influenceChecks } from '../../src/analysis/checks-influence.ts';
import { type CheckLayout, takeCheckLayout } from '../../src/analysis/checks-layout.ts';
import { differencesOf, residualsOf } from '../../src/analysis/checks-residuals.ts';
import { regressionInfluence } from '../../src/numerics/regression/influence.ts';
import { welchT } from '../../src/numerics/welch.ts';
import { layoutOf, plantLayout, plantScores, sleepLayout, visitLayout } from '../support/check-layouts.ts';

const influence = (layout: CheckLayout) => influenceChecks(layout, residualsOf(layout));

describe('influenceChecks', () => {
  it('agrees with the regression on group indicators: Cook\u2019s distances of plant_growth, rtol 1e-12', () => {
    const indicators = [1, 2].map((code) => Float64Array.from(plantLayout.group, (own) => (own === code ? 1 : 0)));
    const { cooksDistance } = regressionInfluence(plantLayout.values, indicators);
    for (const [who, cook] of influence(plantLayout).cooks.entries())
      expect((cook as number) / (cooksDistance[who] as number)).toBeCloseTo(1, 12);
  });

  it('agrees with the regression of the differences on nothing: Cook\u2019s distances of sleep, rtol 1e-12', () => {
    const { cooksDistance } = regressionInfluence(differencesOf(sleepLayout), []);
    for (const [who, cook] of influence(sleepLayout).cooks.entries())
      expect(Math.abs((cook as number) - (cooksDistance[who] as number))).toBeLessThan(1e-12);
  });

  it('by hand: sleep without patient 9, whose difference is 4.6: \u22121.58 becomes \u22121.244', () => {
    const { estimate, se, largest } = influence(sleepLayout);
    expect(estimate).toBeCloseTo(-1.58, 12);
    const [first] = largest;
    // Methods 6: mean 1.58, without 4.6 mean 1.244; the SE of the mean is .3890 (reference case sleep).
    expect(first?.without).toBeCloseTo(-1.2444444444, 9);
    expect(first?.change).toBeCloseTo((-1.2444444444 + 1.58) / (se as number), 8);
    expect(se).toBeCloseTo(0.38896, 5);
    expect(largest).toHaveLength(5);
  });

  it('by hand: two groups change by their own mean, in Welch\u2019s standard error', () => {
    const layout = takeCheckLayout(plantScores, { factor: 'group', levels: ['trt2', 'ctrl'], by: '' });
    const { estimate, se, largest } = influence(layout);
    const sides = [0, 1].map((code) => layout.values.filter((_, who) => layout.group[who] === code));
    const test = welchT(sides[0] as Float64Array, sides[1] as Float64Array);
    expect([estimate, se]).toEqual([
      expect.closeTo(test.estimate as number, 12),
      expect.closeTo(test.se as number, 12),
    ]);
    const who = layout.participants.indexOf(largest[0]?.participant ?? '');
    const less = sides.map((own, side) =>
      layout.group[who] === side ? own.filter((value) => value !== layout.values[who]) : own,
    );
    const again = welchT(less[0] as Float64Array, less[1] as Float64Array);
    expect(largest[0]?.without).toBeCloseTo(again.estimate as number, 12);
  });

  it('by hand: with several levels there is no single difference, but distances in order', () => {
    const { estimate, largest, cooks } = influence(visitLayout);
    expect([estimate, largest[0]?.without, largest[0]?.change]).toEqual([null, null, null]);
    const sorted = [...cooks].sort((a, b) => (b as number) - (a as number)).slice(0, 5);
    expect(largest.map(({ cook }) => cook)).toEqual(sorted);
  });

  it('invariance: unit and origin do not matter to the distances, 1e-12', () => {
    const moved = { ...plantLayout, values: plantLayout.values.map((value) => 60 * value + 3) };
    const [a, b] = [influence(plantLayout).cooks, influence(moved).cooks];
    for (const [who, cook] of a.entries()) expect(cook).toBeCloseTo(b[who] as number, 12);
  });

  it('degenerate: someone alone in a group, and differences that do not vary, have no distance', () => {
    const alone = layoutOf([[1], [4], [6], [9]], { columns: [''], groups: ['a', 'b'], group: [0, 1, 1, 1] });
    expect(influence(alone).cooks[0]).toBeNull();
    expect(influence(alone).se).toBeNull();
    const flat = layoutOf([
      [2, 1],
      [3, 2],
      [4, 3],
    ]);
    expect(influence(flat).cooks).toEqual([null, null, null]);
    expect(influence(flat).largest[0]?.change).toBeNull();
  });
});
