import { describe, expect, it } from 'vitest';
import { runGrid } from '../../src/analysis/grid.ts';
import { defaultChoice } from '../../src/analysis/grid-options.ts';
import { sweepClaim } from '../../src/analysis/sweep.ts';
import { claimLower, extreme, GROUPS, groupColumns, MEAN, resultOf, trialColumns } from '../support/joint.ts';

const trials = resultOf(trialColumns(10, 8), {}, {}, [extreme('MAD', 2.5, 'participant')]);
const scores = trialColumns(26, 1).ms;
const groups = resultOf(groupColumns(scores.slice(0, 11), scores.slice(11)), GROUPS, { estimator: 'yuen-welch' });

describe('runGrid', () => {
  it.each([
    ['within', trials],
    ['between', groups],
  ] as const)('agrees with the strip, digit for digit: the grid it starts with, %s', (_, result) => {
    const grid = runGrid(result, claimLower, defaultChoice(result));
    const strip = sweepClaim(result, claimLower);
    const numbers = (sweep: typeof strip) =>
      sweep.specifications.map(({ finding, verdict, planned, everyoneIn }) => {
        return JSON.stringify([finding.estimate, finding.interval, finding.p, verdict, planned, everyoneIn]);
      });
    expect(numbers(grid.sweep).sort()).toEqual(numbers(strip).sort());
    expect([grid.sweep.supported, grid.sweep.undecided, grid.sweep.contradicted]).toEqual([
      strip.supported,
      strip.undecided,
      strip.contradicted,
    ]);
    expect(grid.exploratory).toEqual([]);
    expect(grid.refused).toEqual([]);
  });

  it('agrees with the comparison cell, digit for digit: the analysis with the worksheet\u2019s own settings', () => {
    for (const result of [trials, groups]) {
      const { sweep } = runGrid(result, claimLower, defaultChoice(result));
      const planned = sweep.specifications[sweep.planned];
      const own = result.findings[result.planned];
      expect(planned?.finding).toEqual(own);
    }
  });

  it('theory: combinations are declared, refused, merged or distinct, and none is lost', () => {
    const choice = {
      ...defaultChoice(trials),
      row: ['paired-t', 'trimmed-differences', 'paired-ratio', 'median-differences'],
    };
    const grid = runGrid(trials, claimLower, choice);
    expect(grid.declared).toBe(4 * 2 * 1 * 4 * 4 * 1);
    const refused = grid.refused.reduce((sum, each) => sum + each.count, 0);
    // A quarter of the combinations name the row that resamples.
    expect(refused).toBe(grid.declared / 4);
    expect(grid.refused[0]?.why).toMatch(/resamples/);
    const distinct = grid.sweep.specifications.length + grid.exploratory.length;
    expect(distinct).toBeLessThan(grid.declared - refused);
    // Ratios are on a scale of their own: apart.
    expect(new Set(grid.exploratory.map((each) => each.finding.estimator))).toEqual(new Set(['paired-ratio']));
  });

  it('by hand: with no cutoff the distance does not matter, and a row without a trim has no trims', () => {
    const choice = { ...defaultChoice(trials), cutoff: ['none'], row: ['paired-t'] };
    const plain = resultOf(trialColumns(10, 8), {}, { estimator: 'paired-t' });
    const { sweep, keptSets } = runGrid(plain, claimLower, choice);
    expect(sweep.specifications).toHaveLength(1);
    expect(sweep.specifications[0]?.options).toEqual({
      cutoff: ['none'],
      measure: [],
      scope: [],
      trim: [],
      row: ['paired-t'],
      score: ['mean'],
    });
    expect(keptSets).toBe(1);
  });

  it('refuses an option that is not equivalent until a reason is written, then draws it apart', () => {
    const choice = { ...defaultChoice(trials), scope: ['participant', 'condition'] };
    const without = runGrid(trials, claimLower, choice);
    expect(without.exploratory).toEqual([]);
    expect(without.refused[0]?.why).toMatch(/within condition.*no reason for it is written/);
    const reasons = { 'scope:condition': 'contamination is expected under voice only' };
    const written = runGrid(trials, claimLower, { ...choice, reasons });
    expect(written.refused).toEqual([]);
    expect(written.exploratory.length).toBeGreaterThan(10);
    // Its rule sees the condition: the estimate stands, textbook p and interval do not.
    expect(written.exploratory.every(({ finding }) => finding.p === null && finding.estimate !== null)).toBe(true);
    expect(written.sweep.specifications.length).toBe(without.sweep.specifications.length);
  });

  it('by hand: other scores of the trials are exploratory; each is what the chain gives', () => {
    const plain = resultOf(trialColumns(10, 8), {}, { estimator: 'paired-t' });
    const choice = { ...defaultChoice(plain), cutoff: ['none'], row: ['paired-t'], score: ['mean', 'median'] };
    const { sweep, exploratory } = runGrid(plain, claimLower, choice);
    expect(sweep.specifications.map((each) => each.score)).toEqual([MEAN]);
    expect(exploratory.map((each) => each.score.statistic)).toEqual(['median']);
    expect(exploratory[0]?.finding.estimate).not.toBe(sweep.specifications[0]?.finding.estimate);
  });

  it('degenerate: a value the worksheet does not have is left out; logs of scores that are not positive are refused', () => {
    const columns = trialColumns(8, 3);
    const result = resultOf({ ...columns, ms: columns.ms.map((ms) => ms - 600) });
    const choice = { ...defaultChoice(result), trim: ['20', '77'], row: ['trimmed-differences', 'paired-ratio'] };
    const grid = runGrid(result, claimLower, choice);
    expect(grid.declared).toBe(4 * 2 * 2);
    expect(grid.refused.map((each) => each.why).join()).toMatch(/zero or negative/);
  });
});
