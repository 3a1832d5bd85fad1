import { afterEach, describe, expect, test } from 'vitest';
import { Engine } from '../../src/engine/engine.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { testRegistry } from '../support/kinds.ts';
import { cell, dataBlock, shared, withCell, withShared, worksheet } from '../support/worksheets.ts';

const engines: Engine[] = [];
afterEach(() => {
  for (const engine of engines.splice(0)) engine.dispose();
});

function start(record: Worksheet): { engine: Engine; told: string[] } {
  const told: string[] = [];
  const engine = new Engine({
    registry: testRegistry,
    runner: inlineRunner(),
    onState: (cellId) => told.push(`${cellId} ${engine.state(cellId).status}`),
  });
  engines.push(engine);
  engine.show(record);
  return { engine, told };
}

function shownBy(engine: Engine, id: string): unknown {
  const state = engine.state(id);
  return state.status === 'fresh' ? state.computed.value : state;
}

const countsOf = (engine: Engine) => Object.fromEntries(engine.counts());

const chain = worksheet(
  [
    cell('c1', 'number', { value: { shared: 'a' } }),
    cell('c2', 'add', { by: { shared: 'b' } }, 'c1'),
    cell('c3', 'half', {}, 'c2'),
    cell('c4', 'add', { by: 100 }, 'c3'),
    cell('c5', 'number', { value: 5 }),
  ],
  { shared: [shared('a', 10), shared('b', 2)] },
);

describe('what recomputes', () => {
  test('by hand: a chain of cells comes to its values, each computed once', async () => {
    const { engine } = start(chain);
    await engine.idle();
    expect(['c1', 'c2', 'c3', 'c4', 'c5'].map((id) => shownBy(engine, id))).toEqual([[10], [12], [6], [106], [5]]);
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 1, c3: 1, c4: 1, c5: 1 });
  });

  test('invariance: a shared number recomputes the cells that reference it and the cells below, nothing else', async () => {
    const { engine } = start(chain);
    await engine.idle();
    engine.show(withShared(chain, 'b', 4));
    await engine.idle();
    expect(shownBy(engine, 'c4')).toEqual([107]);
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 2, c3: 2, c4: 2, c5: 1 });
  });

  test('invariance: an equal new value stops the recomputing there and keeps the old object, with the new detail', async () => {
    const { engine } = start(chain);
    await engine.idle();
    const before = engine.state('c3');
    engine.show(withShared(chain, 'b', 3));
    await engine.idle();
    const after = engine.state('c3');
    if (before.status !== 'fresh' || after.status !== 'fresh') throw new Error('not fresh');
    expect(after.computed.value).toBe(before.computed.value);
    expect([before.computed.detail, after.computed.detail]).toEqual([{ read: 12 }, { read: 13 }]);
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 2, c3: 2, c4: 1, c5: 1 });
  });

  test('invariance: titles, names of shared numbers and equal copies of the record recompute nothing', async () => {
    const { engine, told } = start(chain);
    await engine.idle();
    const told0 = told.length;
    engine.show({ ...chain, title: 'Another title' });
    engine.show({ ...chain, shared: chain.shared.map((each) => ({ ...each, name: 'renamed' })) });
    engine.show(JSON.parse(JSON.stringify(chain)) as Worksheet);
    await engine.idle();
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 1, c3: 1, c4: 1, c5: 1 });
    expect(told.length).toBe(told0);
  });

  test('invariance: many edits in one moment are one pass', async () => {
    const { engine } = start(chain);
    await engine.idle();
    for (let a = 0; a <= 20; a++) engine.show(withShared(chain, 'a', a));
    await engine.idle();
    expect(shownBy(engine, 'c4')).toEqual([111]);
    expect(countsOf(engine)).toEqual({ c1: 2, c2: 2, c3: 2, c4: 2, c5: 1 });
  });

  test('invariance: adding, rewiring and removing cells touches only what reads them', async () => {
    const { engine } = start(chain);
    await engine.idle();
    const inserted = worksheet(
      [
        ...chain.cells.slice(0, 3),
        cell('c6', 'add', { by: 1 }, 'c3'),
        { ...(chain.cells[3] as Worksheet['cells'][number]), from: { from: 'c6' } },
      ],
      { shared: chain.shared },
    );
    engine.show(inserted);
    await engine.idle();
    expect(shownBy(engine, 'c4')).toEqual([107]);
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 1, c3: 1, c4: 2, c6: 1 });
    expect(() => engine.state('c5')).toThrow('there is no cell called "c5"');
    engine.show(chain);
    await engine.idle();
    expect(shownBy(engine, 'c4')).toEqual([106]);
  });

  test('invariance: order of the cells in the worksheet does not matter', async () => {
    const { engine } = start({ ...chain, cells: [...chain.cells].reverse() });
    await engine.idle();
    expect(shownBy(engine, 'c4')).toEqual([106]);
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 1, c3: 1, c4: 1, c5: 1 });
  });

  test('by hand: a data block is read again only by the cells that asked for it', async () => {
    const cells = [
      cell('c1', 'data', { data: 'd1' }),
      cell('c2', 'add', { by: 1 }, 'c1'),
      cell('c3', 'data', { data: 'd2' }),
    ];
    const record = worksheet(cells, { data: [dataBlock('d1', [1, 2]), dataBlock('d2', [1])] });
    const { engine } = start(record);
    await engine.idle();
    engine.show({ ...record, data: [dataBlock('d1', [1, 2, 3]), dataBlock('d2', [1])] });
    await engine.idle();
    expect([shownBy(engine, 'c2'), shownBy(engine, 'c3')]).toEqual([[4], [1]]);
    expect(countsOf(engine)).toEqual({ c1: 2, c2: 2, c3: 1 });
  });

  test('by hand: another seed and another worksheet start anew', async () => {
    const { engine } = start(chain);
    await engine.idle();
    engine.show({ ...chain, seed: 8 });
    await engine.idle();
    expect(countsOf(engine)).toEqual({ c1: 2, c2: 2, c3: 2, c4: 2, c5: 2 });
    engine.show({ ...chain, id: 'w2' });
    await engine.idle();
    expect(countsOf(engine)).toEqual({ c1: 1, c2: 1, c3: 1, c4: 1, c5: 1 });
  });
});

