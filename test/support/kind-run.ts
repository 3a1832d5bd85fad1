import type { Computed, Context, Env, Kind, Part, Settings, SharedNumber, StoredData } from '../../cells/kind.ts';
import { jobs } from '../../src/workers/jobs.ts';

/** What a kind may look at, with nothing shared and nothing above unless said. */
export function contextOf(given: Context['given'] = {}, more: Partial<Context> = {}): Context {
  return { shared: [], given, data: [], ...more };
}

/** An environment that runs jobs in place. */
export function envOf(data: readonly StoredData[] = []): Env {
  const env = { signal: new AbortController().signal, progress: () => undefined };
  return {
    run: async (name, args) => (jobs[name] as (args: unknown, env: unknown) => never)(args, env),
    ...env,
    data: (id) => data.find((each) => each.id === id),
    seed: 7,
  };
}

/** Computes a cell of a kind as the engine would. */
export async function run<V = unknown, D = unknown>(
  kind: Kind,
  settings: Settings,
  given: Context['given'] = {},
  data: readonly StoredData[] = [],
): Promise<Computed<V, D>> {
  return (await kind.compute(settings, given, envOf(data))) as Computed<V, D>;
}

/** The blank of that key in a sentence. */
export function blankOf(parts: readonly Part[], key: string) {
  const found = parts.find((part) => typeof part !== 'string' && part.key === key);
  if (found === undefined || typeof found === 'string') throw new Error(`no blank ${key}`);
  return found;
}

/** Fills a choice blank and gives the settings the cell would have. */
export function choose(parts: readonly Part[], key: string, value: string): Settings {
  const { editor } = blankOf(parts, key);
  if (editor.type !== 'choice') throw new Error(`${key} is no choice`);
  return editor.set(value);
}

/** A shared number as tests need it. */
export function sharedOf(id: string, value: number | null, unit = ''): SharedNumber {
  return { id, name: id, value, unit, min: 0, max: 100, step: 1, none: true };
}
