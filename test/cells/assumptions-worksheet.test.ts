import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { Engine } from '../../src/engine/engine.ts';
import { exitOf, replayWorksheet } from '../../src/replay/replay-worksheet.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';
import { assumptionsWorksheet } from '../support/assumptions-worksheet.ts';

function golden(): Worksheet {
  const parsed = parseWorksheet(readFileSync('test/golden/assumptions.standfast.json', 'utf8'));
  if (!parsed.ok) throw new Error(parsed.sentence);
  return parsed.worksheet;
}

describe('a worksheet with two assumptions cells', () => {
  it('invariance: the golden file is the worksheet as made here, its recorded results apart', () => {
    expect(writeWorksheet({ ...golden(), results: {} })).toBe(writeWorksheet(assumptionsWorksheet()));
  });

  it('invariance: every recorded number comes out again', async () => {
    const replay = await replayWorksheet(golden(), registry, inlineRunner());
    expect(replay.cells.filter((each) => each.came !== 'same')).toEqual([]);
    expect(exitOf(replay)).toBe(0);
  });

  it('agrees with R shapiro.test and SciPy shapiro: recorded W of differences and of residuals, 1e-6', () => {
    const value = (id: string) => golden().results[id]?.value as { tests: [string, number, number][]; n: number };
    // Reference case sleep; scipy.stats.shapiro of weight minus its group's mean.
    expect(value('c4').tests[0]?.[1]).toBeCloseTo(0.8298713319287948, 6);
    expect(value('c8').tests[0]?.[1]).toBeCloseTo(0.9660681486, 6);
    expect([value('c4').n, value('c8').n]).toEqual([10, 30]);
  });

  it('theory: while the conditions are hidden the cell is veiled: not computed', async () => {
    const engine = new Engine({ registry, runner: inlineRunner(), onState: () => undefined });
    engine.show({ ...assumptionsWorksheet(), opening: { state: 'blind' } });
    await engine.idle();
    expect([engine.state('c4').status, engine.state('c8').status]).toEqual(['veiled', 'veiled']);
    engine.dispose();
  });
});
