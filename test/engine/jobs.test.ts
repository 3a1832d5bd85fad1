import { afterEach, describe, expect, test } from 'vitest';
import type { Env } from '../../cells/kind.ts';
import { Engine } from '../../src/engine/engine.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { Runner } from '../../src/workers/runner.ts';
import { testJobs } from '../support/jobs.ts';
import { testKind } from '../support/kinds.ts';
import { cell, withCell, worksheet } from '../support/worksheets.ts';

const engines: Engine[] = [];
afterEach(() => {
  for (const engine of engines.splice(0)) engine.dispose();
});

/** Runs the job of its settings. */
const jobKind = testKind({
  name: 'job',
  compute: async (settings, _given, env: Env) => {
    const value = await env.run(settings.job as never, settings.args as never);
    return { value, detail: null };
  },
});

function start(job: string, args: unknown) {
  const record = worksheet([cell('c1', 'job', { job, args: args as never })]);
  const shares: number[] = [];
  const runner = inlineRunner(testJobs) as unknown as Runner;
  const engine: Engine = new Engine({
    registry: { job: jobKind },
    runner,
    onState: (id) => {
      const state = engine.state(id);
      if (state.status === 'computing') shares.push(state.progress);
    },
  });
  engines.push(engine);
  engine.show(record);
  return { engine, record, shares };
}

describe('cells that run jobs', () => {
  test('by hand: a job gives the cell its value and its progress', async () => {
    const { engine, shares } = start('count', { to: 4, ms: 1 });
    await engine.idle();
    expect(engine.state('c1')).toMatchObject({ status: 'fresh', computed: { value: 4 } });
    expect(shares).toEqual([0.25, 0.5, 0.75, 1]);
  });

  test('refuses: a refusal of a job is the sentence of the cell, another error is a defect', async () => {
    const { engine, record } = start('refuse', 'Only 3 participants are kept.');
    await engine.idle();
    expect(engine.state('c1')).toEqual({ status: 'failed', sentence: 'Only 3 participants are kept.' });
    engine.show(withCell(record, 'c1', { settings: { job: 'fail', args: 'bad index' } }));
    await engine.idle();
    expect(engine.state('c1')).toMatchObject({ status: 'failed' });
    expect(JSON.stringify(engine.state('c1'))).toContain('Something in Standfast itself went wrong here: bad index.');
  });

  test('by hand: a job whose cell is left out is stopped', async () => {
    const { engine, record } = start('count', { to: 100_000, ms: 2 });
    await new Promise((resolve) => setTimeout(resolve, 20));
    engine.show(withCell(record, 'c1', { leftOut: true }));
    await engine.idle();
    expect([engine.state('c1').status, engine.cancelled()]).toEqual(['left-out', 1]);
  });
});
