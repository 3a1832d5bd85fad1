import type { JobTable, RunnerOf } from './job-table.ts';
import { jobs as allJobs } from './jobs.ts';
import { Pauses } from './pauses.ts';

/**
 * A runner in the same thread: jobs run one after another, and one that was stopped before its turn never begins. For
 * tests, Node commands and small work; a long job that does not pause blocks the thread.
 */
export function inlineRunner(): RunnerOf<typeof allJobs>;
export function inlineRunner<T extends JobTable>(jobs: T): RunnerOf<T>;
export function inlineRunner(jobs: JobTable = allJobs): RunnerOf<JobTable> {
  let before: Promise<unknown> = Promise.resolve();
  let closed = false;
  const pauses = new Pauses();
  return {
    run(name, args, env) {
      const job = Object.hasOwn(jobs, name) ? jobs[name] : undefined;
      const turn = before.then(async () => {
        await pauses.pause();
        if (closed) throw new Error('the runner is closed');
        env.signal.throwIfAborted();
        if (job === undefined) throw new RangeError(`*name* must be a job of the table; got "${name}"`);
        const result = await job(args as never, env);
        env.signal.throwIfAborted();
        return result as never;
      });
      before = turn.catch(() => undefined);
      return turn;
    },
    close() {
      closed = true;
    },
  };
}
