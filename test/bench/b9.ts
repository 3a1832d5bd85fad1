import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { Worker } from 'node:worker_threads';
import { nodePool } from '../../src/workers/node-pool.ts';
import { shardsOf } from '../../src/workers/shards.ts';
import { bundleWorker } from '../support/bundle-worker.ts';
import { B9_MARK, type b9Jobs } from './b9-jobs.ts';
import type { BenchRow } from './bench-row.ts';
import { benchScores } from './scores.ts';

const SHARD = 500;
const ROUNDS = 7;

/** Relabellings of a whole, cut into shards; the parts are merged in the order of the shards. */
async function relabelled(pool: ReturnType<typeof nodePool<typeof b9Jobs>>, scores: Float64Array, total: number) {
  const signal = new AbortController().signal;
  const shards = shardsOf(total, SHARD).map(({ index, from, to }) =>
    pool.run('relabel', { scores, seed: 1, stream: index, count: to - from }, { signal, progress: () => undefined }),
  );
  return (await Promise.all(shards)).reduce((sum, each) => sum + each, 0);
}

/**
 * Two workers against one. Wall-clock medians: the CPU time of both is the same by definition, and what two workers
 * gain is time on the wall.
 */
export async function rows(): Promise<BenchRow[]> {
  // Commands run from the top of the repository, where the sources lie.
  const source = pathToFileURL(join(process.cwd(), 'test/bench/b9-jobs.ts'));
  const script = await bundleWorker(source, 'node');
  const create = () => new Worker(script, { eval: true, workerData: B9_MARK });
  const pools = [1, 2].map((size) => nodePool<typeof b9Jobs>({ create, size }));
  const scores = benchScores(80);
  const all: BenchRow[] = [];
  try {
    for (const total of [10_000, 40_000]) all.push(await rowOf(pools, scores, total));
  } finally {
    for (const pool of pools) pool.close();
  }
  return all;
}

async function rowOf(
  pools: readonly ReturnType<typeof nodePool<typeof b9Jobs>>[],
  scores: Float64Array,
  total: number,
): Promise<BenchRow> {
  const times = pools.map((): number[] => []);
  const results = new Set<number>();
  for (let round = -1; round < ROUNDS; round++) {
    for (const [i, pool] of pools.entries()) {
      const began = performance.now();
      results.add(await relabelled(pool, scores, total));
      // The first round starts the threads.
      if (round >= 0) times[i]?.push(performance.now() - began);
    }
  }
  if (results.size !== 1) throw new Error(`one and two workers must agree; got ${[...results].join(', ')}`);
  const [one = 0, two = 0] = times.map((each) => each.sort((a, b) => a - b)[ROUNDS >> 1] as number);
  return {
    id: 'B9',
    case: `${total} relabellings of 2 x 40, two workers`,
    ours_ms: two,
    peer: 'one worker',
    peer_ms: one,
    ratio: one / two,
    goal: '>= 1.7',
    note: 'wall-clock',
  };
}
