import { describe, expect, it } from 'vitest';
import { declareDesign } from '../../src/analysis/design.ts';
import {
  cellsOf,
  columnsOfAll,
  combinations,
  groupsOfLevels,
  peopleIn,
  takeLayout,
} from '../../src/analysis/layout.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { everyLevel } from '../support/omnibus.ts';
import { tableOf } from '../support/tables.ts';

/** Participants a, b (group g1) and c (g2) under x and y crossed with s and t; c lacks y, t. */
const table = tableOf({
  p: ['a', 'a', 'a', 'a', 'b', 'b', 'b', 'b', 'c', 'c', 'c', 'd', 'd', 'd', 'd'],
  f: ['x', 'x', 'y', 'y', 'x', 'x', 'y', 'y', 'x', 'x', 'y', 'x', 'x', 'y', 'y'],
  h: ['s', 't', 's', 't', 's', 't', 's', 't', 's', 't', 's', 's', 't', 's', 't'],
  g: ['1', '1', '1', '1', '1', '1', '1', '1', '2', '2', '2', '2', '2', '2', '2'],
  v: [1, 3, 5, 7, 2, 4, 6, 8, 10, 20, 30, 11, 21, 31, 41],
});
const scores = scoreDesign(
  declareDesign(table, {
    participant: 'p',
    within: ['f', 'h'],
    between: ['g'],
    outcome: 'v',
    unit: '',
    direction: 'neither',
    rows: 'one score',
  }),
  { statistic: 'mean', trim: 0 },
);

describe('takeLayout', () => {
  it('by hand: within factors not asked about are averaged over, between factors make groups', () => {
    const layout = takeLayout(scores, everyLevel('f'));
    expect(layout.groups.map((group) => group.scores.map((column) => [...column]))).toEqual([
      [
        [2, 3],
        [6, 7],
      ],
      [[16], [36]],
    ]);
    expect(layout.left).toEqual([{ participant: 'c', why: 'no kept score under one of the conditions' }]);
    expect(peopleIn(layout)).toBe(3);
    expect(columnsOfAll(layout).map((column) => [...column])).toEqual([
      [2, 3, 16],
      [6, 7, 36],
    ]);
  });

  it('by hand: a between factor is asked about over all within conditions', () => {
    const layout = takeLayout(scores, everyLevel('g'));
    expect(groupsOfLevels(layout).map((group) => [...group])).toEqual([[4, 5], [26]]);
    expect(cellsOf(layout).map((cell) => cell.label)).toEqual(['1', '2']);
  });

  it('by hand: an interaction has a cell for every combination', () => {
    const layout = takeLayout(scores, { type: 'interaction', factors: ['f', 'g'] });
    expect(cellsOf(layout).map((cell) => [cell.label, ...cell.scores])).toEqual([
      ['x, 1', 2, 3],
      ['x, 2', 16],
      ['y, 1', 6, 7],
      ['y, 2', 36],
    ]);
    expect(combinations([2, 2])).toEqual([
      [0, 0],
      [0, 1],
      [1, 0],
      [1, 1],
    ]);
  });

  it('refuses a condition that is not in the design', () => {
    expect(() => takeLayout(scores, everyLevel('load'))).toThrow(/no condition called "load"/);
  });
});
