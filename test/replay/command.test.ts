import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';

function run(...args: string[]): { code: number | null; out: string; err: string } {
  const { NODE_ENV: _mode, VITEST: _vitest, ...env } = process.env;
  const done = spawnSync(process.execPath, ['src/replay/command.mjs', ...args], { encoding: 'utf8', env });
  return { code: done.status, out: done.stdout, err: done.stderr };
}

test('by hand: the exit code of a command passes through and the bundling writes nothing to stdout', () => {
  const folder = mkdtempSync(join(tmpdir(), 'standfast-command-'));
  const empty = run('check-reference', folder);
  rmSync(folder, { recursive: true });
  expect({ code: empty.code, out: empty.out }).toEqual({ code: 2, out: '' });
  expect(empty.err).toContain('holds neither cases');
}, 120_000);

test('refuses: a command that does not exist, by name', () => {
  const unknown = run('remake');
  expect({ code: unknown.code, out: unknown.out }).toEqual({ code: 1, out: '' });
  expect(unknown.err).toContain('there is no command called remake');
});
