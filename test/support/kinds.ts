import {
  type Computed,
  type Context,
  type Env,
  type Json,
  type Kind,
  Refusal,
  type Registry,
  type Settings,
} from '../../cells/kind.ts';

/** A kind for tests: reads and gives plain numbers and arrays, whatever the port's type is called. */
export function testKind(part: Partial<Kind> & Pick<Kind, 'name' | 'compute'>): Kind {
  return {
    version: 1,
    offer: null,
    takes: {},
    gives: 'table',
    blind: 'same',
    title: () => part.name,
    defaults: () => ({}),
    check: () => [],
    sentence: () => [part.name],
    say: (computed) => String(computed.value),
    record: (computed) => computed.value as Json,
    ...part,
  };
}

const later = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));

/** Waits, telling its progress; stops when the signal is aborted. */
export async function wait(ms: number, env: Env): Promise<void> {
  const end = performance.now() + ms;
  for (let step = 1; performance.now() < end; step++) {
    await later(Math.min(5, ms));
    env.signal.throwIfAborted();
    env.progress(Math.min(1, (step * 5) / ms));
  }
}

/** Gives the number of its settings; refuses negative ones. */
export const numberKind = testKind({
  name: 'number',
  check: (settings: Settings, context: Context) => {
    const value = settings.value as { shared: string } | number | null | undefined;
    if (value === undefined) return ['Fill in the number.'];
    const shown =
      value !== null && typeof value === 'object' ? context.shared.find((s) => s.id === value.shared) : null;
    return shown?.value === 99 ? ['99 is not allowed here.'] : [];
  },
  compute: (settings: Settings): Computed<unknown> => {
    const value = settings.value as number;
    if (value < 0) throw new Refusal(`The number ${value} is negative: choose one of 0 or more.`);
    return { value: [value], detail: { value } };
  },
});

/** Adds the number of its settings to what it reads. */
export const addKind = testKind({
  name: 'add',
  takes: { from: 'table' },
  compute: (settings, given) => {
    const value = [((given.from as number[])[0] as number) + ((settings.by as number) ?? 0)];
    return { value, detail: null };
  },
});

/** Half of what it reads, rounded down: different inputs can give equal values. */
export const halfKind = testKind({
  name: 'half',
  takes: { from: 'table' },
  compute: (_settings, given) => {
    const [read] = given.from as [number];
    return { value: [Math.floor(read / 2)], detail: { read } };
  },
});

/** Takes `ms` milliseconds, honours its signal, and gives what it reads as scores. */
export const slowKind = testKind({
  name: 'slow',
  takes: { from: 'table' },
  gives: 'scores',
  compute: async (settings, given, env) => {
    await wait(settings.ms as number, env);
    return { value: given.from, detail: null };
  },
});

/** Reads scores; cannot be computed while blind. */
export const veiledKind = testKind({
  name: 'veiled',
  takes: { from: 'scores' },
  gives: 'result',
  blind: 'veil',
  compute: (_settings, given) => ({ value: given.from, detail: null }),
});

/** Reads two tables; while blind it gives their number only. */
export const pairKind = testKind({
  name: 'pair',
  takes: { first: 'table', second: 'table' },
  gives: 'scores',
  blind: ((computed: Computed<readonly number[]>) => ({ value: computed.value.length, detail: 'hidden' })) as never,
  compute: (_settings, given) => ({
    value: [...(given.first as number[]), ...(given.second as number[])],
    detail: 'open',
  }),
});

/** Gives the number of rows of a data block. */
export const dataKind = testKind({
  name: 'data',
  compute: (settings, _given, env) => ({ value: [env.data(settings.data as string)?.rows ?? 0], detail: null }),
});

/** Goes wrong as a defect of the program does. */
export const brokenKind = testKind({
  name: 'broken',
  takes: { from: 'table' },
  compute: () => {
    throw new TypeError('x is not a function');
  },
});

export const testRegistry: Registry = Object.fromEntries(
  [numberKind, addKind, halfKind, slowKind, veiledKind, pairKind, dataKind, brokenKind].map((kind) => [
    kind.name,
    kind,
  ]),
);
