/** Joint inference as a cell runs it: the plan in one job, the relabellings in as many as there are shards. */
import { finishJoint, type Joint, jointShards } from '../src/analysis/joint.ts';
import type { JointRequest } from '../src/analysis/joint-plan.ts';
import type { Env } from './kind.ts';

/** The joint inference, or a sentence that says why there is none. */
export async function runJoint(request: JointRequest, env: Env): Promise<Joint | string> {
  const plan = await env.run('jointPlan', request);
  if (typeof plan === 'string') return plan;
  const parts = await Promise.all(jointShards(plan).map((shard) => env.run('joint', { plan, ...shard })));
  return finishJoint(plan, parts);
}
