import type { Result } from './compare.ts';
import type { Finding, Limits } from './finding.ts';

export interface ClaimSpec {
  readonly first: string;
  readonly relation: 'lower' | 'higher' | 'different';
  readonly second: string;
  /** In the outcome's unit, 0 or more. */
  readonly margin: number;
  /** Own words; empty = the sentence itself. */
  readonly title: string;
}

export type Verdict = 'supported' | 'undecided' | 'contradicted';

export interface ClaimValue {
  readonly claim: ClaimSpec;
  readonly result: Result;
  /** The claim in words: the own words, or the sentence. */
  readonly words: string;
  /** What the planned row says of it; null where that row has no interval or is in another unit. */
  readonly verdict: Verdict | null;
}

/**
 * What one row says of the claim. With d = the estimate in the claimed direction minus the margin: supported if the
 * interval of d lies above 0, contradicted if below, else undecided. A claim of any difference beyond a margin is
 * supported where the interval lies wholly beyond it on one side, and contradicted where it lies within.
 *
 * @param finding a row whose estimate is first minus second (or a ratio or probability of that order)
 * @param claim the claim; its first and second are the row's two conditions in either order
 * @param estimatesFirst name of the condition the estimate counts as first
 * @returns null where the row has no interval, or is in another unit and the margin is not 0
 * @source product definition of supported, undecided and contradicted; an interval read as a test: Altman & Bland 1995
 */
export function verdictOf(finding: Finding, claim: ClaimSpec, estimatesFirst: string): Verdict | null {
  if (finding.interval === null) return null;
  if (!finding.sameUnit && claim.margin !== 0) return null;
  const centred = centre(finding.interval, finding);
  const oriented: Limits = claim.first === estimatesFirst ? centred : flip(centred);
  const { margin } = claim;
  if (claim.relation === 'different') return verdictOfDifference(oriented, margin);
  const [low, high] = claim.relation === 'higher' ? oriented : flip(oriented);
  if (low !== null && low - margin > 0) return 'supported';
  if (high !== null && high - margin < 0) return 'contradicted';
  return 'undecided';
}

function verdictOfDifference([low, high]: Limits, margin: number): Verdict {
  if (low !== null && low > margin) return 'supported';
  if (high !== null && high < -margin) return 'supported';
  if (margin > 0 && low !== null && high !== null && low > -margin && high < margin) return 'contradicted';
  return 'undecided';
}

/** Limits as distances from "no difference", larger = first is larger; probabilities count the first being smaller. */
function centre([low, high]: Limits, finding: Finding): Limits {
  const shift = (value: number | null) => (value === null ? null : value - finding.nullValue);
  const centred: Limits = [shift(low), shift(high)];
  return finding.reversed ? flip(centred) : centred;
}

function flip([low, high]: Limits): Limits {
  return [high === null ? null : -high, low === null ? null : -low];
}

/** The claim as a sentence: "voice is lower than tone on ack_ms", with "by more than 20 ms" where there is a margin. */
export function claimWords(claim: ClaimSpec, outcome: string, unit: string): string {
  if (claim.title.trim() !== '') return claim.title.trim();
  const relation = claim.relation === 'different' ? 'differs from' : `is ${claim.relation} than`;
  const margin = claim.margin > 0 ? ` by more than ${claim.margin}${unit === '' ? '' : ` ${unit}`}` : '';
  return `${claim.first} ${relation} ${claim.second} on ${outcome}${margin}.`;
}
