import type { Page } from 'playwright-core';
import { describe, expect, test } from 'vitest';
import { registry } from '../../cells/registry.ts';
import type { Cell, Json, JsonObject, Worksheet } from '../../src/worksheet/format.ts';
import { openFile } from '../support/arrive.ts';
import { fuzzBase } from '../support/fuzz-base.ts';
import { usePage } from '../support/page.ts';
import { openOther, recordOf, statusesOf } from '../support/worksheet-page.ts';
import { cell } from '../support/worksheets.ts';

const harness = usePage();
const demo = { path: '#w=demo-glove-peg-test' };

/** A text that would leave a mark if any part of it were run, wherever it got: page, template, program or link. */
const evil = (name: string): string =>
  `${name}"'\`]);globalThis.planted=1;//<img src=x onerror=globalThis.planted=1></script><script>globalThis.planted=1</script>\${globalThis.planted=1}`;

/** The worksheet with names of columns, levels and a participant replaced by such texts, everywhere. */
function hostile(): Worksheet {
  const names = ['who', 'w3', 'shift', 'glove', 'thin', 'slow', 'load', 'alert', 'person', 'trials.csv', 'Trim', 's'];
  const swap = (part: Json): Json => {
    if (typeof part === 'string') return names.includes(part) ? evil(part) : part;
    if (Array.isArray(part)) return part.map(swap);
    if (typeof part !== 'object' || part === null) return part;
    return Object.fromEntries(Object.entries(part).map(([key, each]) => [key, swap(each)]));
  };
  const base = { ...fuzzBase('trials'), ...onlyData() };
  const more: readonly Cell[] = [
    cell('x1', 'note', { text: `# ${evil('a')}\n\n[${evil('b')}](javascript:globalThis.planted=1)` }),
    cell('x2', 'derive', { make: 'formula', name: 'y', formula: 'globalThis.planted=1' }, { table: 'c1' }),
    cell(
      'x3',
      'derive',
      { make: 'formula', name: evil('y'), formula: 'constructor("globalThis.planted=1")()' },
      { table: 'c1' },
    ),
    cell('x4', evil('kind').slice(0, 200), { a: evil('a') }),
  ];
  const swapped = swap(base as unknown as Json) as unknown as Worksheet;
  return { ...swapped, id: 'hostile', title: evil('title'), cells: [...swapped.cells, ...more] };
}

/** Both chains in one worksheet: the wide one goes through every verb that makes programs of column names. */
function onlyData(): Pick<Worksheet, 'cells' | 'data'> {
  const [trials, wide] = [fuzzBase('trials'), fuzzBase('wide')];
  return { cells: [...trials.cells, ...wide.cells], data: [...trials.data, ...wide.data] };
}

async function bannerOf(page: Page): Promise<string> {
  return ((await page.locator('[data-part="banner"][role=alert] p').textContent()) ?? '').trim();
}

describe('a file that tries to be run', () => {
  test('invariance: its texts reach no program that is made, no markup and no link', async () => {
    const { page, idle } = await harness.open(demo);
    await page.addInitScript(() => {
      const made: string[] = [];
      const spy = (real: (...parts: string[]) => unknown) =>
        new Proxy(real, {
          apply: (target, self, parts: string[]) => {
            made.push(parts.map(String).join('\n'));
            return Reflect.apply(target, self, parts);
          },
          construct: (target, parts: string[]) => {
            made.push(parts.map(String).join('\n'));
            return Reflect.construct(target, parts) as object;
          },
        });
      Object.assign(globalThis, { made, Function: spy(Function as unknown as (...parts: string[]) => unknown) });
    });
    await page.reload();
    await idle();
    const worksheet = hostile();
    await openOther(page, () => openFile(page, { name: 'hostile.standfast.json', text: JSON.stringify(worksheet) }));
    expect((await recordOf(page)).title).toBe(evil('title'));
    for (const summary of await page.locator('main summary').all()) await summary.click();
    const statuses = await statusesOf(page);
    for (const each of fuzzBase('trials').cells) {
      expect(statuses[each.id], each.id).toBe('fresh');
    }
    expect([statuses.e2, statuses.e4, statuses.x2, statuses.x3]).toEqual(['fresh', 'fresh', 'failed', 'failed']);
    const made = await page.evaluate(() => (globalThis as unknown as { made: string[] }).made);
    expect(made.filter((source) => /planted|onerror|\bglove\b/.test(source))).toEqual([]);
    expect(made.length).toBeGreaterThan(0);
    expect(await page.evaluate(() => 'planted' in globalThis || 'planted' in {})).toBe(false);
    expect(await page.locator('sf-app img, sf-app script, sf-app [onerror], a[href^="javascript" i]').count()).toBe(0);
  }, 120_000);

  test('refuses by the policy what markup would do, had any got in', async () => {
    const { page, problems } = await harness.open(demo);
    await page.evaluate(async () => {
      const script = document.createElement('script');
      script.textContent = 'globalThis.planted = 1';
      document.body.append(script);
      const box = document.createElement('div');
      box.innerHTML = '<img src="data:," onerror="globalThis.planted = 1"><iframe src="data:text/html,x"></iframe>';
      document.body.append(box);
      await fetch('https://example.org/').catch(() => undefined);
      await new Promise((done) => setTimeout(done, 300));
    });
    expect(await page.evaluate(() => 'planted' in globalThis)).toBe(false);
    const told = problems.splice(0).filter((each) => each.startsWith('console: policy: '));
    const blocked = new Set(told.map((each) => each.split(' ')[2]));
    expect([...blocked].sort()).toEqual(['connect-src', 'frame-src', 'script-src-attr', 'script-src-elem']);
  });
});

