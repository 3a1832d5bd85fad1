import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import type { Env, Kind } from '../../cells/kind.ts';
import { Engine } from '../../src/engine/engine.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { testKind, testRegistry, wait } from '../support/kinds.ts';
import { cell, shared, withCell, withShared, worksheet } from '../support/worksheets.ts';

const engines: Engine[] = [];
// Time is acted out, so that a busy machine cannot change what is short and what is long.
beforeEach(() => {
  vi.useFakeTimers({ toFake: ['setTimeout', 'clearTimeout', 'performance'] });
});
afterEach(() => {
  for (const engine of engines.splice(0)) engine.dispose();
  vi.useRealTimers();
});

const later = (ms: number) => new Promise<void>((resolve) => setTimeout(resolve, ms));

/** Lets time pass. */
const pass = (ms: number) => vi.advanceTimersByTimeAsync(ms);

/** Lets time pass until the engine is idle. */
async function settle(engine: Engine): Promise<void> {
  let idle = false;
  void engine.idle().then(() => {
    idle = true;
  });
  for (let ms = 0; !idle; ms++) {
    if (ms > 10_000) throw new Error('the engine never became idle');
    await pass(1);
  }
}

/** Remembers each compute's settings, how it ended, and can be told to ignore its signal. */
function watched(name: string, ms: number, heeds: boolean, log: string[]): Kind {
  return testKind({
    name,
    takes: { from: 'table' },
    compute: async (_settings, given, env: Env) => {
      const [read] = given.from as number[];
      log.push(`${read} begins`);
      try {
        if (heeds) await wait(ms, env);
        else await later(ms);
      } catch (error) {
        log.push(`${read} stopped`);
        throw error;
      }
      log.push(`${read} ends`);
      return { value: [read], detail: null };
    },
  });
}

function engineWith(kinds: readonly Kind[], record: Worksheet) {
  const shown: string[] = [];
  const engine: Engine = new Engine({
    registry: { ...testRegistry, ...Object.fromEntries(kinds.map((kind) => [kind.name, kind])) },
    runner: inlineRunner(),
    onState: (id) => {
      const state = engine.state(id);
      if (state.status === 'fresh') shown.push(`${id} ${(state.computed.value as number[])[0]}`);
      else if (state.status === 'computing' && state.progress > 0) shown.push(`${id} ...`);
    },
  });
  engines.push(engine);
  engine.show(record);
  return { engine, shown };
}

const record = worksheet(
  [cell('c1', 'number', { value: { shared: 'a' } }), cell('c2', 'long', {}, 'c1'), cell('c3', 'add', { by: 0 }, 'c2')],
  { shared: [shared('a', 1)] },
);

