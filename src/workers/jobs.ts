import { associateRows } from '../analysis/association.ts';
import type { ClaimSpec } from '../analysis/claim.ts';
import type { Result } from '../analysis/compare.ts';
import { compareSamples } from '../analysis/compare.ts';
import { compareLevels } from '../analysis/omnibus.ts';
import { sweepClaim } from '../analysis/sweep.ts';

/** The table of jobs: pure functions by name, each given plain data that can be cloned to a worker. */
export const jobs = {
  /** Every row of a comparison (analysis/compare.ts). */
  compare: compareSamples,
  /** Every row about several levels, the levels, and all pairs (analysis/omnibus.ts). */
  levels: compareLevels,
  /** The strip's grid (analysis/sweep.ts). */
  sweep: (args: { readonly result: Result; readonly claim: ClaimSpec }) => sweepClaim(args.result, args.claim),
  /** Some rows of an association (analysis/association.ts). */
  associate: associateRows,
};

export type Jobs = typeof jobs;
