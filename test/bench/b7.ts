import { type ChildProcessWithoutNullStreams, spawn, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { createInterface } from 'node:readline';
import { importBytes } from '../../src/data/import/import-bytes.ts';
import type { BenchRow } from './bench-row.ts';
import { compareInTurns, type Peer } from './in-turns.ts';

const ROWS = 1_000_000;

/** Reads the bytes of the file it is told, which are in memory by then, and answers with the CPU time in ms. */
const READER = `
import io, sys, time
import pandas as pd
held = {}
for line in sys.stdin:
    name = line.rstrip("\\n")
    if name not in held:
        held[name] = open(name, "rb").read()
    source = io.BytesIO(held[name])
    start = time.process_time()
    pd.read_csv(source)
    print((time.process_time() - start) * 1000, flush=True)
`;

/** One row a trial: three columns of text, five of numbers; `digits` decimals of the two measures. */
function trials(digits: number): string {
  let state = 1;
  const below = (n: number) => {
    state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
    return (state / 2 ** 32) * n;
  };
  const lines = ['participant,alert,training,trial,block,ack_ms,load,correct'];
  for (let row = 0; row < ROWS; row++) {
    const who = `P${String(Math.floor(below(400))).padStart(3, '0')}`;
    const alert = ['tone', 'voice', 'both'][Math.floor(below(3))];
    const training = below(2) < 1 ? 'short' : 'long';
    const ack = (300 + below(2000)).toFixed(digits);
    const load = (below(80) - 5).toFixed(digits + 2);
    lines.push(
      `${who},${alert},${training},${(row % 2500) + 1},${1 + Math.floor(below(8))},${ack},${load},${below(2) < 1 ? 0 : 1}`,
    );
  }
  return `${lines.join('\n')}\n`;
}

function startReader(): ChildProcessWithoutNullStreams | null {
  const commands = ['/usr/bin/python3', 'python3'];
  const found = commands.find((each) => spawnSync(each, ['-c', 'import pandas'], { stdio: 'ignore' }).status === 0);
  return found === undefined ? null : spawn(found, ['-c', READER], { stdio: 'pipe' });
}

function peer(reader: ChildProcessWithoutNullStreams, answers: AsyncIterator<string>, file: string): Peer {
  return {
    name: 'pandas.read_csv',
    goal: 1,
    run: async () => {
      reader.stdin.write(`${file}\n`);
      return Number((await answers.next()).value);
    },
  };
}

/** A file of a million rows and eight columns into typed columns; on both sides its bytes are in memory. */
export async function rows(): Promise<BenchRow[]> {
  const folder = mkdtempSync(join(tmpdir(), 'bench-'));
  const reader = startReader();
  const all: BenchRow[] = [];
  try {
    const answers = reader && createInterface({ input: reader.stdout })[Symbol.asyncIterator]();
    for (const digits of [2, 12]) {
      const file = join(folder, `trials-${digits}.csv`);
      writeFileSync(file, trials(digits));
      const bytes = new Uint8Array(readFileSync(file));
      const work = () => importBytes(bytes, 'trials.csv');
      const absent = { name: 'pandas.read_csv', goal: 1, absent: 'skipped: no Python with pandas here' };
      const other = reader && answers ? peer(reader, answers, file) : absent;
      all.push(...(await compareInTurns('B7', `rows=1000000 columns=8 decimals=${digits}`, work, [other])));
    }
  } finally {
    reader?.kill();
    rmSync(folder, { recursive: true });
  }
  return all;
}
