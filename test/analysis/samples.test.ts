import { describe, expect, it } from 'vitest';
import { declareDesign } from '../../src/analysis/design.ts';
import { applyRule } from '../../src/analysis/exclusion.ts';
import { takeSamples } from '../../src/analysis/samples.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { sleep } from '../support/samples.ts';
import { tableOf } from '../support/tables.ts';

describe('samples', () => {
  it('by hand: a participant who lacks one condition does not enter, and is listed with the reason', () => {
    const rule = { rule: 'named', participants: ['3'], reason: 'r' } as const;
    const design = applyRule(sleep, rule).design;
    expect(takeSamples(scoreDesign(design, { statistic: 'mean', trim: 0 }), 'drug', 'drug1', 'drug2').x.length).toBe(9);
    const table = tableOf({ p: ['a', 'a', 'b'], c: ['x', 'y', 'x'], s: [1, 2, 3] });
    const partial = declareDesign(table, { ...sleep.roles, participant: 'p', within: ['c'], outcome: 's' });
    const samples = takeSamples(scoreDesign(partial, { statistic: 'mean', trim: 0 }), 'c', 'x', 'y');
    expect(samples.left).toEqual([{ participant: 'b', why: 'no kept score under y' }]);
  });

  it('refuses levels that are not there, naming those that are', () => {
    const scores = scoreDesign(sleep, { statistic: 'mean', trim: 0 });
    expect(() => takeSamples(scores, 'drug', 'drug9', 'drug1')).toThrow(
      /"drug9" is not a level of drug. Its levels are: drug1, drug2/,
    );
    expect(() => takeSamples(scores, 'dose', 'a', 'b')).toThrow(/no condition called "dose".*drug/);
  });
});
