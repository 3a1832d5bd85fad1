import { describe, expect, it } from 'vitest';
import { defaultChoice } from '../../src/analysis/grid-options.ts';
import { AXES, type Combination, GridWork } from '../../src/analysis/grid-work.ts';
import { claimLower, resultOf, trialColumns } from '../support/joint.ts';

const result = resultOf(trialColumns(8, 5));
const base: Combination = {
  cutoff: '2',
  measure: 'MAD',
  scope: 'participant',
  trim: '20',
  row: 'trimmed-differences',
  score: 'mean',
};

function work(own: Partial<Combination> = {}) {
  const made = new GridWork(result, claimLower, { ...defaultChoice(result), measure: ['MAD', 'SD', 'fences'] });
  return { made, key: made.add({ ...base, ...own }) };
}

describe('GridWork', () => {
  it('by hand: one analysis a key, the worksheet\u2019s own marked as planned', () => {
    const { made, key } = work();
    made.addOwn();
    expect(made.entries.size).toBe(2);
    expect(made.entries.get(key ?? '')?.specification.planned).toBe(false);
    expect([...made.entries.values()].filter((entry) => entry.specification.planned)).toHaveLength(1);
    expect(AXES).toEqual(['cutoff', 'measure', 'scope', 'trim', 'row', 'score']);
  });

  it('by hand: an uncertain option makes the analysis exploratory, an equivalent way to it takes it back', () => {
    const { made, key } = work({ cutoff: '3', measure: 'fences' });
    expect(made.entries.get(key ?? '')?.mark).toBe('U');
    const none = made.add({ ...base, cutoff: 'none' });
    expect(made.entries.get(none ?? '')?.mark).toBe('E');
  });

  it('refuses, counting: a row that resamples, a word that is no option', () => {
    const made = new GridWork(result, claimLower, { ...defaultChoice(result), row: ['median-differences'] });
    expect(made.add({ ...base, row: 'median-differences' })).toBe(null);
    expect(made.add({ ...base, row: 'median-differences', trim: '10' })).toBe(null);
    expect(made.refusals()).toEqual([
      { why: expect.stringMatching(/resamples/), example: expect.stringMatching(/median/), count: 2 },
    ]);
    expect(made.add({ ...base, row: 'none such' })).toBe(null);
    expect(made.refusedCount()).toBe(3);
  });
});
