import type { TaskMeta } from 'vitest';

/** What a test with raised counts reports for the dated table of DEVELOPERS.md. */
export interface LongRun {
  /** "10,000 files", "200 kills". */
  readonly count: string;
  /** What came out: "none misread", "largest error 3.1e-13". */
  readonly outcome: string;
}

declare module 'vitest' {
  interface TaskMeta {
    longRun?: LongRun;
  }
}

/** Whether this is npm run test:long. */
export const isLong = process.env.STANDFAST_LONG === '1';

/** The usual count of a test, or its full count in npm run test:long. */
export function countFor(usual: number, full: number): number {
  return isLong ? full : usual;
}

/** Puts a line of this test into the table: `test('...', ({ task }) => { ...; noteLongRun(task, {...}) })`. */
export function noteLongRun(task: { readonly meta: TaskMeta }, run: LongRun): void {
  task.meta.longRun = run;
}
