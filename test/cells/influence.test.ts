import { describe, expect, test } from 'vitest';
import { influenceKind } from '../../cells/influence/kind.ts';
import { influenceSentence } from '../../cells/influence/sentence.ts';
import { plainSentence } from '../../cells/kind.ts';
import type { ClaimValue } from '../../src/analysis/claim.ts';
import type { Influence } from '../../src/analysis/influence.ts';
import { aHigher, pairsOf } from '../support/chains.ts';
import { blankOf, choose, contextOf, run, sharedOf } from '../support/kind-run.ts';

// Cushny & Peebles 1905, from test/reference/error_rates.json.
const drug1 = [0.7, -1.6, -0.2, -1.2, -0.1, 3.4, 3.7, 0.8, 0, 2];
const drug2 = [1.9, 0.8, 1.1, 0.1, -0.1, 4.4, 5.5, 1.6, 4.6, 3.4];
const claim: ClaimValue = {
  claim: aHigher,
  result: pairsOf(drug2, drug1),
  words: 'a is higher.',
  verdict: 'supported',
};
const settings = { target: 'loses support', smallest: null } as const;

describe('the influence cell', () => {
  test('by hand: its sentence, and the smallest effect only where it is read', () => {
    const context = contextOf({ claim });
    expect(plainSentence(influenceSentence(settings, context))).toBe(
      'Find the fewest participants whose removal would change the claim: it loses support.',
    );
    const below = choose(influenceSentence(settings, context), 'target', 'falls below');
    const shared = contextOf({ claim }, { shared: [sharedOf('sesoi', 0.5, 'ms')] });
    expect(plainSentence(influenceKind.sentence({ ...below, smallest: { shared: 'sesoi' } }, shared))).toContain(
      'of 0.5 ms.',
    );
    expect(influenceKind.check(below, context)).toEqual(['Say the smallest effect of interest.']);
  });

  test('refuses: to be asked for support that is there', () => {
    const { editor } = blankOf(influenceSentence(settings, contextOf({ claim })), 'target');
    const gains = editor.type === 'choice' ? editor.options.find((each) => each.value === 'gains support') : undefined;
    expect(gains?.refused).toBe('The planned row supports the claim already.');
    expect(influenceKind.defaults(contextOf({ claim: { ...claim, verdict: 'undecided' } }))).toEqual({
      target: 'gains support',
      smallest: null,
    });
  });

  test('agrees with methods 2.5: sleep, exactly 4, 26 of 210 sets; the names only in a table', async () => {
    const computed = await run<Influence>(influenceKind, settings, { claim });
    const said = influenceKind.say(computed, settings);
    expect(said).toContain(
      'Exactly 4 participants of 10 would have to go to take the support away: 26 of the 210 sets of that size would.',
    );
    expect(said).toContain('No single removal would change the verdict (supported).');
    expect(said).not.toMatch(/p\d/);
    const tables = influenceKind.tables?.(computed, settings) ?? [];
    expect(tables.map((each) => each.title)).toContain('who is in the set');
    expect(tables[0]?.rows).toHaveLength(5);
    expect(influenceKind.record(computed)).toMatchObject({
      size: 4,
      exact: true,
      changing: 26,
      sets: 210,
      setAside: 0,
    });
    expect(JSON.stringify(influenceKind.record(computed))).not.toMatch(/NaN|Infinity/);
  });

  test('by hand: the record names nobody, and the output is veiled while blind', async () => {
    const computed = await run<Influence>(influenceKind, settings, { claim });
    expect(JSON.stringify(influenceKind.record(computed))).not.toContain('p9');
    expect(influenceKind.blind).toBe('veil');
  });

  test('degenerate: a claim whose row gives no verdict asks for the sign', () => {
    expect(influenceKind.defaults(contextOf({ claim: { ...claim, verdict: null } })).target).toBe('changes sign');
  });
});
