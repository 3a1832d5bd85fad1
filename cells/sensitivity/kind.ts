import type { ClaimValue } from '../../src/analysis/claim.ts';
import { findingRecord } from '../../src/analysis/finding.ts';
import type { Grid, GridSpecification, GridSweep } from '../../src/analysis/grid.ts';
import { type GridAxis, gridAxes, NO_CUTOFF } from '../../src/analysis/grid-options.ts';
import type { Ribbon } from '../../src/analysis/grid-ribbons.ts';
import { JOINT_STATISTICS, type Joint } from '../../src/analysis/joint.ts';
import { defineKind, type Env } from '../kind.ts';
import { enteringPlaces, pointOf, runJoint, sayJoint } from '../run-joint.ts';
import { choiceOf, combinations, type SensitivitySettings, sensitivitySentence } from './sentence.ts';
import { sensitivityTables } from './tables.ts';
import { sayCounts, saySpread, sensitivityNotes } from './words.ts';

/** The grid's equivalent analyses with the joint inference over them. */
export interface JointSweep extends GridSweep {
  readonly joint: Joint | null;
  /** Places of the analyses in `joint.rows`. */
  readonly places: readonly number[];
}

/** What only this cell shows. */
export type SensitivityDetail = Omit<Grid, 'sweep'> & {
  readonly ribbons: readonly Ribbon[];
  /** Why there is no joint inference. */
  readonly reason: string | null;
  /** Joint inference over the exploratory analyses, for the p of each of them alone. */
  readonly apart: { readonly joint: Joint | null; readonly places: readonly number[] };
  readonly axes: readonly GridAxis[];
  readonly claim: ClaimValue;
};

/** Most combinations a grid may ask for. */
const MOST = 10_000;

/** Repeats the comparison over every defensible combination of choices, and judges them jointly. */
export const sensitivityKind = defineKind<SensitivitySettings, { readonly claim: 'claim' }, 'sweep', SensitivityDetail>(
  {
    name: 'sensitivity',
    version: 1,
    title: () => 'sensitivity',
    offer: 'Repeat the comparison for every defensible rule, trim and row',
    takes: { claim: 'claim' },
    gives: 'sweep',
    blind: 'veil',
    defaults: defaultSettings,
    check(settings) {
      const asked = combinations(settings);
      if (asked > MOST) return [`That is ${asked} combinations, more than ${MOST}. Choose fewer values.`];
      const { statistic, relabellings } = settings;
      if (!JOINT_STATISTICS.includes(statistic)) return ['Say which joint statistic judges the grid.'];
      return Number.isInteger(relabellings) && relabellings >= 19 && relabellings <= 99_999
        ? []
        : ['Say how many relabellings are run: 19 to 99,999.'];
    },
    async compute(settings, { claim }, env) {
      const { result } = claim;
      const choice = choiceOf(settings, claim);
      const { grid, ribbons } = await env.run('grid', { result, claim: claim.claim, choice });
      const { sweep, ...rest } = grid;
      const { joint, reason, places } = await jointOver(sweep.specifications, claim, settings.relabellings, env);
      const apart = await jointOver(rest.exploratory, claim, settings.relabellings, env);
      const detail = { ...rest, ribbons, reason, apart, axes: gridAxes(result), claim };
      return { value: { ...sweep, joint, places } satisfies JointSweep, detail };
    },
    sentence: sensitivitySentence,
    say({ value, detail }, settings) {
      const spread = saySpread(detail, value.unit);
      const joint = sayJoint((value as JointSweep).joint, detail.reason, settings.statistic);
      return [sayCounts(value), spread, joint].filter((each) => each !== '').join('; ');
    },
    notes: ({ value, detail }) => sensitivityNotes(value as JointSweep, detail),
    tables: ({ value, detail }) => sensitivityTables(value as JointSweep, detail),
    record({ value, detail }) {
      const { joint } = value as JointSweep;
      return {
        counts: [value.specifications.length, value.supported, value.undecided, value.contradicted, value.refused],
        planned: value.planned,
        declared: detail.declared,
        leftOut: detail.refused.map((each) => each.count),
        findings: value.specifications.map((each) => findingRecord(each.finding)),
        exploratory: detail.exploratory.map((each) => findingRecord(each.finding)),
        spread: detail.spread === null ? null : [detail.spread.least, detail.spread.median, detail.spread.most],
        shares: detail.shares.map(({ axis, share }) => [axis, share]),
        relabellings: joint?.relabellings ?? null,
        statistics: joint?.statistics.map(({ name, observed, p }) => [name, observed, p]) ?? null,
        rows: joint?.rows.map(({ z, p, adjusted }) => [z, p, adjusted]) ?? null,
      };
    },
  },
);

async function jointOver(
  specifications: readonly GridSpecification[],
  claim: ClaimValue,
  relabellings: number,
  env: Env,
): Promise<{ joint: Joint | null; reason: string | null; places: readonly number[] }> {
  const places = enteringPlaces(specifications, claim.claim.margin);
  if (places.length === 0) return { joint: null, reason: 'There is no analysis to relabel.', places };
  const { result } = claim;
  const entering = specifications.filter((_, place) => places.includes(place));
  const points = entering.map((each) => pointOf(each, result.scores.score));
  const joint = await runJoint({ result, claim: claim.claim, points, relabellings, seed: env.seed }, env);
  return typeof joint === 'string' ? { joint: null, reason: joint, places } : { joint, reason: null, places };
}

/** Scope, rows and score follow the design as long as nothing else is chosen. */
function defaultSettings(): SensitivitySettings {
  return {
    cutoff: [NO_CUTOFF, '2', '2.5', '3'],
    measure: ['MAD', 'SD'],
    scope: [],
    trim: ['0', '10', '20', '25'],
    row: [],
    score: [],
    reasons: {},
    statistic: 'average Z',
    relabellings: 1999,
  };
}
