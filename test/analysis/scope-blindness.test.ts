import { describe, expect, test } from 'vitest';
import type { ExtremeRule, Scope } from '../../src/analysis/rules.ts';
import { isBlindTo, scopeWords, splitBy } from '../../src/analysis/scope-blindness.ts';

const codes = new Int32Array(0);
const A = { name: 'A', scope: 'between', levels: ['a', 'b'], codes } as const;
const B = { name: 'B', scope: 'between', levels: ['c', 'd'], codes } as const;
const W = { name: 'W', scope: 'within', levels: ['e', 'f'], codes } as const;

const rule = (scope: Scope, on: 'trial' | 'participant' = 'trial'): ExtremeRule => ({
  rule: 'extreme',
  on,
  column: 'y',
  measure: 'SD',
  cutoff: 3,
  scope,
  sides: 'both',
});

// Andre 2022 (JEP: General 151, 213-223), the worked examples.
describe('blindness of a split to the tested effects', () => {
  test.each([
    ['two groups, A tested: all scores pooled', [], [['A']], true],
    ['two groups, A tested: within each group', ['A'], [['A']], false],
    ['2 x 2, A x B and B tested: within levels of A', ['A'], [['B'], ['A', 'B']], true],
    ['2 x 2, A x B and B tested: within levels of B', ['B'], [['B'], ['A', 'B']], false],
    ['2 x 2, A x B and B tested: within cells', ['A', 'B'], [['B'], ['A', 'B']], false],
    ['2 x 2, all tested: any split', ['B'], [['A'], ['B'], ['A', 'B']], false],
    ['2 x 2, all tested: pooled', [], [['A'], ['B'], ['A', 'B']], true],
    ['2 x 2, interaction only: within A', ['A'], [['A', 'B']], true],
    ['2 x 2, interaction only: within the four cells', ['A', 'B'], [['A', 'B']], false],
  ] as const)('agrees with Andre 2022: %s', (_words, split, tested, blind) => {
    expect(isBlindTo(split, tested)).toBe(blind);
  });
});

describe('what a scope sets apart', () => {
  test('by hand: trials', () => {
    expect(splitBy(rule('pooled'), [W, A])).toEqual([]);
    expect(splitBy(rule('participant'), [W, A])).toEqual([]);
    expect(splitBy(rule('condition'), [W, A])).toEqual(['W', 'A']);
    // A group is the same for all rows of a participant, so a scope inside a participant cannot tell groups apart.
    expect(splitBy(rule('participant-condition'), [W, A])).toEqual(['W']);
  });

  test('by hand: participants are judged among their groups; other rules set nothing apart', () => {
    expect(splitBy(rule('condition', 'participant'), [W, A, B])).toEqual(['A', 'B']);
    expect(splitBy({ rule: 'kept-share', least: 70 }, [W, A])).toEqual([]);
  });

  test('by hand: in words', () => {
    expect(scopeWords(rule('participant'), [W, A])).toBe(
      'It uses no condition, and is blind to every effect of W or A.',
    );
    expect(scopeWords(rule('participant-condition'), [W, A])).toMatch(
      /^It looks at each W separately, and so is not blind to an effect of W\. It is blind to effects of A alone\./,
    );
    expect(scopeWords({ rule: 'named', participants: ['1'], reason: 'fault' }, [W])).toBe(null);
  });
});
