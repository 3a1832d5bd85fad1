import { describe, expect, it } from 'vitest';
import { takeCheckLayout } from '../../src/analysis/checks-layout.ts';
import { declareDesign } from '../../src/analysis/design.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { mixedLayout, plantLayout, plantScores, sleepLayout, sleepScores } from '../support/check-layouts.ts';
import { tableOf } from '../support/tables.ts';

/** Two within factors and a between factor; participant c lacks one combination. */
const design = declareDesign(
  tableOf({
    who: ['b', 'b', 'b', 'b', 'c', 'c', 'c', 'a', 'a', 'a', 'a', 'd', 'd', 'd', 'd', 'e', 'e', 'e', 'e'],
    load: [
      'lo',
      'lo',
      'hi',
      'hi',
      'lo',
      'lo',
      'hi',
      'lo',
      'lo',
      'hi',
      'hi',
      'lo',
      'lo',
      'hi',
      'hi',
      'lo',
      'lo',
      'hi',
      'hi',
    ],
    cue: ['x', 'y', 'x', 'y', 'x', 'y', 'x', 'x', 'y', 'x', 'y', 'x', 'y', 'x', 'y', 'x', 'y', 'x', 'y'],
    crew: ['n', 'n', 'n', 'n', 'n', 'n', 'n', 's', 's', 's', 's', 'n', 'n', 'n', 'n', 's', 's', 's', 's'],
    ms: [1, 3, 10, 20, 9, 9, 9, 5, 7, 30, 50, 2, 2, 4, 4, 6, 6, 8, 8],
  }),
  {
    participant: 'who',
    within: ['load', 'cue'],
    between: ['crew'],
    outcome: 'ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'one score',
  },
);
const scores = scoreDesign(design, { statistic: 'mean', trim: 0 });

describe('takeCheckLayout', () => {
  it('by hand: levels of a factor, averaged over the other one, in file order, complete participants only', () => {
    const layout = takeCheckLayout(scores, { factor: 'load', levels: ['hi', 'lo'], by: '' });
    expect(layout.participants).toEqual(['b', 'a', 'd', 'e']);
    expect(layout.columns).toEqual(['hi', 'lo']);
    expect(Array.from(layout.values)).toEqual([15, 2, 40, 6, 4, 2, 8, 6]);
    expect(layout.groups).toEqual(['']);
    expect(layout.left).toEqual([{ participant: 'c', why: 'no kept score under one of the conditions' }]);
  });

  it('by hand: groups stay apart when asked, and a between factor gives one column of participant means', () => {
    expect(takeCheckLayout(scores, { factor: 'load', levels: [], by: 'crew' })).toMatchObject({
      columns: ['lo', 'hi'],
      groups: ['n', 's'],
      group: Int32Array.of(0, 1, 0, 1),
    });
    const groups = takeCheckLayout(scores, { factor: 'crew', levels: ['s', 'n'], by: '' });
    expect(groups.groups).toEqual(['s', 'n']);
    expect(Array.from(groups.group)).toEqual([1, 0, 1, 0]);
    expect(Array.from(groups.values)).toEqual([8.5, 23, 3, 7]);
  });

  it('agrees with the reference sets: sizes of sleep, plant_growth and epilepsy_visits', () => {
    expect([sleepLayout.participants.length, plantLayout.groups.length, mixedLayout.values.length]).toEqual([
      10,
      3,
      59 * 4,
    ]);
  });

  it('by hand: without a factor the scores are one sample', () => {
    const layout = takeCheckLayout(plantScores, { factor: '', levels: [], by: '' });
    expect([layout.groups, layout.columns, layout.values.length]).toEqual([[''], [''], 30]);
  });

  it('refuses what is not in the design, one level twice, and groups that are no groups', () => {
    const take =
      (factor: string, levels: string[], by = '') =>
      () =>
        takeCheckLayout(scores, { factor, levels, by });
    expect(take('alert', [])).toThrow(/no condition called "alert".*load, cue, crew/);
    expect(take('load', ['hi', 'mid'])).toThrow(/"mid" is not a level of load/);
    expect(take('load', ['hi', 'hi'])).toThrow(/two different levels/);
    expect(take('load', [], 'cue')).toThrow(/cue is not such a condition/);
    expect(take('crew', [], 'crew')).toThrow(/crew is not such a condition/);
  });

  it('refuses too few participants to have a spread', () => {
    const two = scoreDesign(
      { ...sleepScores.design, kept: sleepScores.design.kept.map((_, row) => (row % 10 < 2 ? 1 : 0)) },
      sleepScores.score,
    );
    expect(() => takeCheckLayout(two, { factor: 'drug', levels: [], by: '' })).toThrow(
      /Only 2 participants are left with every score needed: too few to see any spread/,
    );
  });
});
