import { describe, expect, test } from 'vitest';
import { chainOf, peopleOf, plannedRow, rulesStandAlone, samplesWithout } from '../../src/analysis/influence-chain.ts';
import { groupsOf, pairsOf } from '../support/chains.ts';

const x = [12, 15, 11, 19, 14, 16, 90];
const y = [10, 11, 12, 13, 9, 10, 12];
const pooledRule = {
  rule: 'extreme',
  on: 'participant',
  column: 'score',
  measure: 'MAD',
  cutoff: 3,
  scope: 'pooled',
  sides: 'both',
} as const;

function chain(result: ReturnType<typeof pairsOf>) {
  const made = chainOf(result);
  if (made === null) throw new Error('no chain');
  return made;
}

describe('the chain without some participants', () => {
  test('theory: one road, without anybody left out it is the comparison cell\u2019s own row', () => {
    for (const result of [
      pairsOf(x, y),
      groupsOf(x, y, {}, [pooledRule]),
      pairsOf(x, y, { estimator: 'median-differences' }),
    ]) {
      const own = result.findings[result.planned];
      const again = plannedRow(chain(result), samplesWithout(chain(result), new Set()));
      expect({ ...again, effects: [] }).toEqual({ ...own, effects: [] });
    }
  });

  test('by hand: pairs without the fourth participant', () => {
    const left = samplesWithout(chain(pairsOf(x, y)), new Set(['p4']));
    expect(Array.from(left.x)).toEqual([12, 15, 11, 14, 16, 90]);
    expect(peopleOf(left)).toEqual(['p1', 'p2', 'p3', 'p5', 'p6', 'p7']);
  });

  test('by hand: who was set aside by a rule is still among those who may be left out', () => {
    const result = groupsOf(x, y, {}, [pooledRule]);
    expect(result.scores.participants).not.toContain('a7');
    expect(chain(result).people).toContain('a7');
  });

  test('by hand: rules that pool participants do not stand alone', () => {
    expect(rulesStandAlone([pooledRule])).toBe(false);
    expect(rulesStandAlone([{ ...pooledRule, cutoff: null }])).toBe(true);
    expect(rulesStandAlone([{ ...pooledRule, on: 'trial', scope: 'participant' }])).toBe(true);
    expect(rulesStandAlone([{ rule: 'kept-share', least: 70 }])).toBe(true);
  });

  test('degenerate: a question about several levels has no chain of two sides', () => {
    expect(chainOf({ ...pairsOf(x, y), scope: 'omnibus' })).toBe(null);
  });
});
