import { readFileSync } from 'node:fs';
import { beforeAll, describe, expect, test } from 'vitest';
import { registry } from '../../cells/registry.ts';
import { demoWorksheet, plans } from '../../demo-data/worksheets.ts';
import { exitOf, type Replay, replayWorksheet } from '../../src/replay/replay-worksheet.ts';
import { inlineRunner } from '../../src/workers/inline.ts';
import type { JsonObject, Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';

function committed(name: string): Worksheet {
  const parsed = parseWorksheet(readFileSync(`demo-data/${name}.standfast.json`, 'utf8'));
  if (!parsed.ok) throw new Error(parsed.sentence);
  return parsed.worksheet;
}

function recorded(worksheet: Worksheet, kind: string, nth = 0): JsonObject {
  const cell = worksheet.cells.filter((each) => each.kind === kind)[nth];
  return worksheet.results[cell?.id ?? '']?.value as JsonObject;
}

describe.each(plans)('demo worksheet $name', (plan) => {
  const worksheet = committed(plan.name);
  let replay: Replay;

  beforeAll(async () => {
    replay = await replayWorksheet(worksheet, registry, inlineRunner());
  });

  test('invariance: the file is what worksheets.ts makes, its recorded results apart', () => {
    const made = demoWorksheet(plan, readFileSync(`demo-data/${plan.file}`, 'utf8'));
    expect(writeWorksheet({ ...worksheet, results: {} })).toBe(writeWorksheet(made));
  });

  test('invariance: every recorded number comes out again and every cell has a value', () => {
    expect(replay.cells.filter((cell) => cell.came !== 'same')).toEqual([]);
    expect(exitOf(replay)).toBe(0);
    expect(Object.values(worksheet.results).map((result) => result.status)).toEqual(worksheet.cells.map(() => 'value'));
  });
});

// Counts of the file as demo-data/README.md states them; p from the same scores by scipy.stats.ttest_1samp
// (SciPy 1.10) and by the Tukey-McLaughlin formula in NumPy with SciPy's t distribution.
test('agrees with SciPy: bridge-alerts keeps 2,051 trials, scores 35, compares 34 officers', () => {
  const worksheet = committed('bridge-alerts');
  expect([0, 1, 2].map((nth) => recorded(worksheet, 'exclusion', nth).kept)).toEqual([2060, 2051, 2051]);
  expect((recorded(worksheet, 'score').participants as string[]).length).toBe(35);
  const findings = recorded(worksheet, 'comparison').findings as { estimator: string; n: number; p: number }[];
  const planned = findings.find((finding) => finding.estimator === 'trimmed-differences');
  const mean = findings.find((finding) => finding.estimator === 'paired-t');
  expect([planned?.n, mean?.n]).toEqual([34, 34]);
  expect(Math.abs((mean?.p ?? 0) / 0.019491812442600433 - 1)).toBeLessThan(1e-9);
  expect(Math.abs((planned?.p ?? 0) / 0.0011420635909976948 - 1)).toBeLessThan(1e-9);
});
