import type { ClaimSpec } from '../../src/analysis/claim.ts';
import { type ComparisonSpec, compareRow, fittingEstimators, type Result } from '../../src/analysis/compare.ts';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { applyRules } from '../../src/analysis/exclusion.ts';
import { countJoint, finishJoint, type Joint, jointShards } from '../../src/analysis/joint.ts';
import { type GridPoint, type JointPlan, planJoint } from '../../src/analysis/joint-plan.ts';
import type { ExtremeRule, Rule } from '../../src/analysis/rules.ts';
import { samplesFor } from '../../src/analysis/samples.ts';
import { type ScoreSpec, scoreDesign } from '../../src/analysis/score.ts';
import { rng } from '../../src/numerics/rng.ts';
import { tableOf } from './tables.ts';

export const MEAN: ScoreSpec = { statistic: 'mean', trim: 0 };
export const claimLower: ClaimSpec = { first: 'voice', relation: 'lower', second: 'tone', margin: 0, title: '' };
export const noPause = { pause: async () => undefined, progress: () => undefined };

const comparison: ComparisonSpec = {
  factor: 'alert',
  first: 'voice',
  second: 'tone',
  estimator: 'trimmed-differences',
  trim: 20,
  alternative: 'two-sided',
  alpha: 0.05,
  resamples: 0,
  seed: 3,
};

const roles: Roles = {
  participant: 'p',
  within: ['alert'],
  between: [],
  outcome: 'ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};

type Columns = Readonly<Record<string, readonly (number | string | null)[]>>;

/** A result with its chain from plain columns. */
export function resultOf(
  columns: Columns,
  own: Partial<Roles> = {},
  spec: Partial<ComparisonSpec> = {},
  rules: readonly Rule[] = [],
): Result {
  const design = applyRules(declareDesign(tableOf(columns), { ...roles, ...own }), rules);
  const scores = scoreDesign(design, MEAN);
  const settings = { ...comparison, ...spec };
  const samples = samplesFor(scores, settings);
  const asked = { samples, comparison: settings, unit: 'ms', direction: 'lower', withheld: false } as const;
  // Rows that resample are slow and not relabelled.
  const closed = fittingEstimators(samples.scope).filter((each) => each.closedForm);
  const findings = closed.map((estimator) => compareRow(estimator, asked));
  const planned = findings.findIndex((finding) => finding.estimator === settings.estimator);
  return { scores, comparison: settings, scope: samples.scope, findings, planned, left: samples.left };
}

/** Participants x two or more alerts x trials with a long right tail; some participants miss an alert. */
export function trialColumns(people = 14, each = 6, alerts = ['tone', 'voice'], seed = 5) {
  const draw = rng(seed);
  const rows = { p: [] as string[], alert: [] as string[], ms: [] as number[], group: [] as string[] };
  for (let who = 0; who < people; who++) {
    const order = who % 3 === 0 ? [...alerts].reverse() : alerts;
    for (const alert of order) {
      for (let t = 0; t < each; t++) {
        rows.p.push(`p${who}`);
        rows.alert.push(alert);
        rows.group.push(who % 2 === 0 ? 'old' : 'new');
        const tail = -180 * Math.log(1 - draw.uniform()) + (draw.below(25) === 0 ? 2500 : 0);
        rows.ms.push(Math.round(500 + 20 * who - (alert === 'voice' ? 40 : 0) + tail));
      }
    }
  }
  return rows;
}

/** Two groups of one score each. */
export function groupColumns(x: ArrayLike<number>, y: ArrayLike<number>) {
  const all = [...Array.from(x), ...Array.from(y)];
  return {
    p: all.map((_, i) => `p${i}`),
    alert: all.map((_, i) => (i < x.length ? 'voice' : 'tone')),
    ms: all,
  };
}

/** Roles of groupColumns. */
export const GROUPS: Partial<Roles> = { within: [], between: ['alert'], rows: 'one score' };

export function extreme(measure: ExtremeRule['measure'], cutoff: number | null, scope: ExtremeRule['scope']): Rule {
  return { rule: 'extreme', on: 'trial', column: 'ms', measure, cutoff, scope, sides: 'both' };
}

/** Every rule with every row. */
export function points(rules: readonly (readonly Rule[])[], rows: readonly [string, number][]): GridPoint[] {
  return rules.flatMap((own) =>
    rows.map(([estimator, trim]): GridPoint => ({ rules: own, estimator, trim, score: MEAN })),
  );
}

export function planned(
  result: Result,
  own: readonly GridPoint[],
  { claim = claimLower, relabellings = 99, seed = 1 }: { claim?: ClaimSpec; relabellings?: number; seed?: number } = {},
): JointPlan {
  const plan = planJoint({ result, claim, points: own, relabellings, seed });
  if (typeof plan === 'string') throw new Error(plan);
  return plan;
}

/** Runs a plan in as many shards as it says. */
export async function runPlan(plan: JointPlan): Promise<Joint> {
  const parts = [];
  for (const shard of jointShards(plan)) parts.push(await countJoint({ plan, ...shard }, noPause));
  return finishJoint(plan, parts);
}

/** p of a joint statistic. */
export function pOf(joint: Joint, name: string): number {
  const found = joint.statistics.find((each) => each.name === name);
  if (found === undefined || found.p === null) throw new Error(`no p of ${name}`);
  return found.p;
}
