import { describe, expect, it } from 'vitest';
import { CAUTIONS, type CautionId, cautionText, simulatedLevel } from '../../src/analysis/cautions.ts';

describe('cautions', () => {
  it('by hand: the simulated level is quoted for the very case that was simulated (methods 5.4: n 20, MAD 3, .075 and .204)', () => {
    expect(simulatedLevel({ sizes: [20, 20], measure: 'MAD', cutoff: 3 })).toMatch(
      /\.075 of normal and \.204 of lognormal.*\(simulated\)/,
    );
  });

  it('refuses to quote a level for a case that was not simulated', () => {
    expect(simulatedLevel({ sizes: [20, 22], measure: 'MAD', cutoff: 3 })).toBe('');
    expect(simulatedLevel({ sizes: [20, 20], measure: 'MAD', cutoff: 2.7 })).toBe('');
    expect(simulatedLevel({ sizes: [21, 21], measure: 'MAD', cutoff: 3 })).toBe('');
  });

  it('by hand: every sentence ends as one, names its source, and leaves no fact unfilled', () => {
    const facts = new Proxy({}, { get: () => 'FACT' });
    for (const id of Object.keys(CAUTIONS) as CautionId[]) {
      const sentence = cautionText(id, facts);
      expect(sentence, id).toMatch(/\.$/);
      expect(sentence, id).not.toMatch(/undefined|\[object/);
      expect(CAUTIONS[id].source.length, id).toBeGreaterThan(8);
    }
  });
});
