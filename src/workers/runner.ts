import type { Jobs } from './jobs.ts';

/** What a running job may use: stop when `signal` is aborted, tell its share done (0 to 1). */
export interface JobEnv {
  readonly signal: AbortSignal;
  readonly progress: (share: number) => void;
}

export type JobName = keyof Jobs;
export type JobArgs<N extends JobName> = Parameters<Jobs[N]>[0];
export type JobResult<N extends JobName> = Awaited<ReturnType<Jobs[N]>>;

/** Runs a job of the table by name; rejects with `signal.reason` when aborted, with a Refusal where the job refuses. */
export interface Runner {
  run<N extends JobName>(name: N, args: JobArgs<N>, env: JobEnv): Promise<JobResult<N>>;
  /** Ends every worker; the runner cannot be used afterwards. */
  close(): void;
}
