/** Joint inference as a cell runs it: the plan in one job, the relabellings in as many as there are shards. */
import { estimatorOf } from '../src/analysis/estimators.ts';
import { finishJoint, type Joint, type JointStatistic, jointShards } from '../src/analysis/joint.ts';
import type { GridPoint, JointRequest } from '../src/analysis/joint-plan.ts';
import type { ScoreSpec } from '../src/analysis/score.ts';
import type { Specification } from '../src/analysis/sweep.ts';
import type { Env } from './kind.ts';
import { count, pValue } from './numbers.ts';

/** The joint inference, or a sentence that says why there is none. */
export async function runJoint(request: JointRequest, env: Env): Promise<Joint | string> {
  const plan = await env.run('jointPlan', request);
  if (typeof plan === 'string') return plan;
  const parts = await Promise.all(jointShards(plan).map((shard) => env.run('joint', { plan, ...shard })));
  return finishJoint(plan, parts);
}

/** Places of the analyses that enter: rows that resample have no place inside a relabelling; with a margin only rows in the unit are judged. */
export function enteringPlaces(specifications: readonly Specification[], margin: number): number[] {
  return specifications.flatMap(({ finding }, place) => {
    const closed = estimatorOf(finding.estimator)?.closedForm === true;
    return closed && finding.estimate !== null && (margin === 0 || finding.sameUnit) ? [place] : [];
  });
}

/** An analysis as settings; `score` is that of the worksheet where the analysis has none of its own. */
export function pointOf(specification: Specification & { readonly score?: ScoreSpec }, score: ScoreSpec): GridPoint {
  const { rules, finding } = specification;
  return { rules, score: specification.score ?? score, estimator: finding.estimator, trim: finding.trim };
}

/** "joint p = .003 (average Z, 1,999 relabellings)". */
export function sayJoint(joint: Joint | null, reason: string | null, statistic: JointStatistic): string {
  if (joint === null) return `no joint p: ${reason ?? 'not worked out'}`;
  const found = joint.statistics.find(({ name }) => name === statistic);
  if (found === undefined || found.p === null) return 'no joint p: no analysis of the grid gives a test';
  const how = joint.enumerated ? `all ${count(joint.relabellings)}` : count(joint.relabellings);
  return `joint ${pValue(found.p)} (${statistic}, ${how} relabellings)`;
}