describe('stopping', () => {
  test('by hand: a long computation is stopped by the next edit, counted, and its result never lands', async () => {
    const log: string[] = [];
    const { engine, shown } = engineWith([watched('long', 400, true, log)], record);
    await pass(100);
    engine.show(withShared(record, 'a', 2));
    await settle(engine);
    // The newer one does not wait until the older has noticed.
    expect(log).toEqual(['1 begins', '2 begins', '1 stopped', '2 ends']);
    expect(engine.cancelled()).toBe(1);
    expect(shown.filter((each) => /^c[23] \d/.test(each))).toEqual(['c2 2', 'c3 2']);
    expect(engine.counts().get('c2')).toBe(1);
  });

  test('by hand: a computation that ignores its signal is not waited for, and its late result never lands', async () => {
    const log: string[] = [];
    const { engine, shown } = engineWith([watched('long', 250, false, log)], record);
    await pass(80);
    engine.show(withCell(record, 'c2', { kind: 'add', settings: { by: 10 } }));
    await settle(engine);
    expect(log).toEqual(['1 begins']);
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [11] } });
    await pass(220);
    expect(log).toEqual(['1 begins', '1 ends']);
    expect(engine.state('c2')).toMatchObject({ status: 'fresh', computed: { value: [11] } });
    expect(shown.filter((each) => /^c[23] \d/.test(each))).toEqual(['c2 11', 'c3 11']);
  });

  test('by hand: removing a cell that computes stops it', async () => {
    const log: string[] = [];
    const { engine } = engineWith([watched('long', 5000, true, log)], record);
    await pass(30);
    engine.show({ ...record, cells: record.cells.slice(0, 1) });
    await settle(engine);
    await pass(20);
    expect(log).toEqual(['1 begins', '1 stopped']);
    expect(engine.cancelled()).toBe(1);
  });

  test('by hand: dispose stops what computes and settles idle', async () => {
    const log: string[] = [];
    const { engine } = engineWith([watched('long', 5000, true, log)], record);
    await pass(20);
    const idle = engine.idle();
    engine.dispose();
    await idle;
    await pass(20);
    expect(log).toEqual(['1 begins', '1 stopped']);
  });

  test('by hand: while a cell computes, it and the cells below say so and keep what they came to', async () => {
    const log: string[] = [];
    const { engine, shown } = engineWith([watched('long', 50, true, log)], record);
    await settle(engine);
    engine.show(withShared(record, 'a', 2));
    await pass(20);
    expect(engine.state('c2')).toMatchObject({ status: 'computing', last: { value: [1] }, count: 1 });
    expect(engine.state('c3')).toEqual({
      status: 'computing',
      progress: 0,
      last: { value: [1], detail: null },
      count: 1,
    });
    await settle(engine);
    expect(shown).toContain('c2 ...');
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [2] }, count: 2 });
  });

  test('invariance: an edit elsewhere leaves a long computation alone', async () => {
    const log: string[] = [];
    const more = { ...record, cells: [...record.cells, cell('c4', 'number', { value: 1 })] };
    const { engine } = engineWith([watched('long', 150, true, log)], more);
    await pass(70);
    engine.show(withCell(more, 'c4', { settings: { value: 2 } }));
    await settle(engine);
    expect(log).toEqual(['1 begins', '1 ends']);
    expect(engine.state('c4')).toMatchObject({ status: 'fresh', computed: { value: [2] } });
  });
});

describe('a number in motion', () => {
  /** One edit every `every` ms, as a hand on a ruler makes them. */
  async function move(engine: Engine, steps: number, every: number): Promise<void> {
    for (let step = 2; step <= steps; step++) {
      await pass(every);
      engine.show(withShared(record, 'a', step));
    }
  }

  test('by hand: short computations finish and show with the cells below while the number moves; none is stopped', async () => {
    const log: string[] = [];
    const { engine, shown } = engineWith([watched('long', 25, true, log)], record);
    await settle(engine);
    shown.length = 0;
    const moving = move(engine, 30, 8);
    await moving;
    const shownWhileMoving = shown.filter((each) => /^c3 \d/.test(each)).length;
    await settle(engine);
    expect(shownWhileMoving).toBeGreaterThanOrEqual(3);
    expect(engine.cancelled()).toBe(0);
    expect(engine.counts().get('c2')).toBeLessThan(25);
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [30] } });
  });

  test('by hand: a long computation below does not hold up the short ones above', async () => {
    const log: string[] = [];
    const { engine, shown } = engineWith([watched('long', 200, true, log)], record);
    await settle(engine);
    shown.length = 0;
    await move(engine, 20, 12);
    const firstShown = shown.filter((each) => /^c1 \d/.test(each)).length;
    expect(firstShown).toBeGreaterThanOrEqual(12);
    await settle(engine);
    expect(engine.cancelled()).toBeGreaterThanOrEqual(5);
    expect(shown.filter((each) => /^c2 \d/.test(each))).toEqual(['c2 20']);
  });

  test('invariance: a held edit is the newest one, and idle waits for it', async () => {
    const log: string[] = [];
    const { engine } = engineWith([watched('long', 30, true, log)], record);
    await pass(5);
    for (const a of [2, 3, 4]) engine.show(withShared(record, 'a', a));
    expect(engine.context('c1').shared[0]?.value).toBe(4);
    await settle(engine);
    expect(log).toEqual(['1 begins', '1 ends', '4 begins', '4 ends']);
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [4] } });
  });
});
