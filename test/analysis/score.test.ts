import { describe, expect, it } from 'vitest';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { tableOf } from '../support/tables.ts';

const roles: Roles = {
  participant: 'p',
  within: ['c'],
  between: ['g'],
  outcome: 's',
  unit: '',
  direction: 'lower',
  rows: 'several trials',
};
const design = declareDesign(
  tableOf({
    p: ['a', 'a', 'a', 'a', 'a', 'b', 'b', 'b'],
    g: ['new', 'new', 'new', 'new', 'new', 'old', 'old', 'old'],
    c: ['x', 'x', 'x', 'x', 'x', 'x', 'y', 'y'],
    s: [1, 2, 3, 4, 100, 7, 8, 10],
  }),
  roles,
);

describe('scoreDesign', () => {
  it('by hand: mean, median and 20 % trimmed mean of the kept trials of each cell', () => {
    expect([...scoreDesign(design, { statistic: 'mean', trim: 0 }).values]).toEqual([22, NaN, 7, 9]);
    expect([...scoreDesign(design, { statistic: 'median', trim: 0 }).values]).toEqual([3, NaN, 7, 9]);
    expect([...scoreDesign(design, { statistic: 'trimmed mean', trim: 20 }).values]).toEqual([3, NaN, 7, 9]);
  });

  it('by hand: counts of kept trials, groups and conditions', () => {
    const scores = scoreDesign(design, { statistic: 'mean', trim: 0 });
    expect([...scores.trials]).toEqual([5, 0, 1, 2]);
    expect(scores.conditions.map((each) => each.label)).toEqual(['x', 'y']);
    expect(scores.groups[0]?.levels[scores.groups[0].codes[1] as number]).toBe('old');
  });

  it('degenerate: a participant without a kept row has no score', () => {
    const without = applyRule(design, { rule: 'named', participants: ['a'], reason: 'r' }).design;
    expect(scoreDesign(without, { statistic: 'mean', trim: 0 }).participants).toEqual(['b']);
  });

  it('invariance: the order of the rows does not matter', () => {
    const scores = scoreDesign(design, { statistic: 'mean', trim: 0 });
    const turned = declareDesign(
      tableOf({
        p: ['a', 'b', 'b', 'b', 'a', 'a', 'a', 'a'],
        g: ['new', 'old', 'old', 'old', 'new', 'new', 'new', 'new'],
        c: ['x', 'y', 'y', 'x', 'x', 'x', 'x', 'x'],
        s: [100, 10, 8, 7, 4, 3, 2, 1],
      }),
      roles,
    );
    const other = scoreDesign(turned, { statistic: 'mean', trim: 0 });
    expect(other.conditions.map((each) => each.label)).toEqual(['x', 'y']);
    expect([...other.values]).toEqual([...scores.values]);
  });
});
