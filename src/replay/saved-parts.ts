import { plainSentence, type Registry } from '../../cells/kind.ts';
import { Engine } from '../engine/engine.ts';
import { cellName } from '../engine/sentences.ts';
import type { Runner } from '../workers/runner.ts';
import type { Cell, Worksheet } from '../worksheet/format.ts';
import type { CellWords } from '../worksheet/readable.ts';
import { resultsOf } from './record.ts';

/** The part of the engine that what is saved is taken from. */
export type Saying = Pick<Engine, 'state' | 'idle' | 'context' | 'settings'>;

/** What a saved file is made of: the worksheet with its results, and the cells in words. */
export interface SavedParts {
  readonly worksheet: Worksheet;
  readonly cells: readonly CellWords[];
}

/**
 * The worksheet with what every cell came to, and the same in words; waits until the engine is idle.
 *
 * @param engine that shows this worksheet
 * @param version of the program that computed it
 */
export async function savedParts(
  engine: Saying,
  worksheet: Worksheet,
  registry: Registry,
  version: string,
): Promise<SavedParts> {
  const results = await resultsOf(engine, worksheet, registry);
  const cells = worksheet.cells.map((cell) => wordsOf(engine, worksheet, registry, cell));
  return { worksheet: { ...worksheet, results, program: { name: 'standfast', version } }, cells };
}

/** The same for a worksheet that no engine shows. */
export async function computedParts(
  worksheet: Worksheet,
  registry: Registry,
  runner: Runner,
  version: string,
): Promise<SavedParts> {
  const engine = new Engine({ registry, runner });
  try {
    engine.show(worksheet);
    return await savedParts(engine, worksheet, registry, version);
  } finally {
    engine.dispose();
  }
}

function wordsOf(engine: Saying, worksheet: Worksheet, registry: Registry, cell: Cell): CellWords {
  const kind = Object.hasOwn(registry, cell.kind) ? registry[cell.kind] : undefined;
  if (kind === undefined)
    return { title: cell.kind, sentence: '', result: 'A kind of cell this program does not know.' };
  const about = {
    title: kind.title(cell.settings),
    sentence: plainSentence(kind.sentence(cell.settings, engine.context(cell.id))),
  };
  const state = engine.state(cell.id);
  switch (state.status) {
    case 'fresh':
      return { ...about, result: kind.say(state.computed, engine.settings(cell.id)) };
    case 'failed':
      return { ...about, result: state.sentence };
    case 'waiting':
      return {
        ...about,
        result: `Waiting for ${state.for.map(({ cellId }) => cellName(worksheet, registry, cellId)).join(', ')}.`,
      };
    case 'veiled':
      return { ...about, result: 'Not worked out while the conditions are hidden.' };
    case 'left-out':
      return { ...about, result: 'Left out for now.' };
    default:
      return { ...about, result: '' };
  }
}
