import { describe, expect, it } from 'vitest';
import {
  columnsRead,
  cutoffLabel,
  type ExtremeRule,
  OWN_CUTOFF,
  onParticipants,
  readsCondition,
  ruleLabel,
} from '../../src/analysis/rules.ts';

const extreme: ExtremeRule = {
  rule: 'extreme',
  on: 'trial',
  column: 's',
  measure: 'MAD',
  cutoff: 2.5,
  scope: 'participant',
  sides: 'both',
};

describe('rules', () => {
  it('by hand: only scopes that split the condition read it (methods 1.5, table of scopes)', () => {
    expect(
      (['pooled', 'participant', 'condition', 'participant-condition'] as const).map((scope) =>
        readsCondition({ ...extreme, scope }),
      ),
    ).toEqual([false, false, true, true]);
    expect(readsCondition({ rule: 'kept-share', least: 70 })).toBe(false);
  });

  it('by hand: rules on participants come after rules on trials', () => {
    expect(onParticipants(extreme)).toBe(false);
    expect(onParticipants({ ...extreme, on: 'participant' })).toBe(true);
    expect(onParticipants({ rule: 'kept-share', least: 70 })).toBe(true);
    expect(onParticipants({ rule: 'named', participants: ['a'], reason: 'r' })).toBe(false);
  });

  it('by hand: short words say measure, cutoff and scope', () => {
    expect(ruleLabel(extreme, 'ms')).toBe('beyond 2.5 MAD within participant');
    expect(ruleLabel({ rule: 'limit', on: 'trial', column: 's', side: 'below', limit: 150, reason: 'r' }, 'ms')).toBe(
      'below 150 ms',
    );
    expect(cutoffLabel({ measure: 'fences', cutoff: 1.5 })).toBe('beyond fences of 1.5 IQR');
    expect(cutoffLabel({ measure: 'SD', cutoff: null })).toBe('no cutoff');
  });

  it('by hand: short words of the measures with a definition of their own, repeated rules and several columns', () => {
    expect(cutoffLabel({ measure: 'double MAD', cutoff: 3 })).toBe('beyond 3 MAD of its side');
    expect(cutoffLabel({ measure: 'Carling', cutoff: 1 })).toBe('beyond Carling\u2019s limits');
    expect(ruleLabel({ ...extreme, measure: 'SD', cutoff: 2, repeated: true }, '')).toBe(
      'beyond 2 SD, repeated, within participant',
    );
    const together = { ...extreme, measure: 'MCD', cutoff: 97.5, columns: ['a', 'b'], scope: 'pooled' } as const;
    expect(ruleLabel(together, '')).toBe('beyond 97.5 % of MCD distances on a and b');
    expect([...OWN_CUTOFF]).toEqual(['Carling', 'moving', 'recursive']);
  });

  it('by hand: the columns a rule reads', () => {
    expect(columnsRead(extreme)).toEqual(['s']);
    expect(columnsRead({ ...extreme, measure: 'MCD', column: 'a', columns: ['a', 'b'] })).toEqual(['a', 'b']);
    expect(columnsRead({ rule: 'limit', on: 'trial', column: 't', side: 'below', limit: 1, reason: 'r' })).toEqual([
      't',
    ]);
    expect(columnsRead({ rule: 'kept-share', least: 70 })).toEqual([]);
  });
});