describe('context and settings', () => {
  test('by hand: a context holds the values above, the newest shared numbers and the names of the data', async () => {
    const record = { ...chain, data: [dataBlock('d1', [1])] };
    const { engine } = start(record);
    expect(engine.context('c2').given).toEqual({ from: undefined });
    await engine.idle();
    expect(engine.context('c2').given).toEqual({ from: [10] });
    engine.show(withShared(record, 'a', 20));
    expect(engine.context('c2').shared[0]?.value).toBe(20);
    expect(engine.context('c2').data).toEqual([{ id: 'd1', name: 'd1.csv' }]);
    expect(engine.settings('c2')).toEqual({ by: 2 });
  });

  test('by hand: shared numbers are found at any depth', async () => {
    const record = withCell(chain, 'c5', { settings: { value: 1, list: [{ deep: { shared: 'a' } }] } });
    const { engine } = start(record);
    await engine.idle();
    engine.show(withShared(record, 'a', 11));
    await engine.idle();
    expect(engine.counts().get('c5')).toBe(2);
    expect(engine.settings('c5')).toEqual({ value: 1, list: [{ deep: 11 }] });
  });
});

describe('life of an engine', () => {
  test('refuses: no worksheet yet, use after dispose', () => {
    const engine = new Engine({ registry: testRegistry, runner: inlineRunner() });
    expect(() => engine.state('c1')).toThrow('there is no cell called "c1"');
    engine.show(chain);
    engine.dispose();
    expect(() => engine.show(chain)).toThrow('dispose');
  });

  test('degenerate: an empty worksheet is idle', async () => {
    const { engine } = start(worksheet([]));
    await engine.idle();
    expect(countsOf(engine)).toEqual({});
  });

  test('invariance: a schedule of its own gives the same', async () => {
    const engine = new Engine({
      registry: testRegistry,
      runner: inlineRunner(),
      schedule: (pass) => setTimeout(pass, 1),
    });
    engines.push(engine);
    engine.show(chain);
    await engine.idle();
    expect(shownBy(engine, 'c4')).toEqual([106]);
  });
});
