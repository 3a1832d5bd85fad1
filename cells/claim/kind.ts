import { type ClaimSpec, type ClaimValue, claimWords, verdictOf } from '../../src/analysis/claim.ts';
import type { Result } from '../../src/analysis/compare.ts';
import { type Context, defineKind, type Note, numberOf, Refusal } from '../kind.ts';
import { type ClaimSettings, claimSentence, comparedPair } from './sentence.ts';

/** What is claimed of the comparison, and what its planned row says of it. */
export const claimKind = defineKind<ClaimSettings, { readonly result: 'result' }, 'claim', null>({
  name: 'claim',
  version: 1,
  title: () => 'claim',
  offer: 'State the claim that the finding is to bear',
  takes: { result: 'result' },
  gives: 'claim',
  blind: 'veil',
  defaults: (context) => defaultSettings(context),
  check(settings, context) {
    const result = context.given.result as Result | undefined;
    if (result?.scope === 'omnibus') return [omnibusWords(result.comparison.first)];
    if (settings.first === '' || settings.second === '') return ['Say which two conditions the claim is about.'];
    if (settings.first === settings.second) return ['The claim needs two different conditions.'];
    return settings.margin === null ? ['Say the margin: 0 for any difference.'] : [];
  },
  compute(settings, { result }) {
    const claim: ClaimSpec = { ...settings, margin: numberOf(settings.margin) ?? 0 };
    const { first, second } = result.comparison;
    if (result.scope === 'omnibus') throw new Refusal(omnibusWords(first));
    if (![first, second].includes(claim.first) || ![first, second].includes(claim.second)) {
      throw new Refusal(
        `The claim is about ${claim.first} and ${claim.second}, but the comparison above is of ${first} with ${second}. Change one of the two.`,
      );
    }
    if (claim.margin < 0) throw new Refusal('The margin is below 0. Give 0 for any difference, or a positive number.');
    const { outcome, unit } = result.scores.design.roles;
    const planned = result.findings[result.planned];
    const value: ClaimValue = {
      claim,
      result,
      words: claimWords(claim, outcome, unit),
      verdict: planned ? verdictOf(planned, claim, first) : null,
    };
    return { value, detail: null };
  },
  sentence: claimSentence,
  say: ({ value }) => `${value.words} ${verdictWords(value)}`,
  notes: ({ value }) => claimNotes(value),
  record: ({ value }) => ({ verdict: value.verdict }),
});

/** Why a comparison of several levels bears no claim. */
function omnibusWords(about: string): string {
  return `The comparison above is of ${about}: it says whether anything differs, not what, so no claim can be read from it. Add a comparison of two conditions, or of chosen levels, and let the claim read that one.`;
}

function verdictWords(value: ClaimValue): string {
  return value.verdict === null
    ? 'The planned row cannot be judged against it.'
    : `By the planned row: ${value.verdict}.`;
}

function claimNotes(value: ClaimValue): Note[] {
  const planned = value.result.findings[value.result.planned];
  const notes: Note[] = [];
  if (value.verdict === null && planned && !planned.sameUnit && value.claim.margin > 0) {
    notes.push({
      type: 'caution',
      text: `The planned row is not in the outcome's unit, so it cannot be held against a margin of ${value.claim.margin}. Set the margin to 0, or plan a row in the unit.`,
    });
  }
  if (value.claim.margin === 0) {
    notes.push({
      type: 'note',
      text: 'With a margin of 0 any difference in the claimed direction counts. A margin says how large a difference has to be to matter.',
    });
  }
  const oneSided = value.result.comparison.alternative;
  const toFirst = value.claim.first === value.result.comparison.first;
  const claimed =
    value.claim.relation === 'different' ? null : (value.claim.relation === 'lower') === toFirst ? 'less' : 'greater';
  if (oneSided !== 'two-sided' && claimed !== oneSided) {
    notes.push({
      type: 'caution',
      text: 'The comparison is one-sided, and not in the direction of this claim: it can never support it.',
    });
  }
  return notes;
}

function defaultSettings(context: Context): ClaimSettings {
  const result = context.given.result as Result | undefined;
  if (result === undefined) return unseenSettings(context);
  const { direction } = result.scores.design.roles;
  const estimate = result.findings[result.planned]?.estimate ?? 0;
  const relation = direction === 'neither' ? 'different' : estimate < 0 ? 'lower' : 'higher';
  return {
    first: result.comparison.first,
    relation,
    second: result.comparison.second,
    margin: 0,
    title: '',
  };
}

/** A claim about a comparison that is veiled or not there yet: its two conditions, in the direction that is better. */
function unseenSettings(context: Context): ClaimSettings {
  const [first, second] = comparedPair(context);
  const direction = context.design?.roles.direction ?? 'neither';
  return { first, relation: direction === 'neither' ? 'different' : direction, second, margin: 0, title: '' };
}
