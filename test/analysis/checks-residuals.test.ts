import { describe, expect, it } from 'vitest';
import {
  byGroup,
  centre,
  columnOf,
  differencesOf,
  participantMeans,
  residualDf,
  residualsOf,
} from '../../src/analysis/checks-residuals.ts';
import { oneWayAnova } from '../../src/numerics/anova/one-way.ts';
import { expectedOf } from '../support/cases.ts';
import { layoutOf, plantLayout, sleepLayout, visitLayout } from '../support/check-layouts.ts';

describe('residualsOf', () => {
  it('by hand: two levels give differences less their mean, not raw scores', () => {
    const layout = layoutOf([
      [5, 1],
      [7, 2],
      [6, 6],
    ]);
    expect(Array.from(differencesOf(layout))).toEqual([4, 5, 0]);
    expect(Array.from(residualsOf(layout).values)).toEqual([1, 2, -3]);
    expect(residualsOf(layout)).toMatchObject({ df: 2, sd: Math.sqrt(14 / 2) });
  });

  it('by hand: groups give scores less their own group\u2019s mean', () => {
    const layout = layoutOf([[1], [10], [3], [20]], { columns: [''], groups: ['a', 'b'], group: [0, 1, 0, 1] });
    expect(Array.from(residualsOf(layout).values)).toEqual([-1, -5, 1, 5]);
    expect(residualsOf(layout).df).toBe(2);
  });

  it('by hand: three levels are freed of the participant and of the level', () => {
    const layout = layoutOf([
      [1, 2, 6],
      [3, 4, 2],
    ]);
    // Rows less their mean: (-2, -1, 3), (0, 1, -1); less the columns' means (-1, 0, 1).
    expect(Array.from(residualsOf(layout).values)).toEqual([-1, -1, 2, 1, 1, -2]);
    expect(residualDf(residualsOf(layout).shape)).toBe(2);
  });

  it('agrees with the analysis of variance: residual SD of plant_growth and epilepsy_visits, rtol 1e-12', () => {
    const anova = oneWayAnova(byGroup(plantLayout.values, plantLayout.group, 3));
    expect(residualsOf(plantLayout).sd / (anova.residualSd as number)).toBeCloseTo(1, 12);
    const { ss_error: error } = expectedOf('epilepsy_visits', 'repeated_measures_anova', {
      outcome: 'seizures',
      subject: 'id',
      within: 'visit',
    });
    const { sd, df } = residualsOf(visitLayout);
    expect((sd * sd * df) / (error as number)).toBeCloseTo(1, 12);
  });

  it('invariance: a constant added to every score of a participant changes nothing within, 1e-12', () => {
    const moved = { ...sleepLayout, values: sleepLayout.values.map((value, at) => value + 7 * (at >> 1)) };
    const [a, b] = [residualsOf(sleepLayout), residualsOf(moved)];
    for (const [at, value] of a.values.entries()) expect(value).toBeCloseTo(b.values[at] as number, 12);
  });

  it('degenerate: equal differences have SD 0, rounding apart', () => {
    const layout = layoutOf([
      [0.3, 0.2],
      [0.2, 0.1],
      [0.7, 0.6],
    ]);
    expect(residualsOf(layout).sd).toBe(0);
  });
});

describe('columns, means and groups', () => {
  it('by hand: columns, participants\u2019 means and groups are taken in file order; centring is in place', () => {
    const layout = layoutOf([
      [1, 3],
      [5, 9],
    ]);
    expect([Array.from(columnOf(layout, 1)), Array.from(participantMeans(layout))]).toEqual([
      [3, 9],
      [2, 7],
    ]);
    const values = Float64Array.of(4, 6, 1);
    expect(byGroup(values, Int32Array.of(1, 0, 1), 2)).toEqual([Float64Array.of(6), Float64Array.of(4, 1)]);
    expect(centre(values, { group: Int32Array.of(1, 0, 1), groups: 2, columns: 1 })).toBe(values);
    expect(Array.from(values)).toEqual([1.5, 0, -1.5]);
  });
});
