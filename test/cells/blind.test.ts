import { readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { plainSentence } from '../../cells/kind.ts';
import { registry } from '../../cells/registry.ts';
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

function blindDemo(name: string): Worksheet {
  const parsed = parseWorksheet(readFileSync(`demo-data/${name}.standfast.json`, 'utf8'));
  if (!parsed.ok) throw new Error(parsed.sentence);
  return { ...parsed.worksheet, opening: { state: 'blind' }, results: {} };
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
