import { Refusal } from '../../src/data/refusal.ts';
import type { JobEnv } from '../../src/workers/runner.ts';

const later = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));

/** Jobs for the tests of the runners; also bundled into test workers. */
export const testJobs = {
  sum: (numbers: readonly number[]): number => numbers.reduce((sum, each) => sum + each, 0),

  /** Counts up, waiting `ms` after each step; heeds its signal. */
  count: async ({ to, ms }: { to: number; ms: number }, env: JobEnv): Promise<number> => {
    for (let step = 1; step <= to; step++) {
      if (ms > 0) await later(ms);
      env.signal.throwIfAborted();
      env.progress(step / to);
    }
    return to;
  },

  refuse: (sentence: string): never => {
    throw new Refusal(sentence);
  },

  fail: (message: string): never => {
    throw new TypeError(message);
  },

  /** Keeps its thread busy without letting any message through. */
  block: (ms: number): number => {
    const end = performance.now() + ms;
    while (performance.now() < end);
    return ms;
  },

  /** Gives back what it is given, as a worker's copy. */
  echo: (value: unknown): unknown => value,
};
