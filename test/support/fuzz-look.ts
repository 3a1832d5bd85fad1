import { type Computed, type Kind, plainSentence, type Registry, type Settings } from '../../cells/kind.ts';
import { Engine } from '../../src/engine/engine.ts';
import { resultsOf } from '../../src/replay/record.ts';
import type { Runner } from '../../src/workers/runner.ts';
import type { Cell, Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';

/** What may never be said. That a bound of a formula stopped the cell may: "*trim* must be a whole percentage ...". */
const BROKEN_WORDS =
  /\bNaN\b|\bInfinity\b|\bundefined\b|\[object |Something in Standfast itself went wrong here: (?!\*\w+\* must )/;

/** Where a record holds a number that JSON cannot write, or null. */
export function brokenNumber(value: unknown, place = ''): string | null {
  if (typeof value === 'number') return Number.isFinite(value) ? null : `${place} is ${value}`;
  if (typeof value !== 'object' || value === null) return null;
  for (const [key, each] of Object.entries(value)) {
    const found = brokenNumber(each, `${place}/${key}`);
    if (found !== null) return found;
  }
  return null;
}

function wordsOf(kind: Kind, computed: Computed<unknown>, settings: Settings): string {
  const tables = (kind.tables?.(computed, settings) ?? []).flatMap(({ title, rows }) => [title, ...rows.flat()]);
  const notes = (kind.notes?.(computed, settings) ?? []).map(({ lead, text }) => `${lead ?? ''} ${text}`);
  const mark = kind.flow?.(computed, settings);
  return [kind.say(computed, settings), ...notes, ...tables, mark?.label ?? ''].join('\n');
}

/** Everything the page would say about a cell; a text of the file itself may hold any words, so it is taken out first. */
function wordProblem(engine: Engine, registry: Registry, cell: Cell, own: readonly string[]): string | null {
  const state = engine.state(cell.id);
  const kind = Object.hasOwn(registry, cell.kind) ? registry[cell.kind] : undefined;
  if (kind === undefined) return state.status === 'unknown-kind' ? null : `an unknown kind is ${state.status}`;
  const settings = engine.settings(cell.id);
  const said = [kind.title(cell.settings), plainSentence(kind.sentence(cell.settings, engine.context(cell.id)))];
  if (state.status === 'failed') {
    if (state.sentence.trim().length < 10) return `failed with "${state.sentence}"`;
    // the bound that stopped it may name the very number that is none
    said.push(state.sentence.replace(/(\*\w+\* must .*; got )\S+/, '$1_'));
  }
  if (state.status === 'fresh') said.push(wordsOf(kind, state.computed, settings));
  let words = said.join('\n');
  for (const each of own) words = words.replaceAll(each, '_');
  const broken = BROKEN_WORDS.exec(words);
  return broken === null ? null : words.slice(Math.max(0, broken.index - 100), broken.index + 200);
}

function ownWords(part: unknown, found: Set<string>): Set<string> {
  if (typeof part === 'string' && BROKEN_WORDS.test(part)) found.add(part);
  else if (typeof part === 'object' && part !== null) {
    for (const [key, each] of Object.entries(part)) {
      ownWords(key, found);
      ownWords(each, found);
    }
  }
  return found;
}

export interface Looked {
  /** What is wrong with how the program took it; empty where nothing is. */
  readonly problems: readonly string[];
  readonly came: 'refused' | 'shown';
}

/** Reads the text of a worksheet file, computes it, says everything about it, saves it and reads it again. */
export async function lookAt(text: string, registry: Registry, runner: Runner): Promise<Looked> {
  const parsed = parseWorksheet(text);
  if (!parsed.ok)
    return {
      problems: /^.{10,}\.$/s.test(parsed.sentence) ? [] : [`refused with "${parsed.sentence}"`],
      came: 'refused',
    };
  const { worksheet } = parsed;
  const engine = new Engine({ registry, runner });
  try {
    engine.show(worksheet);
    const results = await resultsOf(engine, worksheet, registry);
    return {
      problems: [...cellProblems(engine, registry, worksheet, results), ...fileProblems({ ...worksheet, results })],
      came: 'shown',
    };
  } finally {
    engine.dispose();
  }
}

function cellProblems(
  engine: Engine,
  registry: Registry,
  worksheet: Worksheet,
  results: Worksheet['results'],
): string[] {
  const own = [...ownWords(worksheet, new Set())].sort((a, b) => b.length - a.length);
  return worksheet.cells.flatMap((cell) => {
    const about = [
      wordProblem(engine, registry, cell, own),
      brokenNumber(Object.hasOwn(results, cell.id) ? results[cell.id] : null),
    ];
    return about.flatMap((each) => (each === null ? [] : [`${cell.id} (${cell.kind}): ${each}`]));
  });
}

/** What is saved can be opened again, with the same results in it. */
function fileProblems(worksheet: Worksheet): string[] {
  const written = writeWorksheet(worksheet);
  const again = parseWorksheet(written);
  if (!again.ok) return [`what was saved cannot be opened: ${again.sentence}`];
  return writeWorksheet(again.worksheet) === written ? [] : ['what was saved is another worksheet when opened'];
}
