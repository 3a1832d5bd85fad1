import { afterEach, describe, expect, test } from 'vitest';
import { Engine } from '../../src/engine/engine.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { Opening, Worksheet } from '../../src/worksheet/format.ts';
import { testRegistry } from '../support/kinds.ts';
import { cell, shared, withCell, withShared, worksheet } from '../support/worksheets.ts';

const engines: Engine[] = [];
afterEach(() => {
  for (const engine of engines.splice(0)) engine.dispose();
});

async function settled(record: Worksheet): Promise<Engine> {
  const engine = new Engine({ registry: testRegistry, runner: inlineRunner() });
  engines.push(engine);
  engine.show(record);
  await engine.idle();
  return engine;
}

function sentenceOf(engine: Engine, id: string): string {
  const state = engine.state(id);
  return state.status === 'failed' ? state.sentence : `not failed but ${state.status}`;
}

const chain = worksheet(
  [
    cell('c1', 'number', { value: { shared: 'a' } }),
    cell('c2', 'add', { by: 2 }, 'c1'),
    cell('c3', 'add', { by: 3 }, 'c2'),
    cell('c4', 'number', { value: 5 }),
  ],
  { shared: [shared('a', 10)] },
);

describe('failed and waiting', () => {
  test('refuses: a refusal is shown, the cells below wait for its cell and keep what they came to, the others go on', async () => {
    const engine = await settled(chain);
    engine.show(withCell(withShared(chain, 'a', -1), 'c4', { settings: { value: 6 } }));
    await engine.idle();
    expect(sentenceOf(engine, 'c1')).toBe('The number -1 is negative: choose one of 0 or more.');
    const waiting = { status: 'waiting', for: [{ cellId: 'c1', why: 'failed' }] };
    expect(engine.state('c2')).toEqual({ ...waiting, last: { value: [12], detail: null } });
    expect(engine.state('c3')).toEqual({ ...waiting, last: { value: [15], detail: null } });
    expect(engine.state('c4')).toMatchObject({ status: 'fresh', computed: { value: [6] } });
  });

  test('invariance: going back to the settings that worked brings the values back without recomputing', async () => {
    const engine = await settled(chain);
    engine.show(withShared(chain, 'a', 99));
    await engine.idle();
    expect(sentenceOf(engine, 'c1')).toBe('99 is not allowed here.');
    engine.show(chain);
    await engine.idle();
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [15] } });
    expect(Object.fromEntries(engine.counts())).toEqual({ c1: 1, c2: 1, c3: 1, c4: 1 });
  });

  test('refuses: sentences of check are shown and nothing is computed', async () => {
    const engine = await settled(withCell(chain, 'c1', { settings: {} }));
    expect(sentenceOf(engine, 'c1')).toBe('Fill in the number.');
    expect(engine.state('c3')).toEqual({ status: 'waiting', for: [{ cellId: 'c1', why: 'unset' }] });
    expect(engine.counts().get('c1')).toBe(0);
  });

  test('refuses: a defect of the program says so and keeps the worksheet', async () => {
    const engine = await settled(worksheet([cell('c1', 'number', { value: 1 }), cell('c2', 'broken', {}, 'c1')]));
    expect(sentenceOf(engine, 'c2')).toMatch(
      /^Something in Standfast itself went wrong here: x is not a function\. Your worksheet is kept;/,
    );
  });

  test('refuses: a shared number that is not there, and works again once it is', async () => {
    const record = { ...chain, shared: [] };
    const engine = await settled(record);
    expect(sentenceOf(engine, 'c1')).toBe(
      'There is no shared number called "a" in this worksheet: fill in its blank again.',
    );
    engine.show(chain);
    await engine.idle();
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [15] } });
  });

  test('refuses: a port that is unset, names no cell, or gets the wrong type; and says which cells fit', async () => {
    const engine = await settled(
      worksheet([
        cell('c1', 'number', { value: 1 }),
        cell('c2', 'add', {}),
        cell('c3', 'add', {}, 'c9'),
        cell('c4', 'slow', { ms: 1 }, 'c1'),
        cell('c5', 'add', {}, 'c4'),
        cell('c6', 'veiled', {}, 'c1'),
        cell('c7', 'add', {}, 'c2'),
      ]),
    );
    expect(sentenceOf(engine, 'c2')).toBe(
      'This cell does not yet say where it reads a table. Cells that fit are cell 1 (number), cell 3 (add), cell 5 (add), cell 7 (add).',
    );
    expect(sentenceOf(engine, 'c3')).toContain('reads a table from "c9", but there is no cell called "c9".');
    expect(sentenceOf(engine, 'c5')).toContain('This cell reads a table, but cell 4 (slow) gives scores.');
    expect(sentenceOf(engine, 'c6')).toBe(
      'This cell reads scores, but cell 1 (number) gives a table. The cell that fits is cell 4 (slow).',
    );
    expect(engine.state('c7')).toEqual({ status: 'waiting', for: [{ cellId: 'c2', why: 'unset' }] });
  });

  test('refuses: a circle names its cells; cells below it wait, cells above it work, and opening it mends all', async () => {
    const cells = [
      cell('c1', 'number', { value: 1 }),
      cell('c2', 'pair', {}, { first: 'c1', second: 'c3' }),
      cell('c3', 'add', { by: 1 }, 'c4'),
      cell('c4', 'add', { by: 1 }, 'c3'),
      cell('c5', 'add', {}, 'c5'),
    ];
    const record = worksheet(cells);
    const engine = await settled(record);
    expect(sentenceOf(engine, 'c3')).toBe(
      'This cell reads its own result by way of cell 4 (add): let one of them read another cell above.',
    );
    expect(sentenceOf(engine, 'c5')).toBe('This cell reads its own result: let it read another cell above.');
    expect(engine.state('c2')).toEqual({ status: 'waiting', for: [{ cellId: 'c3', why: 'failed' }] });
    expect(engine.state('c1').status).toBe('fresh');
    engine.show(withCell(record, 'c3', { from: { from: 'c1' } }));
    await engine.idle();
    expect(engine.state('c4')).toMatchObject({ status: 'fresh', computed: { value: [3] } });
    expect(engine.state('c2')).toMatchObject({ status: 'fresh', computed: { value: [1, 2] } });
  });

  test('refuses: settings of a newer version', async () => {
    const engine = await settled(worksheet([{ ...cell('c1', 'number', { value: 1 }), version: 3 }]));
    expect(sentenceOf(engine, 'c1')).toContain(
      'written by a newer Standfast (its settings have version 3, this program knows version 1)',
    );
  });

  test('by hand: an unknown kind is said, also one named like a property of every object', async () => {
    const engine = await settled(worksheet([cell('c1', 'constructor'), cell('c2', 'add', {}, 'c1')]));
    expect(engine.state('c1')).toEqual({ status: 'unknown-kind', kind: 'constructor' });
    expect(engine.state('c2')).toEqual({ status: 'waiting', for: [{ cellId: 'c1', why: 'missing' }] });
  });
});

