import { describe, expect, it } from 'vitest';
import { cutoffLabel, type ExtremeRule, onParticipants, readsCondition, ruleLabel } from '../../src/analysis/rules.ts';

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
});
