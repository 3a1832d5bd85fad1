import { describe, expect, it } from 'vitest';
import { findingRecord } from '../../src/analysis/finding.ts';
import { fromT, LEAST_FOR_P, makeRow, turned } from '../../src/analysis/row.ts';
import { oneSampleT } from '../../src/numerics/one-sample-t.ts';
import { sleepSamples } from '../support/samples.ts';

const context = {
  trim: 0,
  alternative: 'two-sided',
  level: 0.95,
  resamples: 99,
  seed: 1,
  unit: 'h',
  direction: 'higher',
  first: 'a',
  second: 'b',
} as const;
const words = { estimator: 'x', label: 'x', quantity: 'q', group: 'g', method: 'm' };

describe('makeRow', () => {
  it('by hand: a t test fills the row, in the unit of the outcome', () => {
    const made = makeRow(sleepSamples, context, words, fromT(oneSampleT(sleepSamples.x, context)));
    expect(made.unit).toBe('h');
    expect(made.n).toBe(10);
    expect(made.statistic?.name).toBe('t');
    expect(made.pHow).toBe('t distribution');
  });

  it('refuses p and interval where fewer than four scores are left (methods 3.1), keeping the estimate', () => {
    const made = makeRow(sleepSamples, context, words, {
      estimate: 1,
      p: 0.01,
      interval: [0, 2],
      pHow: 't',
      h: [LEAST_FOR_P - 1, 10],
    });
    expect([made.estimate, made.p, made.interval]).toEqual([1, null, null]);
    expect(made.reason).toMatch(/fewer than 4/);
  });

  it('by hand: a direction turns for a quantity that grows as the first condition shrinks', () => {
    expect((['two-sided', 'greater', 'less'] as const).map(turned)).toEqual(['two-sided', 'less', 'greater']);
  });

  it('theory: what is saved of a row has no words that a later version might put otherwise', () => {
    const made = makeRow(sleepSamples, context, words, fromT(oneSampleT(sleepSamples.x, context)));
    expect(Object.keys(findingRecord(made)).sort()).toEqual([
      'counts',
      'df',
      'effects',
      'estimate',
      'estimator',
      'interval',
      'n',
      'p',
      'se',
      'statistic',
      'trim',
    ]);
  });
});
