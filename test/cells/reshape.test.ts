import { describe, expect, it } from 'vitest';
import { plainSentence } from '../../cells/kind.ts';
import { reshapeKind } from '../../cells/reshape/kind.ts';
import type { ReshapeSettings } from '../../cells/reshape/sentence.ts';
import { type Table, textAt } from '../../src/data/table.ts';
import { blankOf, choose, contextOf, run } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

const wide = tableOf({ officer: ['P07', 'P08'], load_tone: [96, 64], load_voice: [78, null], age: [31, 40] });
const toLong: ReshapeSettings = {
  to: 'long',
  columns: ['load_tone', 'load_voice'],
  value: 'load',
  by: 'alert',
  id: [],
};
const toWide: ReshapeSettings = { to: 'wide', columns: [], value: 'load', by: 'alert', id: ['officer'] };
const context = contextOf({ table: wide });

const grid = (table: Table) =>
  Array.from({ length: table.rows }, (_, row) => table.columns.map((column) => textAt(column, row)));

describe('the reshape sentence', () => {
  it('by hand: reads as in product.md in both directions', () => {
    expect(plainSentence(reshapeKind.sentence(toLong, context))).toBe(
      'Turn load_tone, load_voice into rows of load by alert.',
    );
    expect(plainSentence(reshapeKind.sentence(toWide, context))).toBe(
      'Give each alert its own column of load, one row per officer.',
    );
  });

  it('by hand: open blanks ask', () => {
    const open = reshapeKind.sentence({ ...toLong, columns: [], value: ' ', by: '' }, context);
    expect(plainSentence(open)).toBe('Turn which columns into rows of what by which condition.');
    expect(['columns', 'value', 'by'].map((key) => blankOf(open, key).filled)).toEqual([false, false, false]);
  });

  it('by hand: filling one blank gives the settings whole', () => {
    const parts = reshapeKind.sentence(toLong, context);
    expect(choose(parts, 'to', 'wide')).toEqual({ ...toLong, to: 'wide' });
    const columns = blankOf(parts, 'columns').editor;
    expect(columns.type === 'choices' && columns.atLeast).toBe(2);
    expect(columns.type === 'choices' && columns.set(['load_tone', 'age'])).toEqual({
      ...toLong,
      columns: ['load_tone', 'age'],
    });
    expect(columns.type === 'choices' && columns.options.map((each) => each.hint)).toEqual([
      'text, 2 different',
      'numbers',
      'numbers, 1 missing',
      'numbers',
    ]);
    const name = blankOf(parts, 'by').editor;
    expect(name.type === 'text' && name.set('signal')).toEqual({ ...toLong, by: 'signal' });
    expect(choose(reshapeKind.sentence(toWide, context), 'by', 'officer')).toEqual({ ...toWide, by: 'officer' });
  });
});

describe('the reshape cell', () => {
  it('by hand: to long, with its words, flow, note and record', async () => {
    const computed = await run<Table>(reshapeKind, toLong, { table: wide });
    expect(grid(computed.value)).toEqual([
      ['P07', '31', 'tone', '96'],
      ['P07', '31', 'voice', '78'],
      ['P08', '40', 'tone', '64'],
      ['P08', '40', 'voice', ''],
    ]);
    expect(reshapeKind.say(computed, toLong)).toBe('2 rows became 4 rows.');
    expect(reshapeKind.flow?.(computed, toLong)).toEqual({ count: 4, label: 'rows', share: 1 });
    expect(reshapeKind.notes?.(computed, toLong)).toEqual([
      { type: 'note', text: '2 rows became 4; columns now: officer, age, alert, load.' },
    ]);
    expect(reshapeKind.record(computed)).toEqual({ rows: 4, columns: ['officer', 'age', 'alert', 'load'] });
    expect(reshapeKind.tables?.(computed, toLong)[0]?.rows[3]).toEqual(['P08', '40', 'voice', '']);
  });

  it('theory: to long and back to wide is the table it was, row by row', async () => {
    const bare = tableOf({ officer: ['P07', 'P08'], tone: [96, 64], voice: [78, 55] });
    const long = await run<Table>(reshapeKind, { ...toLong, columns: ['tone', 'voice'] }, { table: bare });
    const back = await run<Table>(reshapeKind, toWide, { table: long.value });
    expect(back.value.columns.map((column) => column.name)).toEqual(['officer', 'load_tone', 'load_voice']);
    expect(grid(back.value)).toEqual(grid(bare));
  });

  it('by hand: names around the typed words do not count', async () => {
    const computed = await run<Table>(reshapeKind, { ...toLong, value: ' load ', by: ' alert ' }, { table: wide });
    expect(computed.value.columns.map((column) => column.name)).toEqual(['officer', 'age', 'alert', 'load']);
  });

  it('by hand: a new cell takes the columns that share the start of their name', () => {
    expect(reshapeKind.defaults(context)).toEqual({
      to: 'long',
      columns: ['load_tone', 'load_voice'],
      value: 'load',
      by: 'condition',
      id: [],
    });
    expect(reshapeKind.defaults(contextOf({ table: tableOf({ a: [1], b: [2] }) }))).toMatchObject({ columns: [] });
  });

  it.each([
    [{ ...toLong, columns: ['load_tone'] }, 'Say which columns become rows: two or more that hold the same measure.'],
    [{ ...toLong, value: ' ' }, 'Give the column of scores a name.'],
    [{ ...toLong, by: '' }, 'Give the condition a name.'],
    [{ ...toLong, by: 'load' }, 'The scores and the condition need different names.'],
    [{ ...toWide, by: '' }, 'Say which column\u2019s levels become columns.'],
    [{ ...toWide, value: '' }, 'Say which column is spread out.'],
    [{ ...toWide, id: [] }, 'Say which column tells the rows of one participant from another\u2019s.'],
  ])('refuses open blanks, one sentence at a time: %#', (settings, sentence) => {
    expect(reshapeKind.check(settings, context)).toEqual([sentence]);
  });

  it('refuses in the words of the data room what the table does not bear', async () => {
    expect(reshapeKind.check(toLong, context)).toEqual([]);
    await expect(run(reshapeKind, { ...toLong, by: 'age' }, { table: wide })).rejects.toThrow(/called "age" already/);
  });
});
