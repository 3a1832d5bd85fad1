import { expect, test } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { rng } from '../../src/numerics/rng.ts';
import { recordResults } from '../../src/replay/record.ts';
import { exitOf, replayWorksheet } from '../../src/replay/replay-worksheet.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { RecordedResult, Worksheet } from '../../src/worksheet/format.ts';
import { fuzzBase } from '../support/fuzz-base.ts';
import { lookAt } from '../support/fuzz-look.ts';
import { mutated, pick } from '../support/fuzz-mutate.ts';
import { countFor, noteLongRun } from '../support/long-run.ts';
import { spent } from '../support/spent.ts';

const MINUTES = 60_000;
const bases = { trials: fuzzBase('trials'), wide: fuzzBase('wide'), whole: fuzzBase('whole') };

function baseOf(i: number): Worksheet {
  if (i % 100 === 0) return bases.whole;
  return i % 6 === 1 ? bases.wide : bases.trials;
}

test.each(Object.entries(bases))(
  'by hand: before it is mutated every cell of the worksheet %s has a value',
  async (_, base) => {
    const { results } = await recordResults(base, registry, inlineRunner(), '0.1.0');
    const without = Object.entries(results).filter(([, { status }]) => status !== 'value');
    expect(without).toEqual([]);
  },
);

test(
  'invariance: a mutated worksheet is refused in a sentence or shown whole, with no broken number and no halt',
  async ({ task }) => {
    const count = countFor(1000, 20_000);
    const problems: string[] = [];
    const came = { refused: 0, shown: 0 };
    let slowest = 0;
    for (let i = 0; i < count; i++) {
      const text = mutated(rng(20260301, i), baseOf(i));
      const began = spent();
      const looked = await lookAt(text, registry, inlineRunner()).catch((error: unknown) => ({
        problems: [error instanceof Error ? `thrown: ${error.stack}` : String(error)],
        came: 'shown' as const,
      }));
      const took = spent() - began;
      slowest = Math.max(slowest, took);
      // 2 s, the longest a reader may be left without an answer
      if (took > 2000) problems.push(`case ${i}: took ${Math.round(took)} ms`);
      problems.push(...looked.problems.map((each) => `case ${i}: ${each}`));
      came[looked.came]++;
    }
    expect(problems).toEqual([]);
    expect(Math.min(came.refused, came.shown)).toBeGreaterThan(count / 10);
    noteLongRun(task, { count: `${count} worksheets`, outcome: `none misread, slowest ${Math.round(slowest)} ms` });
  },
  14 * MINUTES,
);

/** Every number somewhere in a record: the objects or lists that hold one, with the name it has there. */
function numbersIn(part: unknown, found: { holder: Record<string, unknown>; key: string }[] = []) {
  if (typeof part !== 'object' || part === null) return found;
  const holder = part as Record<string, unknown>;
  for (const [key, each] of Object.entries(holder)) {
    if (typeof each === 'number') found.push({ holder, key });
    else numbersIn(each, found);
  }
  return found;
}

test(
  'refuses: a recorded number that was changed is named by a replay, whichever it is',
  async ({ task }) => {
    const recorded = await recordResults(bases.trials, registry, inlineRunner(), '0.1.0');
    const count = countFor(60, 2000);
    const missed: string[] = [];
    for (let i = 0; i < count; i++) {
      const random = rng(20260302, i);
      const results = structuredClone(recorded.results) as { [id: string]: RecordedResult };
      const id = pick(
        random,
        Object.keys(results).filter((each) => numbersIn(results[each]).length > 0),
      );
      const { holder, key } = pick(random, numbersIn(results[id]));
      const before = holder[key] as number;
      // a millionth of it, far beyond the tolerance of a replay, 1e-9; 0 becomes 1
      holder[key] = before === 0 ? 1 : before * (1 + pick(random, [1e-6, -1e-6, 1, -2]));
      const replay = await replayWorksheet({ ...recorded, results }, registry, inlineRunner());
      const named = replay.cells.filter((cell) => cell.came !== 'same').map((cell) => cell.id);
      if (exitOf(replay) === 0 || named.join() !== id)
        missed.push(`case ${i}: ${id} ${key} ${before} -> ${holder[key]}: ${named}`);
    }
    expect(missed).toEqual([]);
    noteLongRun(task, { count: `${count} changed numbers`, outcome: 'every one named' });
  },
  14 * MINUTES,
);
