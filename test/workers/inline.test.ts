import { describe, expect, test } from 'vitest';
import { Refusal } from '../../src/data/refusal.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import { testJobs } from '../support/jobs.ts';

const env = (signal = new AbortController().signal) => ({ signal, progress: () => undefined });

describe('inlineRunner', () => {
  test('by hand: jobs run one after another in the order asked, each with its result', async () => {
    const runner = inlineRunner(testJobs);
    const order: string[] = [];
    const sums = [
      runner.run('sum', [1, 2], env()).then((sum) => order.push(`${sum}`)),
      runner.run('count', { to: 3, ms: 5 }, env()).then((to) => order.push(`${to}`)),
      runner.run('sum', [3, 4], env()).then((sum) => order.push(`${sum}`)),
    ];
    await Promise.all(sums);
    expect(order).toEqual(['3', '3', '7']);
  });

  test('by hand: progress is told', async () => {
    const shares: number[] = [];
    const signal = new AbortController().signal;
    await inlineRunner(testJobs).run('count', { to: 4, ms: 0 }, { signal, progress: (share) => shares.push(share) });
    expect(shares).toEqual([0.25, 0.5, 0.75, 1]);
  });

  test('refuses: a refusal of the job, and the next job still runs', async () => {
    const runner = inlineRunner(testJobs);
    const refused = runner.run('refuse', 'Too few are kept.', env());
    await expect(refused).rejects.toBeInstanceOf(Refusal);
    await expect(refused).rejects.toThrow('Too few are kept.');
    expect(await runner.run('sum', [1], env())).toBe(1);
  });

  test('by hand: a job that is stopped before its turn never begins; one that heeds its signal stops', async () => {
    const runner = inlineRunner(testJobs);
    const first = new AbortController();
    const second = new AbortController();
    const running = runner.run('count', { to: 1000, ms: 5 }, env(first.signal));
    const queued = runner.run('sum', [1], env(second.signal));
    second.abort(new Error('not needed'));
    setTimeout(() => first.abort(new Error('enough')), 20);
    await expect(running).rejects.toThrow('enough');
    await expect(queued).rejects.toThrow('not needed');
  });

  test('refuses: a job that is not in the table, and any job once closed', async () => {
    const runner = inlineRunner(testJobs);
    await expect(runner.run('toString' as 'sum', [], env())).rejects.toThrow('got "toString"');
    runner.close();
    await expect(runner.run('sum', [1], env())).rejects.toThrow('closed');
  });
});
