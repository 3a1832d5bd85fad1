import type { ClaimSpec } from '../analysis/claim.ts';
import type { Result } from '../analysis/compare.ts';
import { compareSamples } from '../analysis/compare.ts';
import { sweepClaim } from '../analysis/sweep.ts';

/** The table of jobs: pure functions by name, each given plain data that can be cloned to a worker. */
export const jobs = {
  /** Every row of a comparison (analysis/compare.ts). */
  compare: compareSamples,
  /** The strip's grid (analysis/sweep.ts). */
  sweep: (args: { readonly result: Result; readonly claim: ClaimSpec }) => sweepClaim(args.result, args.claim),
};

export type Jobs = typeof jobs;
