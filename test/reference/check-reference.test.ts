import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { main } from './check-reference.ts';

let folder = '';
let out = '';

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'standfast-reference-'));
  out = '';
  const keep = (text: unknown): boolean => {
    out += String(text);
    return true;
  };
  vi.spyOn(process.stdout, 'write').mockImplementation(keep);
  vi.spyOn(process.stderr, 'write').mockImplementation(keep);
});

afterEach(() => {
  vi.restoreAllMocks();
  rmSync(folder, { recursive: true });
});

const lastLine = (): string => out.trimEnd().split('\n').at(-1) ?? '';

// Tails of the normal distribution at 1.96: SciPy 1.10, norm.sf and norm.cdf.
test('by hand: a folder of tail grids passes, and a wrong value is a miss that is named', async () => {
  const head = 'x,lower,upper\n';
  const right = `1.96,0.9750021048517795,0.024997895148220435`;
  writeFileSync(join(folder, 'norm_cdf.csv'), `${head}${right}\n`);
  expect([await main([folder]), lastLine()]).toEqual([0, '2 passed, 0 failed, 0 skipped']);
  out = '';
  writeFileSync(join(folder, 'norm_cdf.csv'), `${head}1.96,0.9750021048517795,0.025\n`);
  expect([await main([folder]), lastLine()]).toEqual([1, '1 passed, 1 failed, 0 skipped']);
  expect(out).toContain('norm_cdf(x=1.96) upper');
});

test('by hand: a folder of cases is told by its JSON; a method that is not offered is skipped by name', async () => {
  cpSync('test/reference/cases/sleep.csv', join(folder, 'sleep.csv'));
  const { cases, ...rest } = JSON.parse(readFileSync('test/reference/cases/sleep.json', 'utf8'));
  const mean = cases.find((one: { method: string }) => one.method === 'mean');
  const planted = { ...mean, id: 'planted', expect: { value: 99 } };
  const unknown = { ...mean, id: 'unknown', method: 'no_such_method' };
  writeFileSync(join(folder, 'sleep.json'), JSON.stringify({ ...rest, cases: [mean, planted, unknown] }));
  expect([await main([folder]), lastLine()]).toEqual([1, '1 passed, 1 failed, 1 skipped']);
  expect(out).toContain('planted mean');
  expect(out).toContain('no_such_method: skipped');
});

test('refuses: no folder, a folder that is not there, and an empty one, each with a sentence', async () => {
  expect(await main([])).toBe(2);
  expect(await main([join(folder, 'nothing')])).toBe(2);
  expect(await main([folder])).toBe(2);
  expect(out.trimEnd().split('\n').length).toBe(3);
});
