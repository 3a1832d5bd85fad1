import type { JobEnv } from './runner.ts';

/** A table of jobs: pure functions of plain data by name. */
export type JobTable = { readonly [name: string]: (args: never, env: JobEnv) => unknown };

/** A runner of the jobs of one table; with the program's own table this is `Runner`. */
export interface RunnerOf<T extends JobTable> {
  run<N extends keyof T & string>(name: N, args: Parameters<T[N]>[0], env: JobEnv): Promise<Awaited<ReturnType<T[N]>>>;
  close(): void;
}
