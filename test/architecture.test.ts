import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, test } from 'vitest';
import {
  breachesOf,
  ceilingBreaches,
  cycleBreaches,
  importBreaches,
  impureBreaches,
  kindBreaches,
  type SourceFile,
  untestedBreaches,
} from './support/architecture.ts';

const root = fileURLToPath(new URL('..', import.meta.url));

function filesBelow(folder: string): SourceFile[] {
  return readdirSync(join(root, folder), { withFileTypes: true }).flatMap((entry) => {
    const path = `${folder}/${entry.name}`;
    if (entry.isDirectory()) return filesBelow(path);
    return path.endsWith('.ts') ? [{ path, text: readFileSync(join(root, path), 'utf8') }] : [];
  });
}

const tree: readonly SourceFile[] = ['src', 'cells', 'test'].flatMap(filesBelow);

/** The tree with files put in or replaced. */
function planted(...files: readonly [string, string][]): readonly SourceFile[] {
  const paths = new Set(files.map(([path]) => path));
  return [...tree.filter(({ path }) => !paths.has(path)), ...files.map(([path, text]) => ({ path, text }))];
}

describe('the rooms as they are', () => {
  test('theory: no breach of any rule', () => {
    expect(breachesOf(tree)).toEqual([]);
  });

  test('by hand: the whole tree was looked at', () => {
    const rooms = new Set(tree.map(({ path }) => /^(?:src\/)?([^/]+)\//.exec(path)?.[1]));
    for (const room of [
      'numerics',
      'data',
      'analysis',
      'worksheet',
      'workers',
      'engine',
      'replay',
      'app',
      'cells',
      'test',
    ]) {
      expect(rooms).toContain(room);
    }
  });
});

describe('what the rules catch', () => {
  test.each([
    ['src/numerics/planted.ts', "import { columnOf } from '../data/table.ts';"],
    ['src/numerics/planted.ts', "import type { Table } from '../data/table.ts';"],
    ['src/data/planted.ts', "import {\n  planCells,\n} from '../engine/plan.ts';"],
    ['src/data/planted.ts', "export { parseWorksheet } from '../worksheet/parse.ts';"],
    ['src/analysis/planted.ts', "import type { Kind } from '../../cells/kind.ts';"],
    ['src/worksheet/planted.ts', "import { Refusal } from '../data/refusal.ts';"],
    ['src/workers/planted.ts', "import { Engine } from '../engine/engine.ts';"],
    ['src/engine/planted.ts', "import { registry } from '../../cells/registry.ts';"],
    ['src/engine/planted.ts', "import { dataKind } from '../../cells/data/kind.ts';"],
    ['src/engine/planted.ts', "const late = await import('../app/main.ts');"],
    ['src/replay/planted.ts', "import '../app/main.ts';"],
    ['src/report/planted.ts', "import { html } from '../app/page.ts';"],
    ['cells/data/planted.ts', "import { inlineRunner } from '../../src/workers/inline.ts';"],
    ['cells/data/planted.ts', "import { Engine } from '../../src/engine/engine.ts';"],
    ['src/data/planted.ts', "import { html } from 'lit';"],
    ['src/analysis/planted.ts', "import * as arquero from 'arquero';"],
    ['src/worksheet/planted.ts', "import { readFileSync } from 'node:fs';"],
    ['src/engine/planted.ts', "import { Engine } from '../../test/support/kinds.ts';"],
  ])('refuses: in %s, %s', (path, text) => {
    const breaches = importBreaches(planted([path, text]));
    expect(breaches.filter((breach) => breach.startsWith(`${path} imports `)).length).toBe(1);
  });

  test.each([
    ['src/data/planted.ts', "import { sorted } from '../numerics/order.ts';"],
    ['cells/data/planted.ts', "import type { JobName } from '../../src/workers/runner.ts';"],
    ['cells/data/planted.ts', "import { type JobName, type JobArgs } from '../../src/workers/runner.ts';"],
    ['src/engine/planted.ts', "import { Refusal } from '../../cells/kind.ts';"],
    ['src/data/planted.ts', "// import { Engine } from '../engine/engine.ts';"],
    ['src/app/planted.ts', "import { Engine } from '../engine/engine.ts';"],
  ])('by hand: allowed in %s, %s', (path, text) => {
    expect(importBreaches(planted([path, text])).filter((breach) => breach.startsWith(path))).toEqual([]);
  });

  test('refuses: a kind that imports another kind, also for a type', () => {
    for (const text of ["import { x } from '../score/kind.ts';", "import type { X } from '../score/sentence.ts';"]) {
      const breaches = kindBreaches(planted(['cells/data/planted.ts', text]));
      expect(breaches.length).toBe(1);
      expect(breaches[0]).toContain('a kind may not import another kind');
    }
    expect(kindBreaches(planted(['cells/data/planted.ts', "import { x } from '../numbers.ts';"]))).toEqual([]);
  });

  test('refuses: a circle of imports, named; a circle of types only is allowed', () => {
    const circle = (word: string) =>
      planted(
        ['src/data/planted-a.ts', `import ${word} { b } from './planted-b.ts';`],
        ['src/data/planted-b.ts', "import { c } from './planted-c.ts';"],
        ['src/data/planted-c.ts', "export * from './planted-a.ts';"],
      );
    const planting = (breaches: readonly string[]) => breaches.filter((breach) => breach.includes('planted'));
    expect(planting(cycleBreaches(circle(''))).length).toBe(1);
    expect(planting(cycleBreaches(circle('')))[0]).toContain('planted-a.ts -> src/data/planted-b.ts');
    expect(planting(cycleBreaches(circle('type')))).toEqual([]);
  });

  test.each([
    ['src/numerics/planted.ts', 'const x = Math.random();'],
    ['src/analysis/planted.ts', 'const now = Date.now();'],
    ['src/analysis/planted.ts', 'const now = new Date();'],
    ['src/data/planted.ts', "document.querySelector('p');"],
    ['src/data/planted.ts', "const bytes = await fetch('x');"],
    ['src/worksheet/planted.ts', "if (window.name === '') stop();"],
    ['src/workers/jobs.ts', 'export const jobs = { chance: () => Math.random() };'],
  ])('refuses: in %s, %s', (path, text) => {
    const breaches = impureBreaches(planted([path, text]));
    expect(breaches.filter((breach) => breach.startsWith(path)).length).toBe(1);
  });

  test.each([
    ['src/engine/planted.ts', 'const now = Date.now();'],
    ['src/data/planted.ts', '/** Never Math.random(): draws come from a seed. */\nexport const x = 1;'],
    ['src/data/planted.ts', 'const day = new Date(text); const windows = [1]; documents[0];'],
  ])('by hand: allowed in %s, %s', (path, text) => {
    expect(impureBreaches(planted([path, text])).filter((breach) => breach.startsWith(path))).toEqual([]);
  });

  test.each([
    ['src/numerics/planted.ts', 300],
    ['cells/data/planted.ts', 250],
    ['src/app/planted.ts', 350],
    ['src/engine/planted.ts', 300],
    ['test/data/planted.test.ts', 400],
  ])('refuses: a %s of more than %d lines', (path, ceiling) => {
    const breaches = (lines: number) =>
      ceilingBreaches(planted([path, 'x;\n'.repeat(lines)])).filter((breach) => breach.startsWith(path));
    expect(breaches(ceiling)).toEqual([]);
    expect(breaches(ceiling + 1)).toEqual([`${path} has ${ceiling + 1} lines; the ceiling is ${ceiling}`]);
  });

  test('refuses: a file of numerics or analysis without a test; types alone need none', () => {
    const value = 'export function planted(): number {\n  return 1;\n}\n';
    const about = (breaches: readonly string[]) => breaches.filter((breach) => breach.includes('planted'));
    expect(about(untestedBreaches(planted(['src/numerics/planted.ts', value])))).toEqual([
      'src/numerics/planted.ts has no test: test/numerics/planted.test.ts',
    ]);
    expect(about(untestedBreaches(planted(['src/analysis/sub/planted.ts', value]))).length).toBe(1);
    expect(about(untestedBreaches(planted(['src/numerics/planted.ts', 'export interface Planted {}'])))).toEqual([]);
    const withTest = planted(['src/numerics/planted.ts', value], ['test/numerics/planted.test.ts', '']);
    expect(about(untestedBreaches(withTest))).toEqual([]);
  });
});
