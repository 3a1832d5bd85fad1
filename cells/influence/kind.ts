import type { ClaimValue } from '../../src/analysis/claim.ts';
import { findingRecord } from '../../src/analysis/finding.ts';
import type { Influence } from '../../src/analysis/influence.ts';
import { type Context, defineKind, numberOf } from '../kind.ts';
import { type InfluenceSettings, influenceSentence } from './sentence.ts';
import { influenceNotes, influenceTables, sayFlip, saySingle } from './words.ts';

/** How far a claim depends on single participants, and the fewest whose removal changes it. */
export const influenceKind = defineKind<InfluenceSettings, { readonly claim: 'claim' }, 'influence', null>({
  name: 'influence',
  version: 1,
  title: () => 'influence',
  offer: 'Find the fewest participants whose removal would change the claim',
  takes: { claim: 'claim' },
  gives: 'influence',
  blind: 'veil',
  defaults: (context) => defaultSettings(context),
  check: (settings) =>
    settings.target === 'falls below' && settings.smallest === null ? ['Say the smallest effect of interest.'] : [],
  async compute(settings, { claim }, env) {
    const spec = { target: settings.target, smallest: numberOf(settings.smallest) ?? 0 };
    return { value: await env.run('influence', { result: claim.result, claim: claim.claim, spec }), detail: null };
  },
  sentence: influenceSentence,
  say: ({ value }) => `${sayFlip(value)} ${saySingle(value)}`,
  notes: ({ value }) => influenceNotes(value),
  tables: ({ value }) => influenceTables(value),
  record: ({ value }) => recordOf(value),
});

function recordOf({ full, verdict, single, changed, flip, removal, n, setAside }: Influence) {
  return {
    full: findingRecord(full),
    verdict,
    estimates: single.map((each) => each.estimate),
    p: single.map((each) => each.p),
    changed,
    size: removal === null ? null : removal.participants.length,
    exact: flip.exact,
    changing: flip.changing,
    sets: flip.sets,
    noneUpTo: flip.noneUpTo,
    without: removal === null ? null : findingRecord(removal.finding),
    n,
    setAside,
  };
}

function defaultSettings(context: Context): InfluenceSettings {
  const claim = context.given.claim as ClaimValue | undefined;
  const target = claim === undefined || claim.verdict === 'supported' ? 'loses support' : 'gains support';
  return { target: claim !== undefined && claim.verdict === null ? 'changes sign' : target, smallest: null };
}
