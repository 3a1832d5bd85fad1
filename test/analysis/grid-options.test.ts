import { describe, expect, it } from 'vitest';
import {
  type AxisName,
  defaultChoice,
  gridAxes,
  isMeasure,
  isScope,
  scoreOf,
  scoreValue,
} from '../../src/analysis/grid-options.ts';
import { GRID_TRIMS, gridRules } from '../../src/analysis/sweep.ts';
import { GROUPS, groupColumns, resultOf, trialColumns } from '../support/joint.ts';

const trials = resultOf(trialColumns(6, 4));
const groups = resultOf(groupColumns([3, 1, 4, 1, 5], [9, 2, 6, 5, 3]), GROUPS, { estimator: 'welch' });
const option = (result: typeof trials, axis: AxisName, value: string) =>
  gridAxes(result)
    .find((each) => each.axis === axis)
    ?.options.find((each) => each.value === value);

describe('gridAxes', () => {
  it('theory: every option says why it is offered, and how it stands to the question', () => {
    for (const result of [trials, groups]) {
      for (const axis of gridAxes(result)) {
        expect(axis.options.length).toBeGreaterThan(1);
        for (const each of axis.options) {
          expect(each.why.length).toBeGreaterThan(5);
          expect(['E', 'U', 'N']).toContain(each.mark);
        }
        expect(new Set(axis.options.map((each) => each.value)).size).toBe(axis.options.length);
      }
    }
  });

  it('by hand: a scope that sees the condition is not equivalent; one blind scope is', () => {
    expect(option(trials, 'scope', 'participant')?.mark).toBe('E');
    expect(option(trials, 'scope', 'pooled')?.mark).toBe('U');
    expect(option(groups, 'scope', 'pooled')?.mark).toBe('E');
    expect(option(groups, 'scope', 'participant')).toBe(undefined);
    for (const result of [trials, groups]) expect(option(result, 'scope', 'condition')?.mark).toBe('N');
  });

  it('by hand: rows in the unit are equivalent, others uncertain, those that resample refused', () => {
    expect(option(trials, 'row', 'trimmed-differences')?.mark).toBe('E');
    expect(option(trials, 'row', 'paired-ratio')?.mark).toBe('U');
    expect(option(trials, 'row', 'median-differences')?.refused).toMatch(/resamples/);
    expect(option(groups, 'row', 'trimmed-differences')).toBe(undefined);
  });

  it('by hand: how trials are scored is an axis only where there are trials; the own score is equivalent', () => {
    expect(option(trials, 'score', 'mean')?.mark).toBe('E');
    expect(option(trials, 'score', 'median')?.mark).toBe('U');
    expect(gridAxes(groups).map((each) => each.axis)).not.toContain('score');
  });
});

describe('defaultChoice', () => {
  it('agrees with the strip: the same cutoffs, distances, scope and trims', () => {
    for (const result of [trials, groups]) {
      const choice = defaultChoice(result);
      const rules = gridRules(result.scores.design).flatMap((rule) => (rule === null ? [] : [rule]));
      expect(choice.cutoff.slice(1).map(Number)).toEqual([...new Set(rules.map((rule) => rule.cutoff))]);
      expect(choice.measure).toEqual([...new Set(rules.map((rule) => rule.measure))]);
      expect(choice.scope).toEqual([...new Set(rules.map((rule) => rule.scope))]);
      expect(choice.trim.map(Number)).toEqual(GRID_TRIMS);
      expect(choice.reasons).toEqual({});
    }
  });
});

describe('words of settings', () => {
  it('by hand: a score and its word belong together', () => {
    for (const score of [
      { statistic: 'mean', trim: 0 },
      { statistic: 'trimmed mean', trim: 20 },
    ] as const)
      expect(scoreOf(scoreValue(score))).toEqual(score);
    expect(scoreOf('mode')).toBe(undefined);
    expect([isMeasure('MAD'), isMeasure('mad'), isScope('pooled'), isScope('everywhere')]).toEqual([
      true,
      false,
      true,
      false,
    ]);
  });
});
