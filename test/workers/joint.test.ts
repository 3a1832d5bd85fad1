import { Worker } from 'node:worker_threads';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { finishJoint, jointShards } from '../../src/analysis/joint.ts';
import type { RunnerOf } from '../../src/workers/job-table.ts';
import type { Jobs } from '../../src/workers/jobs.ts';
import { nodePool } from '../../src/workers/node-pool.ts';
import { bundleWorker } from '../support/bundle-worker.ts';
import { extreme, planned, points, resultOf, runPlan, trialColumns } from '../support/joint.ts';

let pools: readonly RunnerOf<Jobs>[] = [];

beforeAll(async () => {
  const script = await bundleWorker(new URL('../support/serve-jobs.ts', import.meta.url), 'node');
  pools = [1, 2, 4].map((size) => nodePool<Jobs>({ create: () => new Worker(script, { eval: true }), size }));
}, 60_000);
afterAll(() => {
  for (const pool of pools) pool.close();
});

describe('joint inference in workers', () => {
  test('invariance: 1, 2 and 4 workers and none give identical digits', async () => {
    const rules = [[], [extreme('MAD', 2, 'participant')], [extreme('SD', 2, 'condition')]];
    const own = points(rules, [
      ['paired-t', 0],
      ['trimmed-differences', 20],
      ['signed-rank', 0],
    ]);
    const plan = planned(resultOf(trialColumns(18, 3)), own, { relabellings: 600 });
    const here = await runPlan(plan);
    expect(jointShards(plan)).toHaveLength(3);
    for (const pool of pools) {
      const env = { signal: new AbortController().signal, progress: () => undefined };
      const parts = await Promise.all(jointShards(plan).map((shard) => pool.run('joint', { plan, ...shard }, env)));
      expect(finishJoint(plan, parts)).toEqual(here);
    }
  });
});
