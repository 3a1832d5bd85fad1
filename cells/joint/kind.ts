import { JOINT_STATISTICS, type Joint, type JointStatistic } from '../../src/analysis/joint.ts';
import { defineKind } from '../kind.ts';
import { count } from '../numbers.ts';
import { enteringPlaces, pointOf, runJoint, sayJoint } from '../run-joint.ts';

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
    const places = enteringPlaces(sweep.specifications, claim.claim.margin);
    const { score } = claim.result.scores;
    const points = sweep.specifications
      .filter((_, place) => places.includes(place))
      .map((each) => pointOf(each, score));
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
