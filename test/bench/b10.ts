import { Engine } from '../../src/engine/engine.ts';
import { trimmedMean } from '../../src/numerics/trimmed-mean.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { Cell, Worksheet } from '../../src/worksheet/format.ts';
import { testKind } from '../support/kinds.ts';
import { cell, shared, withShared, worksheet } from '../support/worksheets.ts';
import type { BenchRow } from './bench-row.ts';
import { compareInTurns } from './in-turns.ts';
import { benchScores } from './scores.ts';

const CHAINS = 10;
const LENGTH = 5;
const SCORES = 2_000;

const start = testKind({
  name: 'start',
  compute: (settings) => ({ value: benchScores(SCORES, settings.by as number), detail: null }),
});

/** Moves every score by the trimmed mean of all: as much work as a score or a comparison on a usual file. */
const step = testKind({
  name: 'step',
  takes: { from: 'table' },
  compute: (settings, given) => {
    const scores = given.from as Float64Array;
    const by = trimmedMean(scores, settings.trim as number);
    return { value: scores.map((score) => score + by), detail: null };
  },
});

/** Ten chains of five cells; each chain has a shared number of its own at its first cell. */
function fiftyCells(): Worksheet {
  const cells: Cell[] = [];
  for (let chain = 0; chain < CHAINS; chain++) {
    cells.push(cell(`c${chain}-0`, 'start', { by: { shared: `n${chain}` } }));
    for (let i = 1; i < LENGTH; i++) cells.push(cell(`c${chain}-${i}`, 'step', { trim: 20 }, `c${chain}-${i - 1}`));
  }
  return worksheet(cells, { shared: Array.from({ length: CHAINS }, (_, chain) => shared(`n${chain}`, 0)) });
}

/** Changing one shared number in a worksheet of 50 cells: its five dependents, against everything again. */
export async function rows(): Promise<BenchRow[]> {
  const engine = new Engine({ registry: { start, step }, runner: inlineRunner() });
  let record = fiftyCells();
  let value = 0;
  const changed = async (ids: readonly string[]) => {
    value++;
    for (const id of ids) record = withShared(record, id, value / 1024);
    engine.show(record);
    await engine.idle();
  };
  const every = Array.from({ length: CHAINS }, (_, chain) => `n${chain}`);
  const everything = {
    name: 'everything again',
    goal: 5,
    run: async () => {
      const before = process.cpuUsage();
      await changed(every);
      const { user, system } = process.cpuUsage(before);
      return (user + system) / 1000;
    },
  };
  await changed(every);
  try {
    return await compareInTurns('engine', '50 cells, one shared number with 5 dependents', () => changed(['n3']), [
      everything,
    ]);
  } finally {
    engine.dispose();
  }
}
