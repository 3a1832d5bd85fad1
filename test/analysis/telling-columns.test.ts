import { describe, expect, test } from 'vitest';
import { declareDesign } from '../../src/analysis/design.ts';
import { columnsThatTell } from '../../src/analysis/telling-columns.ts';
import { tableOf } from '../support/tables.ts';

const base = { outcome: 'ms', unit: '', direction: 'lower', rows: 'several trials' } as const;

describe('columns that tell a condition', () => {
  const within = (more: Record<string, readonly (number | string)[]>) =>
    columnsThatTell(
      declareDesign(
        tableOf({
          who: ['1', '1', '1', '1', '2', '2', '2', '2'],
          alert: ['a', 'a', 'b', 'b', 'a', 'a', 'b', 'b'],
          ms: [4, 9, 3, 7, 8, 2, 6, 5],
          ...more,
        }),
        { ...base, participant: 'who', within: ['alert'], between: [] },
      ),
    );

  test('by hand: one to one, many to one, and block numbers that do it within each participant', () => {
    expect(within({ code: [1, 1, 2, 2, 1, 1, 2, 2] })).toEqual(['code']);
    expect(within({ sound: ['x', 'x', 'z', 'z', 'y', 'y', 'z', 'z'] })).toEqual(['sound']);
    expect(within({ block: [1, 1, 2, 2, 2, 2, 1, 1] })).toEqual(['block']);
  });

  test('by hand: a trial number, an age and a column of different values tell nothing', () => {
    expect(within({ trial: [1, 2, 1, 2, 1, 2, 1, 2] })).toEqual([]);
    expect(within({ age: [30, 30, 30, 30, 40, 40, 40, 40] })).toEqual([]);
    expect(within({ noise: [11, 12, 13, 14, 15, 16, 17, 18] })).toEqual([]);
  });

  const between = (more: Record<string, readonly (number | string)[]>) =>
    columnsThatTell(
      declareDesign(
        tableOf({
          who: ['1', '1', '2', '2', '3', '3', '4', '4'],
          group: ['n', 'n', 'n', 'n', 'o', 'o', 'o', 'o'],
          ms: [4, 9, 3, 7, 8, 2, 6, 5],
          ...more,
        }),
        { ...base, participant: 'who', within: [], between: ['group'] },
      ),
    );

  test('by hand: between participants, a site that goes with the group; not an age of each participant', () => {
    expect(between({ site: [1, 1, 1, 1, 2, 2, 2, 2] })).toEqual(['site']);
    expect(between({ age: [20, 20, 30, 30, 40, 40, 50, 50] })).toEqual([]);
    expect(between({ sex: ['f', 'f', 'm', 'm', 'f', 'f', 'm', 'm'] })).toEqual([]);
  });
});
