import { describe, expect, test } from 'vitest';
import { Refusal } from '../../src/data/refusal.ts';
import { PATIENCE } from '../../src/workers/crew.ts';
import type { FromWorker, ToWorker } from '../../src/workers/messages.ts';
import { workerPool } from '../../src/workers/pool.ts';
import { serveJobs } from '../../src/workers/serve.ts';
import { testJobs } from '../support/jobs.ts';

/** A page's worker acted out in this thread: messages are copied and arrive later, an ended worker says nothing more. */
class ActedWorker {
  onmessage: ((event: { data: FromWorker }) => void) | null = null;
  onmessageerror: (() => void) | null = null;
  onerror: ((event: { message: string; preventDefault(): void }) => void) | null = null;
  ended = false;
  #take: (message: ToWorker) => void = () => undefined;

  constructor(deaf = false) {
    if (deaf) return;
    serveJobs(
      {
        post: (message) => this.#later(() => this.onmessage?.({ data: structuredClone(message) })),
        listen: (take) => {
          this.#take = take;
        },
      },
      testJobs,
    );
  }

  postMessage(message: ToWorker): void {
    const copy = structuredClone(message);
    this.#later(() => this.#take(copy));
  }

  terminate(): void {
    this.ended = true;
  }

  #later(act: () => void): void {
    setImmediate(() => {
      if (!this.ended) act();
    });
  }
}

function poolOf(size: number, deaf: (index: number) => boolean = () => false) {
  const workers: ActedWorker[] = [];
  const create = () => {
    const worker = new ActedWorker(deaf(workers.length));
    workers.push(worker);
    return worker as unknown as Worker;
  };
  return { workers, pool: workerPool<typeof testJobs>({ create, size }) };
}

const env = (signal = new AbortController().signal) => ({ signal, progress: () => undefined });

describe('workerPool', () => {
  test('by hand: workers are made when there is work, never more than the size', async () => {
    const { pool, workers } = poolOf(3);
    expect(workers.length).toBe(0);
    expect(await pool.run('sum', [1, 2], env())).toBe(3);
    expect(workers.length).toBe(1);
    await Promise.all(Array.from({ length: 9 }, () => pool.run('count', { to: 2, ms: 2 }, env())));
    expect(workers.length).toBe(3);
    pool.close();
    expect(workers.every((worker) => worker.ended)).toBe(true);
  });

  test('refuses: a refusal crosses as a Refusal', async () => {
    const { pool } = poolOf(1);
    await expect(pool.run('refuse', 'Too few.', env())).rejects.toBeInstanceOf(Refusal);
    await expect(pool.run('fail', 'x', env())).rejects.not.toBeInstanceOf(Refusal);
  });

  test('by hand: a worker that does not answer a cancel is ended after its time, and replaced', async () => {
    const { pool, workers } = poolOf(1, (index) => index === 0);
    const controller = new AbortController();
    const stuck = pool.run('sum', [1], env(controller.signal));
    const behind = pool.run('sum', [2], env());
    const began = performance.now();
    controller.abort(new Error('enough'));
    await expect(stuck).rejects.toThrow('enough');
    expect(performance.now() - began).toBeLessThan(PATIENCE);
    expect(await behind).toBe(2);
    expect(performance.now() - began).toBeGreaterThanOrEqual(PATIENCE - 5);
    expect([workers.length, workers[0]?.ended]).toEqual([2, true]);
  });

  test('by hand: a worker that reports an error is replaced and its job run again', async () => {
    const { pool, workers } = poolOf(1, (index) => index === 0);
    const running = pool.run('sum', [1, 2, 3], env());
    workers[0]?.onerror?.({ message: 'out of memory', preventDefault: () => undefined });
    expect(await running).toBe(6);
    expect(workers.length).toBe(2);
  });

  test('refuses: workers that can never start, or cannot be made', async () => {
    const { pool, workers } = poolOf(1, () => true);
    const running = pool.run('sum', [1], env());
    for (const index of [0, 1]) workers[index]?.onerror?.({ message: '', preventDefault: () => undefined });
    await expect(running).rejects.toThrow('broke off twice (the worker could not start)');
    const create = () => {
      throw new Error('blocked by the policy');
    };
    await expect(workerPool<typeof testJobs>({ create, size: 1 }).run('sum', [1], env())).rejects.toThrow('blocked');
  });

  test('invariance: an answer that comes after the cancel changes nothing', async () => {
    const { pool } = poolOf(1);
    const controller = new AbortController();
    const shares: number[] = [];
    const running = pool.run('count', { to: 1, ms: 0 }, { signal: controller.signal, progress: (s) => shares.push(s) });
    controller.abort(new Error('enough'));
    await expect(running).rejects.toThrow('enough');
    expect(await pool.run('sum', [7], env())).toBe(7);
    expect(shares).toEqual([]);
  });
});
