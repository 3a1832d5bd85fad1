import { expect, test } from 'vitest';
import { declareDesign } from '../../src/analysis/design.ts';
import { hideConditions } from '../../src/analysis/hidden-design.ts';
import { plannedAnalyses } from '../../src/analysis/planned-analyses.ts';
import { tableOf } from '../support/tables.ts';

const open = declareDesign(
  tableOf({ who: ['1', '1', '2', '2'], alert: ['voice', 'tone', 'voice', 'tone'], ms: [4, 9, 3, 7] }),
  {
    participant: 'who',
    within: ['alert'],
    between: [],
    outcome: 'ms',
    unit: 'ms',
    direction: 'lower',
    rows: 'one score',
  },
);

test('invariance: the count of planned analyses is the same while the conditions are hidden', () => {
  expect(plannedAnalyses(hideConditions(open), 'alert')).toBe(plannedAnalyses(open, 'alert'));
});

test('by hand: seven rules, each with a whole number of rows', () => {
  const planned = plannedAnalyses(open, 'alert') ?? 0;
  expect(planned).toBeGreaterThan(7);
  expect(planned % 7).toBe(0);
});

test('degenerate: a factor that is not there', () => {
  expect(plannedAnalyses(open, 'group')).toBe(null);
});
