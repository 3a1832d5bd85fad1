import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest';
import { main } from '../../src/replay/read.ts';

let folder = '';
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'read-'));
});
afterAll(() => rmSync(folder, { recursive: true }));
afterEach(() => vi.restoreAllMocks());

async function run(...argv: string[]) {
  let out = '';
  let err = '';
  vi.spyOn(process.stdout, 'write').mockImplementation((text) => {
    out += String(text);
    return true;
  });
  vi.spyOn(process.stderr, 'write').mockImplementation((text) => {
    err += String(text);
    return true;
  });
  const code = await main(argv);
  vi.restoreAllMocks();
  return { code, out, err };
}

function file(name: string, content: string | Uint8Array): string {
  const path = join(folder, name);
  writeFileSync(path, content);
  return path;
}

describe('read', () => {
  it('by hand: prints rows, columns, types, missing values and warnings as JSON', async () => {
    const path = file('acks.csv', 'participant,ack_ms,when\nP1,412.5,2024-01-31\nP2,NA,\n');
    const { code, out, err } = await run(path, '--json');
    expect([code, err]).toEqual([0, '']);
    expect(out).toBe(
      '{"rows":2,"columns":[{"name":"participant","type":"text","missing":0},' +
        '{"name":"ack_ms","type":"number","missing":1},{"name":"when","type":"date","missing":1}],' +
        '"warnings":["Column ack_ms: 1 cell with \\"NA\\" is read as missing."]}\n',
    );
  });

  it('by hand: prints the same as text', async () => {
    const path = file('acks.csv', 'participant,ack_ms\nP1,412.5\nP2,\n');
    expect(await run(path)).toEqual({
      code: 0,
      err: '',
      out: 'acks.csv: 2 rows, 2 columns\n  participant  text    none missing\n  ack_ms       number  1 missing\nNo warnings.\n',
    });
  });

  it.each<[string, () => string[], string]>([
    ['a missing file', () => [join(folder, 'no.csv')], 'There is no file called'],
    ['a folder', () => [folder], 'is a folder: name a data file in it.'],
    ['an empty file', () => [file('empty.csv', '')], 'empty.csv is empty'],
    ['a binary file', () => [file('b.bin', Uint8Array.of(1, 2, 0, 4))], 'b.bin is not a text file (byte 3 is NUL)'],
    ['a ragged file', () => [file('r.csv', 'a,b\n1\n')], 'r.csv, line 2 has 1 field where the header has 2'],
    ['no file named', () => [], 'Name one data file'],
    ['an unknown option', () => ['x.csv', '--yaml'], 'There is no option --yaml.'],
  ])('refuses %s with one sentence and exit 2', async (_, argv, sentence) => {
    const { code, out, err } = await run(...argv());
    expect([code, out]).toEqual([2, '']);
    expect(err).toContain(sentence);
    expect(err.trim().split('\n')).toHaveLength(1);
  });
});
