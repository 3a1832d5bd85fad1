import { associateRows } from '../analysis/association.ts';
import { type CheckOptions, checkAssumptions } from '../analysis/checks.ts';
import type { CheckLayout } from '../analysis/checks-layout.ts';
import type { ClaimSpec } from '../analysis/claim.ts';
import type { Result } from '../analysis/compare.ts';
import { compareSamples } from '../analysis/compare.ts';
import { type RelabelSpec, relabelRates } from '../analysis/error-rates.ts';
import { type BlindScores, flagExtremeBlind } from '../analysis/flagging.ts';
import { runGrid } from '../analysis/grid.ts';
import type { GridChoice } from '../analysis/grid-options.ts';
import { gridRibbons } from '../analysis/grid-ribbons.ts';
import { findInfluence, type InfluenceSpec } from '../analysis/influence.ts';
import { countJoint } from '../analysis/joint.ts';
import { type JointPlan, planJoint } from '../analysis/joint-plan.ts';
import { compareLevels } from '../analysis/omnibus.ts';
import { runPipeline } from '../analysis/pipeline.ts';
import type { ExtremeRule } from '../analysis/rules.ts';
import { type SimulationSpec, simulate } from '../analysis/simulate.ts';
import { sweepClaim } from '../analysis/sweep.ts';
import { longWork } from './long-work.ts';
import type { JobEnv } from './runner.ts';
import { stepOf } from './step-of.ts';

/** The table of jobs: pure functions by name, each given plain data that can be cloned to a worker. */
export const jobs = {
  /** Every row of a comparison (analysis/compare.ts). */
  compare: compareSamples,
  /** Every row about several levels, the levels, and all pairs (analysis/omnibus.ts). */
  levels: compareLevels,
  /** The planned row of a chain in some of its relabellings or resamples (analysis/pipeline.ts). */
  pipeline: runPipeline,
  /** The strip's grid (analysis/sweep.ts). */
  sweep: (args: { readonly result: Result; readonly claim: ClaimSpec }) => sweepClaim(args.result, args.claim),
  /** A grid of the reader's own choices, and the planned row along trim and cutoff (analysis/grid.ts). */
  grid: ({
    result,
    claim,
    choice,
  }: {
    readonly result: Result;
    readonly claim: ClaimSpec;
    readonly choice: GridChoice;
  }) => {
    return { grid: runGrid(result, claim, choice), ribbons: gridRibbons(result, claim) };
  },
  /** What relabelling a grid needs, and some of its relabellings (analysis/joint.ts). */
  jointPlan: planJoint,
  joint: (args: { readonly plan: JointPlan; readonly from: number; readonly to: number }, env: JobEnv) =>
    countJoint(args, longWork(env)),
  /** Participants left out in turn, and the smallest set that changes the claim (analysis/influence.ts). */
  influence: (
    args: { readonly result: Result; readonly claim: ClaimSpec; readonly spec: InfluenceSpec },
    env: JobEnv,
  ) => findInfluence(args, longWork(env)),
  /** Some relabellings of a chain by several rules (analysis/error-rates.ts). */
  relabelRates: (
    args: { readonly result: Result; readonly spec: RelabelSpec; readonly from: number; readonly to: number },
    env: JobEnv,
  ) => relabelRates(args, longWork(env)),
  /** Some simulated experiments (analysis/simulate.ts). */
  simulate: (args: { readonly spec: SimulationSpec; readonly from: number; readonly to: number }, env: JobEnv) =>
    simulate(args.spec, args.from, args.to, longWork(env)),
  /** What a comparison assumes, with what the checks could have shown (analysis/checks.ts). */
  checks: (args: { readonly layout: CheckLayout; readonly options: CheckOptions }, env: JobEnv) =>
    checkAssumptions(args.layout, args.options, stepOf(env)),
  /** Rows that a blind extremity rule flags (analysis/flagging.ts). */
  flagExtreme: (args: { readonly scores: BlindScores; readonly rule: ExtremeRule }) =>
    flagExtremeBlind(args.scores, args.rule),
  /** Some rows of an association (analysis/association.ts). */
  associate: associateRows,
};

export type Jobs = typeof jobs;
