import { Worker } from 'node:worker_threads';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { Refusal } from '../../src/data/refusal.ts';
import type { RunnerOf } from '../../src/workers/job-table.ts';
import { nodePool } from '../../src/workers/node-pool.ts';
import { bundleWorker } from '../support/bundle-worker.ts';
import type { testJobs } from '../support/jobs.ts';

let script = '';
let made = 0;
let pool: RunnerOf<typeof testJobs>;

function create(): Worker {
  made++;
  return new Worker(script, { eval: true });
}

beforeAll(async () => {
  script = await bundleWorker(new URL('../support/serve-test-jobs.ts', import.meta.url), 'node');
  pool = nodePool<typeof testJobs>({ create, size: 2 });
}, 60_000);
afterAll(() => pool.close());

const env = (signal = new AbortController().signal) => ({ signal, progress: () => undefined });

describe('nodePool', () => {
  test('by hand: results come back to who asked, whatever the order of finishing', async () => {
    const asked = Array.from({ length: 20 }, (_, i) => pool.run('count', { to: 1, ms: 20 - i }, env()).then(() => i));
    expect(await Promise.all(asked)).toEqual(Array.from({ length: 20 }, (_, i) => i));
    expect(made).toBe(2);
  });

  test('by hand: typed arrays, missing values and null cross unchanged', async () => {
    const value = {
      scores: Float64Array.of(1.5, Number.NaN),
      marks: Uint8Array.of(0, 1),
      none: null,
      list: [{ a: 'b' }],
    };
    expect(await pool.run('echo', value, env())).toEqual(value);
  });

  test('refuses: a refusal crosses as a Refusal, another error with its name and message', async () => {
    const refused = pool.run('refuse', 'Only 3 participants are kept: choose a wider cutoff.', env());
    await expect(refused).rejects.toBeInstanceOf(Refusal);
    await expect(refused).rejects.toThrow('Only 3 participants are kept: choose a wider cutoff.');
    const failed = pool.run('fail', 'out of range', env());
    await expect(failed).rejects.toMatchObject({ name: 'TypeError', message: 'out of range' });
    await expect(failed).rejects.not.toBeInstanceOf(Refusal);
  });

  test('refuses: unknown jobs and arguments that cannot be sent; the workers stay usable', async () => {
    await expect(pool.run('toString' as 'sum', [], env())).rejects.toThrow('got "toString"');
    await expect(pool.run('echo', () => 1, env())).rejects.toThrow('could not be cloned');
    const busy = [1, 2].map(() => pool.run('count', { to: 2, ms: 10 }, env()));
    const behind = [pool.run('echo', () => 1, env()), pool.run('sum', [1, 2], env())];
    expect((await Promise.allSettled(behind)).map((each) => each.status)).toEqual(['rejected', 'fulfilled']);
    expect(await Promise.all(busy)).toEqual([2, 2]);
    expect(made).toBe(2);
  });

  test('by hand: progress is told at least five times a second, and at the end', async () => {
    const shares: number[] = [];
    const signal = new AbortController().signal;
    await pool.run('count', { to: 50, ms: 10 }, { signal, progress: (share) => shares.push(share) });
    expect(shares.length).toBeGreaterThanOrEqual(3);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
    expect(shares.at(-1)).toBe(1);
  });

  test('by hand: a cancelled job rejects at once, and the worker that heeds is kept', async () => {
    const controller = new AbortController();
    const reason = new Error('a newer edit');
    const running = pool.run('count', { to: 10_000, ms: 5 }, env(controller.signal));
    setTimeout(() => controller.abort(reason), 30);
    await expect(running).rejects.toBe(reason);
    await new Promise((resolve) => setTimeout(resolve, 50));
    expect(await Promise.all([pool.run('sum', [1], env()), pool.run('sum', [2], env())])).toEqual([1, 2]);
    expect(made).toBe(2);
  });

  test('by hand: a job cancelled before its turn, or asked with a signal already aborted, never begins', async () => {
    const controller = new AbortController();
    const busy = [1, 2].map(() => pool.run('count', { to: 4, ms: 10 }, env()));
    const queued = pool.run('sum', [1], env(controller.signal));
    controller.abort(new Error('gone'));
    await expect(queued).rejects.toThrow('gone');
    await expect(pool.run('sum', [1], env(controller.signal))).rejects.toThrow('gone');
    expect(await Promise.all(busy)).toEqual([4, 4]);
  });

  test('by hand: a job that does not heed is ended with its worker, and the job behind it still runs', async () => {
    const before = made;
    const single = nodePool<typeof testJobs>({ create, size: 1 });
    const controller = new AbortController();
    const blocked = single.run('block', 20_000, env(controller.signal));
    const behind = single.run('sum', [4, 5], env());
    await new Promise((resolve) => setTimeout(resolve, 100));
    controller.abort(new Error('enough'));
    await expect(blocked).rejects.toThrow('enough');
    expect(await behind).toBe(9);
    expect(made).toBe(before + 2);
    single.close();
  });

  test('by hand: a worker that is killed is replaced and its job run again', async () => {
    const workers: Worker[] = [];
    const single = nodePool<typeof testJobs>({
      create: () => {
        workers.push(create());
        return workers.at(-1) as Worker;
      },
      size: 1,
    });
    const running = single.run('count', { to: 20, ms: 5 }, env());
    await new Promise((resolve) => setTimeout(resolve, 150));
    await workers[0]?.terminate();
    expect(await running).toBe(20);
    expect(workers.length).toBeLessThanOrEqual(2);
    single.close();
  });

  test('refuses: a job whose worker breaks twice, and every job once closed', async () => {
    const broken = nodePool<typeof testJobs>({ create: () => new Worker('process.exit(3)', { eval: true }), size: 1 });
    await expect(broken.run('sum', [1], env())).rejects.toThrow('broke off twice (the thread ended with code 3)');
    broken.close();
    const closing = nodePool<typeof testJobs>({ create, size: 1 });
    const cut = closing.run('count', { to: 1000, ms: 5 }, env());
    closing.close();
    await expect(cut).rejects.toThrow('the runner is closed');
    await expect(closing.run('sum', [1], env())).rejects.toThrow('the runner is closed');
    expect(() => nodePool({ create, size: 0 })).toThrow('*size*');
  });
});
