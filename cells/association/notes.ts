import type { Association } from '../../src/analysis/association.ts';
import { leveragePairs } from '../../src/analysis/association-diagnostics.ts';
import { LEAST_PAIRS } from '../../src/analysis/association-finding.ts';
import { type CautionFacts, type CautionId, cautionText } from '../../src/analysis/cautions.ts';
import { tQuantileUpper } from '../../src/numerics/tails/t.ts';
import type { Note } from '../kind.ts';
import { bounded, count, counted, fixed, levelPercent } from '../numbers.ts';
import { pairsUsed } from './words.ts';

/** Participants named in a caution; the others stand in the table. */
const NAMED = 4;

/** What the margin says beside an association. */
export function associationNotes(value: Association): Note[] {
  const { spec, pairs, findings } = value;
  const people = counted(pairs.x.length, 'participant');
  const notes: Note[] = [
    {
      type: 'note',
      text: `${spec.y} against ${spec.x}, ${people} with both, ${levelPercent(1 - spec.alpha)} intervals. The square row is the one the plan names.`,
    },
  ];
  if (pairs.left.length > 0) {
    const named = pairs.left.slice(0, 3).map((each) => `${each.participant} (${each.why})`);
    const more = pairs.left.length - named.length;
    notes.push({ type: 'note', text: `Not related: ${named.join('; ')}${more > 0 ? `; and ${more} more` : ''}.` });
  }
  const has = (id: string) => findings.some((finding) => finding.cautions.includes(id));
  const say = (type: Note['type'], id: CautionId, facts: CautionFacts) =>
    notes.push({ type, id, text: cautionText(id, facts) });
  if (has('LEVER')) say('caution', 'LEVER', leverFacts(value));
  const cook = cookFacts(value);
  if (cook) say('caution', 'COOK', cook);
  if (has('NOP')) say('caution', 'NOP', { least: LEAST_PAIRS });
  if (has('FEWPAIRS')) say('caution', 'FEWPAIRS', fewFacts(pairs.x.length));
  if (has('SKIP')) say('note', 'SKIP', { counts: skippedWords(value) });
  const tau = findings.find((finding) => finding.estimator === 'kendall')?.estimate ?? null;
  if (tau !== null) say('note', 'TAU', { tau: bounded(tau, 2), r: bounded(Math.sin((Math.PI * tau) / 2), 2) });
  say('note', 'R8B', { resamples: count(spec.resamples), seed: spec.seed });
  return notes;
}

function leverFacts({ spec, pairs, diagnostics }: Association): CautionFacts {
  const far = leveragePairs(diagnostics);
  const hats = far.slice(0, NAMED).map((i) => bounded(diagnostics.pairs[i]?.hat ?? 0, 2));
  return {
    who: `${named(pairs.participants, far, spec.participant)} ${far.length === 1 ? 'lies' : 'lie'}`,
    x: spec.x,
    hat: hats.join(', '),
    limit: bounded(diagnostics.limits.hat, 2),
  };
}

/** Participants beyond Cook's limit; null where there is none. */
function cookFacts({ spec, pairs, diagnostics }: Association): CautionFacts | null {
  const far = diagnostics.pairs.flatMap((pair, i) => (pair.beyond[1] ? [i] : []));
  if (far.length === 0 || diagnostics.limits.cook === null) return null;
  return {
    who: `${named(pairs.participants, far, spec.participant)} ${far.length === 1 ? 'has' : 'have'}`,
    them: far.length === 1 ? 'that one' : 'them',
    limit: fixed(diagnostics.limits.cook, 2),
  };
}

function named(participants: readonly string[], which: readonly number[], noun: string | null): string {
  const names = which.slice(0, NAMED).map((i) => participants[i]);
  const more = which.length - names.length;
  const words = `${noun === null ? '' : `${noun} `}${names.join(', ')}${more > 0 ? ` and ${more} more` : ''}`;
  return words.charAt(0).toUpperCase() + words.slice(1);
}

/** The smallest r that differs from 0 at .05 with so many pairs. */
function fewFacts(n: number): CautionFacts {
  const t = tQuantileUpper(0.025, n - 2);
  return { n, r: bounded(t / Math.sqrt(n - 2 + t * t), 2) };
}

function skippedWords({ findings }: Association): string {
  const skipped = findings.filter((finding) => finding.estimator.startsWith('skipped'));
  return skipped
    .map((each) => `${count(each.n - pairsUsed(each))} of ${count(each.n)} by ${by(each.estimator)}`)
    .join(' and ');
}

function by(estimator: string): string {
  return estimator === 'skipped-mcd' ? 'the MCD' : 'projections';
}