describe('a file that is too much, or nonsense', () => {
  test('degenerate: settings of wrong types in every kind, and cells in a circle, each say a sentence', async () => {
    const { page } = await harness.open(demo);
    const wrong: readonly Json[] = [{ a: [7] }, 7, 'x', [[1]], null];
    const odd = Object.entries(registry).flatMap(([name, kind]) =>
      wrong.map((value, i): Cell => {
        const own = Object.keys(kind.defaults({ shared: [], given: {}, data: [] }));
        const settings: JsonObject = Object.fromEntries(own.map((key) => [key, value]));
        return { ...cell(`${name}-${i}`, name, settings), version: kind.version };
      }),
    );
    const circle = [
      cell('o1', 'derive', {}, { table: 'o2' }),
      cell('o2', 'derive', {}, { table: 'o1' }),
      cell('o3', 'derive', {}, { table: 'o3' }),
    ];
    const worksheet = { ...fuzzBase('trials'), id: 'odd' };
    const text = JSON.stringify({ ...worksheet, cells: [...worksheet.cells, ...odd, ...circle] });
    await openOther(page, () => openFile(page, { name: 'odd.standfast.json', text }));
    const statuses = await statusesOf(page);
    for (const each of worksheet.cells) expect(statuses[each.id], each.id).toBe('fresh');
    for (const each of [...odd, ...circle]) {
      if (each.kind !== 'note') expect(['failed', 'waiting'], each.id).toContain(statuses[each.id]);
    }
    const shown = await page
      .locator('main [data-cell]')
      .evaluateAll((cells) =>
        cells.map((each) => [each.getAttribute('data-cell') ?? '', each.textContent ?? ''] as const),
      );
    expect(shown.length).toBeGreaterThan(worksheet.cells.length + odd.length / 2);
    expect(shown.filter(([, words]) => words.trim().length < 10 || /\[object |undefined|NaN/.test(words))).toEqual([]);
    expect(shown.find(([id]) => id === 'o1')?.[1]).toMatch(/This cell reads its own result by way of/);
  });

  test('refuses in a sentence: 10,000 levels of nesting, huge numbers, too many cells, names of every object', async () => {
    const { page } = await harness.open(demo);
    const before = await recordOf(page);
    const base = fuzzBase('trials');
    const whole = JSON.stringify(base);
    const files: readonly (readonly [string, RegExp])[] = [
      [
        whole.replace('"settings":{', `"settings":{"deep":${'['.repeat(10_000)}${']'.repeat(10_000)},`),
        /nested more than 40 deep/,
      ],
      [whole.replace('"seed":7', '"seed":1e999'), /seed is not a finite number/],
      [
        JSON.stringify({ ...base, cells: Array.from({ length: 2001 }, (_, i) => cell(`c${i}`, 'note')) }),
        /at most 2000 are/,
      ],
      [whole.replace('"id":"n1"', '"id":"n1\\"]"'), /cells\[0\]\.id must be an id .* without quotation marks/],
      [whole.replace('"kind":"note"', '"kind":"toString"'), /cells\[0\]\.kind must not be "toString"/],
      [whole.replace('"settings":{', '"settings":{"__proto__":{"planted":1},'), /__proto__ is not allowed as a name/],
    ];
    for (const [text, sentence] of files) {
      await openFile(page, { name: 'wrong.standfast.json', text });
      expect(await bannerOf(page)).toMatch(sentence);
    }
    expect((await recordOf(page)).id).toBe(before.id);
    expect(await page.evaluate(() => 'planted' in {})).toBe(false);
  });
});
