import { describe, expect, it } from 'vitest';
import { type DeriveDetail, deriveKind } from '../../cells/derive/kind.ts';
import { type DeriveSettings, FUNCTIONS, OPERATIONS, readMap } from '../../cells/derive/sentence.ts';
import { plainSentence } from '../../cells/kind.ts';
import { type Table, textAt } from '../../src/data/table.ts';
import { blankOf, choose, contextOf, run } from '../support/kind-run.ts';
import { tableOf } from '../support/tables.ts';

const table = tableOf({ officer: ['P07', 'P07', 'P08', 'P09'], ack_ms: [100, 400, 900, null], age: [17, 17, 18, 52] });
const settings: DeriveSettings = {
  make: 'function',
  name: 'log_ms',
  fn: 'natural log',
  of: 'ack_ms',
  formula: '',
  map: '',
  op: 'is at least',
  value: '',
};
const filter: DeriveSettings = { ...settings, make: 'filter', of: 'age', op: 'is at least', value: '18' };
const context = contextOf({ table });
const words = (own: DeriveSettings, more = {}) => plainSentence(deriveKind.sentence(own, { ...context, ...more }));
const column = (made: Table, name: string) => {
  const found = made.columns.find((each) => each.name === name);
  return Array.from({ length: made.rows }, (_, row) => (found ? textAt(found, row) : 'no such column'));
};

describe('the derive sentence', () => {
  it('by hand: reads as in product.md for each form', () => {
    expect(words(settings)).toBe('Let log_ms be the natural log of ack_ms.');
    expect(words({ ...settings, make: 'formula', name: 'speed', formula: '1000 / ack_ms' })).toBe(
      'Let speed be the formula 1000 / ack_ms.',
    );
    expect(words({ ...settings, make: 'recode', name: 'who', of: 'officer', map: 'P07 = ann' })).toBe(
      'Let who be a recoding of officer with P07 = ann.',
    );
    expect(words(filter)).toBe('Keep rows where age is at least 18.');
    expect(words({ ...filter, op: 'is missing' })).toBe('Keep rows where age is missing.');
  });

  it('by hand: once computed, the sentence says how many rows are dropped', async () => {
    const own = await run(deriveKind, filter, { table });
    expect(words(filter, { own })).toBe('Keep rows where age is at least 18 (2 of 4 rows dropped).');
  });

  it('by hand: filling one blank gives the settings whole', () => {
    const parts = deriveKind.sentence(settings, context);
    expect(choose(parts, 'how', 'square root')).toEqual({ ...settings, fn: 'square root' });
    expect(choose(parts, 'how', 'recode')).toEqual({ ...settings, make: 'recode' });
    expect(choose(parts, 'make', 'filter')).toEqual({ ...settings, make: 'filter' });
    expect(choose(deriveKind.sentence(filter, context), 'make', 'let')).toEqual({ ...filter, make: 'function' });
    expect(choose(deriveKind.sentence(filter, context), 'op', 'is below')).toEqual({ ...filter, op: 'is below' });
    const of = blankOf(parts, 'of').editor;
    expect(of.type === 'choice' && of.options.find((each) => each.value === 'officer')?.refused).toBe(
      'holds no numbers',
    );
    const map = blankOf(deriveKind.sentence({ ...settings, make: 'recode' }, context), 'map').editor;
    expect(map.type === 'text' && map.check?.('P07 ann')).toBe(
      'Write each value as old = new, separated by semicolons.',
    );
    expect(map.type === 'text' && map.check?.('P07 = ann; P08 = ben')).toBeNull();
  });

  it('by hand: a recoding is read as pairs', () => {
    expect(readMap('a = b; c=d e ;')).toEqual([
      ['a', 'b'],
      ['c', 'd e'],
    ]);
    expect(readMap('a = ')).toEqual([['a', '']]);
    expect(readMap(' ; ')).toBeNull();
    expect(readMap('= b')).toBeNull();
  });
});

