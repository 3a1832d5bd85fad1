import { describe, expect, test } from 'vitest';
import { appendEntry } from '../../src/worksheet/decision-log.ts';
import type { Worksheet } from '../../src/worksheet/format.ts';
import { parseWorksheet } from '../../src/worksheet/parse.ts';
import { writeWorksheet } from '../../src/worksheet/write.ts';
import { cell, dataBlock, shared, worksheet } from '../support/worksheets.ts';

const full: Worksheet = worksheet(
  [
    cell('c1', 'data', { data: 'd1' }),
    {
      ...cell('c2', 'exclusion', { cutoff: { shared: 'cutoff' }, deep: [[{ a: null }]] }, { design: 'c1' }),
      leftOut: true,
    },
    cell('c3', 'a kind of tomorrow', { anything: { at: ['all'] } }),
  ],
  {
    shared: [shared('cutoff', 2.5), shared('trim', null)],
    data: [
      {
        ...dataBlock(
          'd1',
          Array.from({ length: 50 }, (_, i) => (i === 7 ? null : i / 7)),
        ),
        columns: [
          { name: 'x', type: 'number', values: Array.from({ length: 50 }, (_, i) => (i === 7 ? null : i / 7)) },
          {
            name: 'alert',
            type: 'text',
            levels: ['tone', 'voice'],
            codes: Array.from({ length: 50 }, (_, i) => (i % 3) - 1),
          },
        ],
      },
    ],
    log: appendEntry([], { when: '2026-03-01T09:30:00Z', who: '', what: 'read d1.csv', opening: 'blind' }),
    reference: {
      when: '2026-03-01T09:30:00+01:00',
      label: 'plan',
      shared: { cutoff: 2.5 },
      finding: { estimate: 1e-300 },
    },
    results: { c1: { status: 'value', value: { rows: 50 } }, c2: { status: 'left-out', value: null } },
  },
);

describe('writeWorksheet', () => {
  test('invariance: read again it is the same worksheet', () => {
    const parsed = parseWorksheet(writeWorksheet(full));
    expect(parsed).toEqual({ ok: true, worksheet: full });
  });

  test('invariance: the same text whatever the order of the fields', () => {
    const turned = (value: unknown): unknown => {
      if (Array.isArray(value)) return value.map(turned);
      if (typeof value !== 'object' || value === null) return value;
      return Object.fromEntries(
        Object.entries(value)
          .reverse()
          .map(([key, each]) => [key, turned(each)]),
      );
    };
    expect(writeWorksheet(turned(full) as Worksheet)).toBe(writeWorksheet(full));
  });

  test('by hand: cells and shared numbers one a line, ids and kinds first', () => {
    const lines = writeWorksheet(full).split('\n');
    expect(lines.slice(0, 5)).toEqual([
      '{',
      '  "format": "standfast-worksheet",',
      '  "version": 1,',
      '  "id": "w1",',
      '  "title": "A worksheet",',
    ]);
    expect(lines).toContain(
      '    { "version": 1, "id": "c1", "kind": "data", "settings": { "data": "d1" }, "from": {} },',
    );
  });

  test('invariance: a changed setting or value changes one line', () => {
    const before = writeWorksheet(full).split('\n');
    const changedLines = (changed: Worksheet) => {
      const after = writeWorksheet(changed).split('\n');
      expect(after.length).toBe(before.length);
      return after.filter((line, i) => line !== before[i]).length;
    };
    expect(changedLines({ ...full, shared: [shared('cutoff', 3), shared('trim', null)] })).toBe(1);
    const [block] = full.data;
    const [x, alert] = block?.columns ?? [];
    if (block === undefined || x?.type !== 'number' || alert === undefined) throw new Error('unexpected data');
    const values = x.values.map((value, i) => (i === 30 ? 1234.5678901234 : value));
    expect(changedLines({ ...full, data: [{ ...block, columns: [{ ...x, values }, alert] }] })).toBe(1);
  });

  test('by hand: a field that is undefined is not written', () => {
    const odd = { ...full, cells: [{ ...cell('c1', 'note'), leftOut: undefined as never }] };
    expect(writeWorksheet(odd)).not.toContain('leftOut');
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])(
    'refuses: %d, naming the place',
    (value) => {
      const bad = { ...full, results: { c1: { status: 'value' as const, value: { list: [1, value] } } } };
      expect(() => writeWorksheet(bad)).toThrow(
        `*worksheet.results.c1.value.list[1]* must be a finite number or null; got ${value}`,
      );
    },
  );

  test('refuses: what is not data', () => {
    const bad = { ...full, results: { c1: { status: 'value' as const, value: [() => 1] as never } } };
    expect(() => writeWorksheet(bad)).toThrow(TypeError);
  });
});
