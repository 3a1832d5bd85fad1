import { describe, expect, test } from 'vitest';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { cell, dataBlock, shared, worksheet } from '../support/worksheets.ts';

const good: Worksheet = worksheet([cell('c1', 'number', { value: { shared: 'a' } })], {
  shared: [shared('a', 1)],
  data: [dataBlock('d1', [1, null])],
});

/** The good worksheet as loose data, changed in place. */
function changed(change: (loose: Loose) => void): string {
  const loose = JSON.parse(JSON.stringify(good)) as Loose;
  change(loose);
  return JSON.stringify(loose);
}
// biome-ignore lint/suspicious/noExplicitAny: the tests put wrong things into right places
type Loose = any;

function refusalOf(source: string): { place: string; sentence: string } {
  const parsed = parseWorksheet(source);
  if (parsed.ok) throw new Error('it was read');
  return parsed;
}

const deep = (levels: number): unknown => (levels === 0 ? 1 : { a: deep(levels - 1) });

describe('parseWorksheet', () => {
  test('by hand: a good worksheet, also after a byte order mark', () => {
    expect(parseWorksheet(JSON.stringify(good))).toEqual({ ok: true, worksheet: good });
    expect(parseWorksheet(`\ufeff${JSON.stringify(good)}`).ok).toBe(true);
  });

  test('by hand: unknown kinds with any settings are kept, and so are cells that read what is not there', () => {
    const odd = { ...good, cells: [cell('c1', 'of tomorrow', { x: [{ y: 'z' }], deep: deep(30) as never }, 'c99')] };
    expect(parseWorksheet(JSON.stringify(odd))).toEqual({ ok: true, worksheet: odd });
  });

  test.each<[string, string, (loose: Loose) => void]>([
    ['a missing field', 'title', (w) => delete w.title],
    ['an unknown field', 'extra', (w) => (w.extra = 1)],
    ['an unknown field of a cell', 'cells[0].colour', (w) => (w.cells[0].colour = 'red')],
    ['a list that is an object', 'cells', (w) => (w.cells = {})],
    ['a cell that is null', 'cells[0]', (w) => (w.cells[0] = null)],
    ['settings that are a list', 'cells[0].settings', (w) => (w.cells[0].settings = [])],
    ['a port that reads a number', 'cells[0].from.x', (w) => (w.cells[0].from = { x: 3 })],
    ['an empty id', 'cells[0].id', (w) => (w.cells[0].id = '')],
    ['an id that would end a selector', 'cells[0].id', (w) => (w.cells[0].id = 'a"]')],
    ['an id that every object has of itself', 'cells[0].id', (w) => (w.cells[0].id = 'constructor')],
    ['a shared id that every object has of itself', 'shared[0].id', (w) => (w.shared[0].id = '__proto__')],
    ['a kind that every object has of itself', 'cells[0].kind', (w) => (w.cells[0].kind = 'toString')],
    ['an id with a line break', 'cells[0].id', (w) => (w.cells[0].id = 'a\nb')],
    ['two cells of one id', 'cells[1].id', (w) => w.cells.push(w.cells[0])],
    ['two shared numbers of one id', 'shared[1].id', (w) => w.shared.push(w.shared[0])],
    ['a shared number that is text', 'shared[0].value', (w) => (w.shared[0].value = '3')],
    ['left out that is text', 'cells[0].leftOut', (w) => (w.cells[0].leftOut = 'yes')],
    ['a version that is not whole', 'cells[0].version', (w) => (w.cells[0].version = 1.5)],
    ['a seed beyond 32 bits', 'seed', (w) => (w.seed = 4294967296)],
    ['a state that is not one', 'opening.state', (w) => (w.opening = { state: 'open' })],
    [
      'opened without a reason',
      'opening.reason',
      (w) => (w.opening = { state: 'opened-early', when: '2026-01-01T00:00Z' }),
    ],
    ['a blind worksheet with a hash', 'opening.hash', (w) => (w.opening = { state: 'blind', hash: '0'.repeat(64) })],
    ['a short hash', 'opening.hash', (w) => (w.opening = { state: 'sealed', hash: 'abc', when: '2026-01-01T00:00Z' })],
    [
      'a time that is a date',
      'opening.when',
      (w) => (w.opening = { state: 'opened-early', reason: '', when: '2026-01-01' }),
    ],
    ['a column of another length', 'data[0].columns[0]', (w) => (w.data[0].rows = 3)],
    ['a value that is text', 'data[0].columns[0].values[1]', (w) => (w.data[0].columns[0].values[1] = 'NA')],
    ['a column type that is not one', 'data[0].columns[0].type', (w) => (w.data[0].columns[0].type = 'integer')],
    [
      'a code beyond the levels',
      'data[0].columns[0].codes[1]',
      (w) => (w.data[0].columns[0] = { name: 'x', type: 'text', levels: ['a'], codes: [0, 1] }),
    ],
    [
      'a level twice',
      'data[0].columns[0].levels',
      (w) => (w.data[0].columns[0] = { name: 'x', type: 'text', levels: ['a', 'a'], codes: [0, 1] }),
    ],
    ['two columns of one name', 'data[0].columns[1].name', (w) => w.data[0].columns.push(w.data[0].columns[0])],
    ['a name of more than 10,000 characters', 'data[0].name', (w) => (w.data[0].name = 'x'.repeat(10_001))],
    [
      'more than 2,000 cells',
      'cells',
      (w) => (w.cells = Array.from({ length: 2001 }, (_, i) => cell(`c${i}`, 'note'))),
    ],
    [
      'more than 16,384 columns',
      'data[0].columns',
      (w) =>
        (w.data[0].columns = Array.from({ length: 16_385 }, (_, i) => ({
          name: `x${i}`,
          type: 'number',
          values: [1, 2],
        }))),
    ],
    [
      'a field name of more than 10,000 characters',
      `cells[0].settings["${'x'.repeat(60)}..."]`,
      (w) => (w.cells[0].settings['x'.repeat(10_001)] = 1),
    ],
    [
      'a name that reaches into every object',
      'cells[0].settings.constructor',
      (w) => (w.cells[0].settings.constructor = 1),
    ],
    ['a result of no known status', 'results.c1.status', (w) => (w.results.c1 = { status: 'done', value: 1 })],
    ['another program', 'program.name', (w) => (w.program.name = 'other')],
    [
      'a reference without a finding',
      'reference.finding',
      (w) => (w.reference = { when: '2026-01-01T00:00Z', label: '', shared: {} }),
    ],
  ])('refuses: %s, naming the place', (_title, place, change) => {
    const refusal = refusalOf(changed(change));
    expect(refusal.place).toBe(place);
    expect(refusal.sentence).toContain(`This file cannot be opened as a worksheet: ${place} `);
  });

  test('refuses: names such as __proto__ at any depth, which leave every object as it was', () => {
    const source = changed(() => undefined).replace('"settings":{', '"settings":{"__proto__":{"polluted":true},');
    expect(refusalOf(source).place).toBe('cells[0].settings.__proto__');
    expect(refusalOf('{"__proto__":{"format":"standfast-worksheet"}}').place).toBe('__proto__');
    expect(({} as { polluted?: boolean }).polluted).toBe(undefined);
  });

  test('refuses: deep nesting and numbers beyond all bounds, without falling over', () => {
    expect(refusalOf(changed((w) => (w.cells[0].settings = deep(60)))).sentence).toContain('nested more than 40 deep');
    expect(refusalOf('['.repeat(100_000)).sentence).toContain('is not JSON');
    expect(refusalOf(`${'['.repeat(100_000)}${']'.repeat(100_000)}`).sentence).toContain('nested more than 40 deep');
    expect(refusalOf(changed(() => undefined).replace('"seed":7', '"seed":1e999')).sentence).toContain(
      'seed is not a finite number',
    );
  });

  test('refuses: what is not JSON, not an object, another format, a newer version', () => {
    expect(refusalOf('{\n"a": 1,\n}').sentence).toMatch(/it is not JSON \(line 3\)/);
    for (const source of ['', 'null', '3', '[]', '"text"', '<html>']) expect(refusalOf(source).place).toBe('');
    expect(refusalOf('{"format":"other"}').place).toBe('format');
    expect(refusalOf(changed((w) => (w.version = 2))).sentence).toContain('newer Standfast');
  });

  test('refuses: more than 64 MiB, before looking at it', () => {
    const began = performance.now();
    expect(refusalOf(' '.repeat(64 * 1024 * 1024 + 1)).sentence).toContain('is larger than 64 MiB');
    expect(performance.now() - began).toBeLessThan(1_000);
  });

  test('refuses: a good file with any one value replaced by rubbish is read or refused, never a fault of the program', () => {
    const rubbish = [null, true, -1, 1.5, '', 'x', [], {}, [[]], { a: 1 }];
    let refused = 0;
    const walk = (part: Loose, root: Loose): void => {
      for (const key of Object.keys(part)) {
        const kept = part[key];
        for (const wrong of rubbish) {
          part[key] = wrong;
          const parsed = parseWorksheet(JSON.stringify(root));
          if (!parsed.ok) refused++;
        }
        part[key] = kept;
        if (typeof kept === 'object' && kept !== null) walk(kept, root);
      }
    };
    const loose = JSON.parse(JSON.stringify(good)) as Loose;
    walk(loose, loose);
    expect(refused).toBeGreaterThan(300);
  });
});
