import { Worker } from 'node:worker_threads';
import { expect, test } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { recordResults } from '../../src/replay/record.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import { nodePool } from '../../src/workers/node-pool.ts';
import { bundleWorker } from '../support/bundle-worker.ts';
import { fuzzBase } from '../support/fuzz-base.ts';
import { countFor, noteLongRun } from '../support/long-run.ts';

test('invariance: workers killed in the middle are replaced, and every result is the same as without workers', async ({
  task,
}) => {
  const base = fuzzBase('whole');
  const { results } = await recordResults(base, registry, inlineRunner(), '0.1.0');
  const script = await bundleWorker(new URL('../support/serve-all-jobs.ts', import.meta.url), 'node');
  const count = countFor(2, 100);
  let killed = 0;
  for (let i = 0; i < count; i++) {
    const workers: Worker[] = [];
    const create = () => {
      const worker = new Worker(script, { eval: true });
      workers.push(worker);
      return worker;
    };
    const runner = nodePool({ create, size: 2 });
    const kill = async (first: Worker) => {
      await new Promise((resolve) => setTimeout(resolve, 40 + 160 * i));
      await first.terminate();
      killed++;
    };
    const computing = recordResults(base, registry, runner, '0.1.0');
    while (workers[0] === undefined) await new Promise((resolve) => setTimeout(resolve, 1));
    // once only: a job whose worker breaks twice is given up
    await kill(workers[0]);
    expect((await computing).results).toEqual(results);
    runner.close();
  }
  expect(killed).toBe(count);
  noteLongRun(task, { count: `${count} workers killed`, outcome: 'every result unchanged' });
}, 600_000);
