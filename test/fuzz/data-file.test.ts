import { readFileSync } from 'node:fs';
import { expect, test } from 'vitest';
import { blockFromBytes } from '../../src/app/data-block.ts';
import { Refusal } from '../../src/data/refusal.ts';
import { tableFromStored } from '../../src/data/stored.ts';
import { type Rng, rng } from '../../src/numerics/rng.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';
import { HOSTILE_TEXTS, pick } from '../support/fuzz-mutate.ts';
import { countFor, noteLongRun } from '../support/long-run.ts';
import { spent } from '../support/spent.ts';
import { worksheet } from '../support/worksheets.ts';

const MINUTES = 60_000;
const files = ['glove-peg-test', 'hearing-words', 'bridge-workload-wide'].map((name) =>
  readFileSync(`demo-data/${name}.csv`, 'utf8'),
);
const PUT: readonly string[] = [
  ...HOSTILE_TEXTS,
  ...[
    '"',
    '""',
    ',',
    ';',
    '\t',
    '|',
    '\n',
    '\r\n',
    '\r',
    '\n\n',
    '\ufeff',
    '1e999',
    '-1e400',
    '1,5',
    '0x1f',
    '=1+1',
    '\u2212',
  ],
  ...[
    '999999999999999999999',
    '1e-400',
    'Infinity',
    '-',
    '.',
    '2026-02-30',
    '2026-02-28T23:59:60Z',
    '\u0660',
    ','.repeat(300),
  ],
];

/** A data file with one to four pieces put in, taken out or repeated, now and then in another encoding. */
function spoilt(random: Rng): Uint8Array {
  let text = pick(random, files);
  for (let k = random.below(4); k >= 0; k--) {
    const place = random.below(text.length + 1);
    const end = Math.min(text.length, place + random.below(random.below(8) === 0 ? 400 : 4));
    const put = random.below(6) === 0 ? text.slice(place, place + random.below(200)) : pick(random, PUT);
    text = text.slice(0, place) + put + text.slice(end);
  }
  if (random.below(8) === 0) return new Uint8Array(Buffer.from(text, 'utf16le'));
  if (random.below(8) === 0) return new Uint8Array(Buffer.from(text, 'latin1'));
  return new TextEncoder().encode(text);
}

/** What is wrong with how a data file was taken; null where nothing is. */
function problemOf(bytes: Uint8Array): string | null {
  const block = blockFromBytes(bytes, 'spoilt.csv', 'd1');
  const written = writeWorksheet(worksheet([], { data: [block] }));
  const again = parseWorksheet(written);
  if (!again.ok) return again.sentence;
  if (writeWorksheet(again.worksheet) !== written) return 'what was saved is another table when opened';
  for (const column of tableFromStored(block).columns) {
    // NaN stands for a missing value
    if (column.type === 'number' && column.values.some((value) => Math.abs(value) === Number.POSITIVE_INFINITY))
      return `${column.name} holds a number beyond all bounds`;
  }
  return null;
}

test(
  'invariance: a spoilt data file is refused in a sentence or becomes a table that is kept as it is',
  ({ task }) => {
    const count = countFor(1000, 20_000);
    const problems: string[] = [];
    let refused = 0;
    for (let i = 0; i < count; i++) {
      const bytes = spoilt(rng(20260303, i));
      const began = spent();
      try {
        const problem = problemOf(bytes);
        if (problem !== null) problems.push(`case ${i}: ${problem}`);
      } catch (error) {
        if (error instanceof Refusal && /spoilt\.csv.{10,}/s.test(error.message)) refused++;
        else problems.push(`case ${i}: ${error instanceof Error ? error.stack : String(error)}`);
      }
      if (spent() - began > 2000) problems.push(`case ${i}: took more than 2 s`);
    }
    expect(problems).toEqual([]);
    expect(Math.min(refused, count - refused)).toBeGreaterThan(count / 20);
    noteLongRun(task, { count: `${count} data files`, outcome: `${refused} refused, none misread` });
  },
  14 * MINUTES,
);

test('degenerate: as many columns as a spreadsheet may have come back from a saved worksheet', () => {
  const names = Array.from({ length: 16_384 }, (_, i) => `x${i}`);
  const text = `${names.join(',')}\n${names.map((_, i) => i).join(',')}\n`;
  expect(problemOf(new TextEncoder().encode(text))).toBe(null);
}, 60_000);

test('refuses: a data file with more than a worksheet may hold, before it is taken', () => {
  const read = (text: string) => () => blockFromBytes(new TextEncoder().encode(text), 'long.csv', 'd1');
  expect(read(`who,text\n1,${'x'.repeat(1_000_001)}\n2,y\n`)).toThrow(
    /^long\.csv is more than a worksheet can hold: columns\[1\]\.levels\[0\] has 1000001 characters; at most 1000000 are allowed\. Leave out/,
  );
});
