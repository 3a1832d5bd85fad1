import type { Verdict } from './claim.ts';
import type { Finding } from './finding.ts';
import type { Rule } from './rules.ts';

/** One analysis of the grid, and what it came to. */
export interface Specification {
  /** Short words: "3 MAD", "none". */
  readonly ruleLabel: string;
  /** The rules it applied, in order. */
  readonly rules: readonly Rule[];
  readonly finding: Finding;
  readonly verdict: Verdict | null;
  /** Whether it has the worksheet's own settings. */
  readonly planned: boolean;
  /** Whether its rule sets nobody aside for being extreme. */
  readonly everyoneIn: boolean;
  /** Other settings that keep the same rows and trim the same count: counted once, here. */
  readonly also: readonly string[];
}

export interface SweepGroup {
  /** Quantity: "means", "trimmed means". */
  readonly group: string;
  /** Indices into `specifications`, sorted by estimate. */
  readonly order: readonly number[];
}

/** Every defensible analysis of the strip's grid, once each. */
export interface Sweep {
  readonly specifications: readonly Specification[];
  readonly groups: readonly SweepGroup[];
  readonly planned: number;
  readonly supported: number;
  readonly undecided: number;
  readonly contradicted: number;
  /** Specifications without an interval (too few kept, zero spread): counted in none of the three. */
  readonly refused: number;
  readonly unit: string;
}
