import { describe, expect, it } from 'vitest';
import { type DeriveDetail, deriveKind } from '../../cells/derive/kind.ts';
import { type DeriveSettings, FUNCTIONS } from '../../cells/derive/sentence.ts';
import { type Computed, plainSentence } from '../../cells/kind.ts';
import type { Table } from '../../src/data/table.ts';
import { contextOf, run } from '../support/kind-run.ts';
import { columnIn, referenceColumns } from '../support/reference-columns.ts';
import { tableOf } from '../support/tables.ts';

const table = tableOf({ hp: Array.from(columnIn(referenceColumns('mtcars'), 'hp')) });
const settings: DeriveSettings = {
  make: 'function',
  name: 'y',
  fn: 'Box-Cox power',
  of: 'hp',
  formula: '',
  map: '',
  op: 'is at least',
  value: '',
};
const compute = (own: DeriveSettings) => run<Table, DeriveDetail>(deriveKind, own, { table });
const notesOf = async (own: DeriveSettings) => deriveKind.notes?.(await compute(own), own) ?? [];

describe('transformations', () => {
  it('by hand: the sentence', () => {
    expect(plainSentence(deriveKind.sentence(settings, contextOf({ table })))).toBe(
      'Let y be the Box-Cox power of hp.',
    );
  });

  // SciPy 1.10 boxcox, as recorded in test/reference/cases/mtcars.json.
  it('agrees with SciPy: exponent .094 in the margin and in full in the record', async () => {
    const text = (await notesOf(settings)).map((each) => each.text).join(' ');
    expect(text).toMatch(
      /\u03bb = 0\.094, the likeliest .*\(Box & Cox 1964\), estimated from all 32 values of hp together, whatever the condition/,
    );
    expect(text).toMatch(/reshape first, so that all get one exponent/);
    const record = deriveKind.record(await compute(settings)) as { lambda: number; values: number };
    expect(record.lambda).toBeCloseTo(0.09409730409724175, 6);
    expect(record.values).toBe(32);
  });

  it('theory: what changes the scale says which question a test on it asks, and that interactions hang on it (R19)', async () => {
    const scales = FUNCTIONS.filter((fn) => fn !== 'absolute value' && fn !== 'z score pooled');
    for (const fn of scales) {
      const notes = await notesOf({ ...settings, fn });
      expect(notes[0]?.text, fn).toMatch(/^A test on it (compares|asks)/);
      expect(
        notes.some((each) => each.id === 'R19'),
        fn,
      ).toBe(true);
    }
    for (const fn of ['absolute value', 'z score pooled']) expect(await notesOf({ ...settings, fn })).toEqual([]);
    expect((await notesOf({ ...settings, fn: 'natural log' }))[0]?.text).toMatch(/log of their ratio/);
    expect((await notesOf({ ...settings, fn: 'reciprocal' }))[0]?.text).toMatch(/order turns round/);
  });

  it('invariance: records of functions that estimate nothing keep their shape', async () => {
    expect(deriveKind.record(await compute({ ...settings, fn: 'square root' }))).toEqual({
      rows: 32,
      dropped: null,
      columns: ['hp', 'y'],
    });
  });

  it('theory: while the conditions are hidden the exponent is not told: in a wide file a column is a condition', async () => {
    const open = await compute(settings);
    const { blind } = deriveKind;
    if (typeof blind !== 'function') throw new Error('derive has a blind output');
    const hidden = (blind as unknown as (of: typeof open) => Computed<Table, DeriveDetail>)(open);
    expect(hidden.detail).not.toHaveProperty('power');
    expect(deriveKind.record(hidden)).not.toHaveProperty('lambda');
    expect((deriveKind.notes?.(hidden, settings) ?? []).map((each) => each.text).join(' ')).not.toMatch(/\u03bb/);
  });

  it('refuses zero and below with a way on (R5)', async () => {
    const zero = tableOf({ hp: [0, 1, 2, 3] });
    await expect(run(deriveKind, settings, { table: zero })).rejects.toThrow(/zero or negative.*Yeo-Johnson/);
    await expect(run(deriveKind, { ...settings, fn: 'natural log' }, { table: zero })).rejects.toThrow(
      /zero or negative/,
    );
  });
});
