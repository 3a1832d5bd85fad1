import { type CrewWorker, crewOf } from './crew.ts';
import type { JobTable, RunnerOf } from './job-table.ts';
import type { Jobs } from './jobs.ts';
import type { FromWorker } from './messages.ts';

export interface PoolOptions {
  /** Makes a classic worker that runs entry.ts. */
  readonly create: () => Worker;
  /** How many at most; by default as many as the machine has cores, 2 to 8. */
  readonly size?: number;
}

/** A runner with the workers of a page. */
export function workerPool<T extends JobTable = Jobs>({ create, size }: PoolOptions): RunnerOf<T> {
  // Two even on one core: a short job need not wait behind a long one that is being stopped.
  return crewOf<T>(() => crewWorker(create()), size ?? Math.min(8, Math.max(2, navigator.hardwareConcurrency || 2)));
}

function crewWorker(worker: Worker): CrewWorker {
  return {
    post: (message) => worker.postMessage(message),
    listen(take, broken) {
      worker.onmessage = (event: MessageEvent<FromWorker>) => take(event.data);
      worker.onmessageerror = () => broken('its answer could not be read');
      worker.onerror = (event) => {
        event.preventDefault();
        broken(event.message || 'the worker could not start');
      };
    },
    end: () => worker.terminate(),
  };
}
