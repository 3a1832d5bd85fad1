import type { Registry } from '../../cells/kind.ts';
import { Engine } from '../engine/engine.ts';
import { cellName } from '../engine/sentences.ts';
import type { Runner } from '../workers/runner.ts';
import type { Cell, RecordedResult, Worksheet } from '../worksheet/format.ts';

type Results = Worksheet['results'];

/** The part of the engine that says what the cells have come to. */
export type Computing = Pick<Engine, 'state' | 'idle'>;

/**
 * The worksheet with what every cell comes to written into it.
 *
 * @param version of the program that computes it
 * @returns a new record; only `results` and `program` differ
 */
export async function recordResults(
  worksheet: Worksheet,
  registry: Registry,
  runner: Runner,
  version: string,
): Promise<Worksheet> {
  const engine = new Engine({ registry, runner });
  try {
    engine.show(worksheet);
    const results = await resultsOf(engine, worksheet, registry);
    return { ...worksheet, results, program: { name: 'standfast', version } };
  } finally {
    engine.dispose();
  }
}

/**
 * What the cells of a worksheet come to, as it is recorded; waits until the engine is idle. A cell of an unknown kind
 * keeps what was recorded for it before.
 *
 * @param engine that shows this worksheet
 */
export async function resultsOf(engine: Computing, worksheet: Worksheet, registry: Registry): Promise<Results> {
  await engine.idle();
  const results: { [cellId: string]: RecordedResult } = {};
  for (const cell of worksheet.cells) {
    const result = resultOf(engine, worksheet, registry, cell);
    if (result !== undefined) results[cell.id] = result;
  }
  return results;
}

function resultOf(engine: Computing, worksheet: Worksheet, registry: Registry, cell: Cell): RecordedResult | undefined {
  const state = engine.state(cell.id);
  switch (state.status) {
    case 'fresh':
      return { status: 'value', value: registry[cell.kind]?.record(state.computed) ?? null };
    case 'failed':
      return { status: 'failed', value: state.sentence };
    case 'waiting': {
      if (state.for.some(({ why }) => why === 'veiled')) return { status: 'veiled', value: null };
      const names = state.for.map(({ cellId }) => cellName(worksheet, registry, cellId));
      return { status: 'failed', value: `Waiting for ${names.join(', ')}.` };
    }
    case 'veiled':
    case 'left-out':
      return { status: state.status, value: null };
    case 'unknown-kind':
      return worksheet.results[cell.id];
    case 'computing':
      throw new Error(`the cell "${cell.id}" is still being computed`);
  }
}
