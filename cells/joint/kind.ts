import { estimatorOf } from '../../src/analysis/estimators.ts';
import { JOINT_STATISTICS, type Joint, type JointStatistic } from '../../src/analysis/joint.ts';
import type { GridPoint } from '../../src/analysis/joint-plan.ts';
import type { ScoreSpec } from '../../src/analysis/score.ts';
import type { Sweep } from '../../src/analysis/sweep.ts';
import { defineKind } from '../kind.ts';
import { count, pValue } from '../numbers.ts';
import { runJoint } from '../run-joint.ts';

export type JointSettings = {
  /** The joint statistic the plan names. */
  readonly statistic: JointStatistic;
  readonly relabellings: number;
};

/** What the strip's joint inference came to. */
export interface StripJoint {
  readonly joint: Joint | null;
  /** Why there is none. */
  readonly reason: string | null;
  /** Places of the analyses that entered, in the order of `joint.rows`. */
  readonly places: readonly number[];
}

/**
 * Joint inference over the standing strip's analyses. It stands in the foot, not among the cells, and reads the strip's
 * own cell: so the counts are there first, and both are about the same analyses.
 */
export const jointKind = defineKind<
  JointSettings,
  { readonly claim: 'claim'; readonly sweep: 'sweep' },
  null,
  StripJoint
>({
  name: 'joint',
  version: 1,
  title: () => 'joint inference',
  offer: null,
  takes: { claim: 'claim', sweep: 'sweep' },
  gives: null,
  blind: 'veil',
  defaults: () => ({ statistic: 'average Z', relabellings: 1999 }),
  check: ({ statistic, relabellings }) =>
    JOINT_STATISTICS.includes(statistic) &&
    Number.isInteger(relabellings) &&
    relabellings >= 19 &&
    relabellings <= 99_999
      ? []
      : ['The joint statistic of the strip cannot be read from this file.'],
  async compute(settings, { claim, sweep }, env) {
    const places = entering(sweep, claim.claim.margin);
    const points = places.map((place) => pointOf(sweep, place, claim.result.scores.score));
    const { result } = claim;
    const request = { result, claim: claim.claim, points, relabellings: settings.relabellings, seed: env.seed };
    const joint = await runJoint(request, env);
    const detail = typeof joint === 'string' ? { joint: null, reason: joint, places } : { joint, reason: null, places };
    return { value: null, detail };
  },
  sentence: (settings) => [
    `Relabel the data ${count(settings.relabellings)} times, every analysis of the strip with its rule each time, judged by the ${settings.statistic}.`,
  ],
  say: ({ detail }, settings) => sayJoint(detail.joint, detail.reason, settings.statistic),
  record: ({ detail }) => ({
    relabellings: detail.joint?.relabellings ?? null,
    statistics: detail.joint?.statistics.map(({ name, observed, p }) => [name, observed, p]) ?? null,
    rows: detail.joint?.rows.map(({ z, p, adjusted }) => [z, p, adjusted]) ?? null,
  }),
});

/** Rows that resample have no place inside a relabelling; with a margin only rows in the outcome's unit are judged. */
function entering(sweep: Sweep, margin: number): number[] {
  return sweep.specifications.flatMap(({ finding }, place) => {
    const closed = estimatorOf(finding.estimator)?.closedForm === true;
    return closed && finding.estimate !== null && (margin === 0 || finding.sameUnit) ? [place] : [];
  });
}

function pointOf(sweep: Sweep, place: number, score: ScoreSpec): GridPoint {
  const specification = sweep.specifications[place];
  if (specification === undefined) throw new RangeError(`*place* must be a specification; got ${place}`);
  const { rules, finding } = specification;
  return { rules, score, estimator: finding.estimator, trim: finding.trim };
}

/** "joint p = .003 (average Z, 1,999 relabellings)". */
export function sayJoint(joint: Joint | null, reason: string | null, statistic: JointStatistic): string {
  if (joint === null) return `no joint p: ${reason ?? 'not worked out'}`;
  const found = joint.statistics.find(({ name }) => name === statistic);
  if (found === undefined || found.p === null) return 'no joint p: no analysis of the grid gives a test';
  const how = joint.enumerated ? `all ${count(joint.relabellings)}` : count(joint.relabellings);
  return `joint ${pValue(found.p)} (${statistic}, ${how} relabellings)`;
}
