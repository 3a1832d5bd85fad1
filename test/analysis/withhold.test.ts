import { describe, expect, it } from 'vitest';
import { withheldFinding, withholdsTextbook } from '../../src/analysis/withhold.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';

describe('what a rule that reads the condition makes wrong', () => {
  it('by hand: a rule within conditions withholds p and interval of one score each, a blind rule does not', () => {
    const extreme = { rule: 'extreme', on: 'trial', column: 's', measure: 'MAD', cutoff: 3, sides: 'both' } as const;
    expect(withholdsTextbook([{ ...extreme, scope: 'condition' }], 'several trials')).toBe(true);
    expect(withholdsTextbook([{ ...extreme, scope: 'participant-condition' }], 'several trials')).toBe(false);
    expect(withholdsTextbook([{ ...extreme, scope: 'pooled' }], 'one score')).toBe(false);
    expect(withholdsTextbook([{ ...extreme, scope: 'condition', cutoff: null }], 'one score')).toBe(false);
  });

  it('by hand: of a row about several levels the share stays, statistic, both df, p and limits go', () => {
    const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
    const [own] = compareAll(plants, everyLevel('group')).findings;
    if (own === undefined) throw new Error('no row');
    const withheld = withheldFinding(own);
    expect(withheld.estimate).toBe(own.estimate);
    expect([withheld.statistic, withheld.df, withheld.df2, withheld.p, withheld.interval]).toEqual([
      null,
      null,
      null,
      null,
      null,
    ]);
    expect(withheld.cautions).toContain('R2');
  });
});
