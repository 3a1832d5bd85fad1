import { availableParallelism } from 'node:os';
import { isMainThread, parentPort, Worker, workerData } from 'node:worker_threads';
import { type CrewWorker, crewOf } from './crew.ts';
import type { JobTable, RunnerOf } from './job-table.ts';
import { type Jobs, jobs } from './jobs.ts';
import type { FromWorker, ToWorker } from './messages.ts';
import { type Port, serveJobs } from './serve.ts';

const MARK = 'standfast worker';

export interface NodePoolOptions {
  /** Makes a thread that serves jobs; by default one that runs the bundle this module stands in. */
  readonly create?: () => Worker;
  /** How many at most; by default as many as the machine has cores, 2 to 8. */
  readonly size?: number;
}

/** A runner with the worker threads of Node. */
export function nodePool<T extends JobTable = Jobs>({ create, size }: NodePoolOptions = {}): RunnerOf<T> {
  // A command is one bundled file, and every bundle with this module in it serves jobs when it is run as a thread.
  const make = create ?? (() => new Worker(new URL(import.meta.url), { workerData: MARK }));
  return crewOf<T>(() => crewWorker(make()), size ?? Math.min(8, Math.max(2, availableParallelism())));
}

/** Serves jobs in this thread, whichever way it was started. */
export function serveInThread(table: JobTable): void {
  if (parentPort === null) throw new TypeError('*thread* must be a worker thread; got the main thread');
  const parent = parentPort;
  const port: Port = {
    post: (message) => parent.postMessage(message),
    listen: (take) => parent.on('message', (message: ToWorker) => take(message)),
  };
  serveJobs(port, table);
}

function crewWorker(worker: Worker): CrewWorker {
  // An idle thread must not keep a command from ending; one with a job must.
  worker.unref();
  return {
    post: (message) => {
      if (message.type === 'run') worker.ref();
      worker.postMessage(message);
    },
    listen(take, broken) {
      worker.on('message', (message: FromWorker) => {
        if (message.type !== 'progress') worker.unref();
        take(message);
      });
      worker.on('messageerror', () => broken('its answer could not be read'));
      worker.on('error', (error: unknown) => broken(error instanceof Error ? error.message : String(error)));
      worker.on('exit', (code) => broken(`the thread ended with code ${code}`));
    },
    end: () => void worker.terminate(),
  };
}

if (!isMainThread && workerData === MARK) serveInThread(jobs);
