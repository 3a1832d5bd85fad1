import type { Step } from '../analysis/checks-envelope.ts';
import { Pauses } from './pauses.ts';
import type { JobEnv } from './runner.ts';

/** Tells a job's share done and lets messages through, so that it can be stopped. */
export function stepOf({ signal, progress }: JobEnv): Step {
  const pauses = new Pauses(signal);
  return async (share) => {
    progress(share);
    await pauses.pause();
  };
}