describe('left out', () => {
  test('by hand: a cell that gives what it reads lets it through, and its context too', async () => {
    const record = withCell(chain, 'c2', { leftOut: true });
    const engine = await settled(record);
    expect(engine.state('c2')).toEqual({ status: 'left-out' });
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [13] } });
    expect(engine.context('c3').given).toEqual({ from: [10] });
    engine.show(chain);
    await engine.idle();
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: [15] } });
  });

  test('by hand: the cells below any other cell wait', async () => {
    const cells = [
      cell('c1', 'number', { value: 1 }),
      { ...cell('c2', 'slow', { ms: 1 }, 'c1'), leftOut: true },
      cell('c3', 'veiled', {}, 'c2'),
    ];
    const engine = await settled(worksheet(cells));
    expect(engine.state('c3')).toEqual({ status: 'waiting', for: [{ cellId: 'c2', why: 'left-out' }] });
    expect(engine.counts().get('c2')).toBe(0);
  });
});

describe('blind', () => {
  const blind: Opening = { state: 'blind' };
  const cells = [
    cell('c1', 'number', { value: 4 }),
    cell('c2', 'number', { value: 5 }),
    cell('c3', 'pair', {}, { first: 'c1', second: 'c2' }),
    cell('c4', 'veiled', {}, 'c3'),
  ];
  const open = worksheet(cells);

  test('by hand: veiled cells are not computed, blind output is what flows, the rest is as it is', async () => {
    const engine = await settled({ ...open, opening: blind });
    expect(engine.state('c1')).toMatchObject({ status: 'fresh', computed: { value: [4] } });
    expect(engine.state('c3')).toMatchObject({ status: 'fresh', computed: { value: 2, detail: 'hidden' } });
    expect(engine.state('c4')).toEqual({ status: 'veiled' });
    expect(engine.context('c4').given).toEqual({ from: 2 });
    expect(engine.counts().get('c4')).toBe(0);
  });

  test('by hand: opening computes what was veiled', async () => {
    const engine = await settled({ ...open, opening: blind });
    engine.show(open);
    await engine.idle();
    expect(engine.state('c4')).toMatchObject({ status: 'fresh', computed: { value: [4, 5] } });
    expect(engine.counts().get('c1')).toBe(1);
  });

  test('invariance: hidden again, no value of before is left anywhere in the states', async () => {
    const engine = await settled(open);
    engine.show({ ...withCell(open, 'c3', { from: { first: 'c1' } }), opening: blind });
    await engine.idle();
    expect(engine.state('c3').status).toBe('failed');
    expect(engine.state('c4')).toEqual({ status: 'veiled' });
    expect('last' in engine.state('c3')).toBe(false);
    expect(engine.context('c4').given).toEqual({});
  });

  test('by hand: cells below a veiled one wait for it', async () => {
    const record = worksheet([...cells, { ...cell('c5', 'veiled', {}, 'c4'), kind: 'reads-result' }], {
      opening: blind,
    });
    const engine = new Engine({
      registry: {
        ...testRegistry,
        'reads-result': { ...(testRegistry.add as never as object), takes: { from: 'result' } } as never,
      },
      runner: inlineRunner(),
    });
    engines.push(engine);
    engine.show(record);
    await engine.idle();
    expect(engine.state('c5')).toEqual({ status: 'waiting', for: [{ cellId: 'c4', why: 'veiled' }] });
  });
});
