import type { LongWork } from '../analysis/flip-set.ts';
import { Pauses } from './pauses.ts';
import type { JobEnv } from './runner.ts';

/** What a long computation needs, from the environment of its job. */
export function longWork({ signal, progress }: JobEnv): LongWork {
  const pauses = new Pauses(signal);
  return { pause: () => pauses.pause(), progress };
}
