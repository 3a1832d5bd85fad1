import { plainSentence, type Registry } from '../../cells/kind.ts';
import { Engine } from '../engine/engine.ts';
import type { Runner } from '../workers/runner.ts';
import type { Cell, Json, RecordedResult, Worksheet } from '../worksheet/format.ts';
import { breaksOf } from './check-whole.ts';
import { compareRecords, type Difference } from './compare-records.ts';
import { resultsOf } from './record.ts';

export interface CellReplay {
  readonly id: string;
  readonly kind: string;
  /** The cell's own sentence; empty for a kind this program does not know. */
  readonly sentence: string;
  readonly came: 'same' | 'different' | 'unknown-kind';
  /** How many numbers, texts and nulls were compared. */
  readonly compared: number;
  readonly differences: readonly Difference[];
}

export interface Replay {
  /** What is broken: the chain of the decision log, or the data. */
  readonly breaks: readonly string[];
  readonly cells: readonly CellReplay[];
  /** Ids of cells that something was recorded for and that are not there. */
  readonly gone: readonly string[];
}

/** Computes every cell again and compares it with what was recorded. */
export async function replayWorksheet(worksheet: Worksheet, registry: Registry, runner: Runner): Promise<Replay> {
  const engine = new Engine({ registry, runner });
  try {
    engine.show(worksheet);
    const results = await resultsOf(engine, worksheet, registry);
    const cells = worksheet.cells.map((cell): CellReplay => {
      const about = { id: cell.id, kind: cell.kind, sentence: sentenceOf(engine, registry, cell) };
      if (engine.state(cell.id).status === 'unknown-kind') {
        return { ...about, came: 'unknown-kind', compared: 0, differences: [] };
      }
      const recorded = asJson(ownResult(worksheet.results, cell.id));
      const { differences, compared } = compareRecords(recorded, asJson(results[cell.id]));
      return { ...about, came: differences.length === 0 ? 'same' : 'different', compared, differences };
    });
    const ids = new Set(worksheet.cells.map((cell) => cell.id));
    const gone = Object.keys(worksheet.results).filter((id) => !ids.has(id));
    return { breaks: breaksOf(worksheet), cells, gone };
  } finally {
    engine.dispose();
  }
}

/** Exit code of a replay: 4 something is broken, 3 something differs or is unknown, 0 everything came out again. */
export function exitOf({ breaks, cells, gone }: Replay): 0 | 3 | 4 {
  if (breaks.length > 0) return 4;
  return gone.length > 0 || cells.some((cell) => cell.came !== 'same') ? 3 : 0;
}

function sentenceOf(engine: Engine, registry: Registry, cell: Cell): string {
  if (!Object.hasOwn(registry, cell.kind)) return '';
  return plainSentence(registry[cell.kind]?.sentence(cell.settings, engine.context(cell.id)) ?? []);
}

function ownResult(results: Worksheet['results'], id: string): RecordedResult | undefined {
  return Object.hasOwn(results, id) ? results[id] : undefined;
}

/** As it would stand in a file: a field that is undefined is not there. Nothing recorded counts as null. */
function asJson(result: RecordedResult | undefined): Json {
  if (result === undefined) return null;
  const { status, value } = result;
  return { status, value: withoutUndefined(value) };
}

function withoutUndefined(value: Json): Json {
  if (typeof value !== 'object' || value === null) return value;
  if (Array.isArray(value)) return value.map(withoutUndefined);
  const fields = Object.entries(value as { readonly [key: string]: Json | undefined });
  return Object.fromEntries(
    fields.flatMap(([key, each]) => (each === undefined ? [] : [[key, withoutUndefined(each)] as const])),
  );
}
