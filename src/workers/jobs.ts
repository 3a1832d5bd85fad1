import { associateRows } from '../analysis/association.ts';
import type { ClaimSpec } from '../analysis/claim.ts';
import type { Result } from '../analysis/compare.ts';
import { compareSamples } from '../analysis/compare.ts';
import { findInfluence, type InfluenceSpec } from '../analysis/influence.ts';
import { compareLevels } from '../analysis/omnibus.ts';
import { sweepClaim } from '../analysis/sweep.ts';
import { longWork } from './long-work.ts';
import type { JobEnv } from './runner.ts';

/** The table of jobs: pure functions by name, each given plain data that can be cloned to a worker. */
export const jobs = {
  /** Every row of a comparison (analysis/compare.ts). */
  compare: compareSamples,
  /** Every row about several levels, the levels, and all pairs (analysis/omnibus.ts). */
  levels: compareLevels,
  /** The strip's grid (analysis/sweep.ts). */
  sweep: (args: { readonly result: Result; readonly claim: ClaimSpec }) => sweepClaim(args.result, args.claim),
  /** Participants left out in turn, and the smallest set that changes the claim (analysis/influence.ts). */
  influence: (
    args: { readonly result: Result; readonly claim: ClaimSpec; readonly spec: InfluenceSpec },
    env: JobEnv,
  ) => findInfluence(args, longWork(env)),
  /** Some rows of an association (analysis/association.ts). */
  associate: associateRows,
};

export type Jobs = typeof jobs;