describe('the derive cell', () => {
  it('by hand: a function, a formula and a recoding make a column', async () => {
    const root = await run<Table>(deriveKind, { ...settings, name: 'root', fn: 'square root' }, { table });
    expect(column(root.value, 'root')).toEqual(['10', '20', '30', '']);
    const twice = { ...settings, make: 'formula', name: 'twice', formula: '2 * ack_ms - 1' };
    expect(column((await run<Table>(deriveKind, twice, { table })).value, 'twice')).toEqual(['199', '799', '1799', '']);
    const named = { ...settings, make: 'recode', name: 'who', of: 'officer', map: 'P07 = ann; P08 = ben' };
    expect(column((await run<Table>(deriveKind, named, { table })).value, 'who')).toEqual(['ann', 'ann', 'ben', 'P09']);
    expect(deriveKind.say(root, settings)).toBe('Column root made.');
    expect(deriveKind.flow?.(root, settings)).toEqual({});
    expect(deriveKind.record(root)).toEqual({ rows: 4, dropped: null, columns: ['officer', 'ack_ms', 'age', 'root'] });
    expect(deriveKind.title(settings)).toBe('new column');
  });

  it('by hand: kept rows with their counts; those without a value are told', async () => {
    const computed = await run<Table, DeriveDetail>(deriveKind, { ...filter, of: 'ack_ms', value: '400' }, { table });
    expect(column(computed.value, 'ack_ms')).toEqual(['400', '900']);
    expect(deriveKind.say(computed, filter)).toBe('2 rows of 4 dropped, 2 kept.');
    expect(deriveKind.flow?.(computed, filter)).toEqual({ count: 2, label: 'rows', setAside: 2 });
    expect(deriveKind.notes?.(computed, filter)?.map((each) => each.text)).toEqual([
      expect.stringMatching(/^1 row without a value in ack_ms (is|are) among the dropped\.$/),
    ]);
    expect(deriveKind.record(computed)).toEqual({ rows: 2, dropped: 2, columns: ['officer', 'ack_ms', 'age'] });
    expect(deriveKind.title(filter)).toBe('rows kept');
  });

  it('theory: every function and every operation of the lists can be computed', async () => {
    for (const fn of FUNCTIONS) {
      const made = await run<Table>(deriveKind, { ...settings, name: 'made', fn }, { table });
      expect(column(made.value, 'made').filter((each) => each !== '')).toHaveLength(3);
    }
    for (const op of OPERATIONS) {
      const own = { ...filter, of: 'ack_ms', op, value: op === 'is one of' ? '100, 400' : '400' };
      const kept = await run<Table>(deriveKind, own, { table });
      expect(kept.value.rows).toBeGreaterThan(0);
    }
  });

  it('by hand: a new cell takes the log of the last column of numbers', () => {
    expect(deriveKind.defaults(context)).toEqual({ ...settings, name: 'log_age', of: 'age' });
    expect(deriveKind.defaults(contextOf())).toMatchObject({ name: '', of: '' });
  });

  it.each([
    [{ ...settings, name: ' ' }, 'Give the new column a name.'],
    [{ ...settings, name: 'age' }, 'There is a column called "age" already. Give the new one another name.'],
    [{ ...settings, of: '' }, 'Say which column it is made from.'],
    [{ ...settings, make: 'formula' as const }, 'Write the formula, for example 1000 / ack_ms.'],
    [{ ...settings, make: 'recode' as const, map: 'x' }, 'Write the recoding as old = new, separated by semicolons.'],
    [{ ...filter, of: '' }, 'Say which column rows are kept by.'],
    [{ ...filter, value: ' ' }, 'Say which value rows are kept by.'],
  ])('refuses open blanks and taken names: %#', (own, sentence) => {
    expect(deriveKind.check(own, context)).toEqual([sentence]);
  });

  it('refuses the log of zero, and a filter that keeps nothing, in a sentence', async () => {
    expect(deriveKind.check(settings, context)).toEqual([]);
    expect(deriveKind.check({ ...filter, op: 'is missing', value: '' }, context)).toEqual([]);
    const zero = tableOf({ ack_ms: [0, 1] });
    await expect(run(deriveKind, settings, { table: zero })).rejects.toThrow(/row 1/);
    await expect(run(deriveKind, { ...filter, value: '99' }, { table })).rejects.toThrow(/^No row is left/);
  });
});
