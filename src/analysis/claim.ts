import type { Result } from './compare.ts';

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
  /** What the planned row says of it; null where that row has no interval. */
  readonly verdict: Verdict | null;
}
