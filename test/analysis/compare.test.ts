import { describe, expect, it } from 'vitest';
import { compareSamples, withholdsTextbook } from '../../src/analysis/compare.ts';
import { args, row, sleepSamples } from '../support/samples.ts';

describe('withheld rows', () => {
  it('by hand: a rule within conditions withholds p and interval of one score each, a blind rule does not', () => {
    const extreme = { rule: 'extreme', on: 'trial', column: 's', measure: 'MAD', cutoff: 3, sides: 'both' } as const;
    expect(withholdsTextbook([{ ...extreme, scope: 'condition' }], 'several trials')).toBe(true);
    expect(withholdsTextbook([{ ...extreme, scope: 'participant-condition' }], 'several trials')).toBe(false);
    expect(withholdsTextbook([{ ...extreme, scope: 'pooled' }], 'one score')).toBe(false);
    expect(withholdsTextbook([{ ...extreme, scope: 'condition', cutoff: null }], 'one score')).toBe(false);
  });

  it('by hand: the estimate is shown, p, interval and intervals of effects are not', () => {
    const found = row(compareSamples({ ...args(sleepSamples), withheld: true }), 'paired-t');
    expect(found.estimate).toBeCloseTo(1.58, 12);
    expect([found.p, found.interval, found.se, found.effects[0]?.interval]).toEqual([null, null, null, null]);
    expect(found.cautions).toContain('R2');
  });
});
