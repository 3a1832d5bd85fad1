/// <reference types="vite/client" />
import JobsWorker from '../workers/entry.ts?worker&inline';

/** A worker with the jobs of the program, its script carried inside the page. */
export function makeWorker(): Worker {
  return new JobsWorker();
}
