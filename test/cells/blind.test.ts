import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { plainSentence } from '../../cells/kind.ts';
import { registry } from '../../cells/registry.ts';
import { veilWidth } from '../../src/analysis/veil-width.ts';
import { Engine } from '../../src/engine/engine.ts';
import { resultsOf } from '../../src/replay/record.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { DataBlock, Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { type Randomised, relabelled } from '../support/relabelled.ts';

const DEMOS: readonly (readonly [name: string, how: Randomised])[] = [
  ['bridge-alerts', { participant: 'officer', within: 'alert', between: 'training' }],
  [
    'bridge-workload',
    {
      participant: 'officer',
      wide: ['workload_tone', 'workload_voice', 'workload_seat_pulse'],
      between: 'training',
    },
  ],
  ['glove-peg-test', { participant: 'wearer', between: 'glove' }],
  ['hearing-words', { participant: 'listener', between: 'hearing_aid' }],
];

function committed(name: string): Worksheet {
  const parsed = parseWorksheet(readFileSync(`demo-data/${name}.standfast.json`, 'utf8'));
  if (!parsed.ok) throw new Error(parsed.sentence);
  return parsed.worksheet;
}

function blindDemo(name: string): Worksheet {
  return { ...committed(name), opening: { state: 'blind' }, results: {} };
}

/** Everything the page and the file could say of every cell, as text. The tables above a design flow but are not shown. */
async function everythingSaid(worksheet: Worksheet): Promise<string> {
  const engine = new Engine({ registry, runner: inlineRunner() });
  engine.show(worksheet);
  const results = await resultsOf(engine, worksheet, registry);
  const cells = worksheet.cells.map((cell) => {
    const kind = registry[cell.kind as keyof typeof registry];
    const settings = engine.settings(cell.id);
    const state = engine.state(cell.id);
    const context = engine.context(cell.id);
    const parts = kind.sentence(cell.settings, context);
    const said: unknown[] = [state.status, plainSentence(parts), parts, kind.defaults(context)];
    if (state.status === 'fresh') {
      const { computed } = state;
      said.push(kind.say(computed, settings), kind.flow?.(computed, settings), kind.notes?.(computed, settings));
      said.push(kind.tables?.(computed, settings), kind.record(computed), computed.detail);
      if (kind.gives !== 'table') said.push(computed.value);
    }
    return said;
  });
  engine.dispose();
  return JSON.stringify({ cells, results }, (_key, value) =>
    ArrayBuffer.isView(value) ? [...(value as never)] : value,
  );
}

function withData(worksheet: Worksheet, change: (block: DataBlock) => DataBlock): Worksheet {
  return { ...worksheet, data: worksheet.data.map(change) };
}

describe('the bound on the interval of the plan', () => {
  // The interval itself is the one the demo's record holds, worked out with the conditions open.
  test.each(DEMOS)('invariance: is about the half width of the recorded interval of %s, or more', async (name) => {
    const record = committed(name);
    const comparison = record.cells.find(({ kind }) => kind === 'comparison');
    if (comparison === undefined) throw new Error('no comparison');
    const { factor, trim, alpha } = comparison.settings as { factor: string; trim: unknown; alpha: number };
    expect(trim).toEqual({ shared: 'trim' });
    const found = record.results[comparison.id]?.value as {
      planned: number;
      findings: { interval: [number, number] }[];
    };
    const [low, high] = found.findings[found.planned]?.interval ?? [0, 0];
    const engine = new Engine({ registry, runner: inlineRunner() });
    engine.show(blindDemo(name));
    await engine.idle();
    const { design } = engine.context(comparison.id);
    engine.dispose();
    if (design === undefined) throw new Error('no design');
    const bound = veilWidth(design, { statistic: 'mean', trim: 0 }, { factor, trim: 20, alpha });
    // Winsorizing all pairs or both groups together takes more from the wider one: a fifth less is "about".
    expect(bound).toBeGreaterThanOrEqual((0.8 * (high - low)) / 2);
    // "at most about": a bound that says nothing would be of no use.
    expect(bound).toBeLessThan(3 * (high - low));
  });
});

describe('while the conditions are hidden', () => {
  test.each(DEMOS)('invariance: nothing said of %s depends on the labels, 20 relabellings', async (name, how) => {
    const worksheet = blindDemo(name);
    const said = await everythingSaid(worksheet);
    for (let seed = 1; seed <= 20; seed++) {
      const other = withData(worksheet, (block) => relabelled(block, how, seed));
      expect(other.data).not.toEqual(worksheet.data);
      expect((await everythingSaid(other)) === said).toBe(true);
    }
  });

  test('invariance: the same check finds the labels once the conditions are open', async () => {
    const blind = blindDemo('glove-peg-test');
    const open: Worksheet = {
      ...blind,
      cells: blind.cells.slice(0, 2),
      opening: { state: 'opened-early', reason: 'a check', when: '2026-01-01' },
    };
    const other = withData(open, (block) => relabelled(block, { participant: 'wearer', between: 'glove' }, 1));
    expect((await everythingSaid(other)) === (await everythingSaid(open))).toBe(false);
  });
});
