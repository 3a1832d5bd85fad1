import type { JobTable } from './job-table.ts';
import { type FromWorker, failureOf, type ToWorker } from './messages.ts';

/** The worker's side of the way to the page or the main thread. */
export interface Port {
  post(message: FromWorker): void;
  listen(take: (message: ToWorker) => void): void;
}

/** Milliseconds between two words about a job's progress. */
const PROGRESS_EVERY = 50;

/** Runs the jobs that arrive, each in turn as it comes; a job that lets messages through can be cancelled. */
export function serveJobs(port: Port, jobs: JobTable): void {
  const running = new Map<number, AbortController>();
  port.listen((message) => {
    if (message.type === 'cancel') {
      running.get(message.id)?.abort(new DOMException('cancelled', 'AbortError'));
      return;
    }
    const controller = new AbortController();
    running.set(message.id, controller);
    void answer(port, jobs, message, controller.signal).finally(() => running.delete(message.id));
  });
}

async function answer(
  port: Port,
  jobs: JobTable,
  { id, name, args }: ToWorker & { type: 'run' },
  signal: AbortSignal,
): Promise<void> {
  try {
    const job = Object.hasOwn(jobs, name) ? jobs[name] : undefined;
    if (job === undefined) throw new RangeError(`*name* must be a job of the table; got "${name}"`);
    const result = await job(args as never, { signal, progress: progressTo(port, id) });
    if (signal.aborted) port.post({ type: 'cancelled', id });
    else port.post({ type: 'done', id, result });
  } catch (error) {
    if (signal.aborted) port.post({ type: 'cancelled', id });
    else port.post({ type: 'failed', id, failure: failureOf(error) });
  }
}

function progressTo(port: Port, id: number): (share: number) => void {
  let last = Number.NEGATIVE_INFINITY;
  return (share) => {
    const now = performance.now();
    if (now - last < PROGRESS_EVERY && share < 1) return;
    last = now;
    port.post({ type: 'progress', id, share });
  };
}
