import { afterEach, describe, expect, it, vi } from 'vitest';
import { importText } from '../../src/data/import/import-bytes.ts';
import { suggestLong, toLong, toWide } from '../../src/data/reshape.ts';
import { type Table, textAt } from '../../src/data/table.ts';

const read = (text: string) => importText(text, 'test data').table;
const grid = (table: Table) => [
  table.columns.map((column) => column.name),
  ...Array.from({ length: table.rows }, (_, row) => table.columns.map((column) => textAt(column, row))),
];

const WIDE = 'participant,load_tone,load_voice,age\nP1,3.5,4,31\nP2,,2.25,40\n';
const LONG = 'participant,alert,load\nP1,tone,3.5\nP1,voice,4\nP2,tone,\nP2,voice,2.25\n';

describe('toLong', () => {
  it('by hand: columns become rows, a missing value keeps its row, origin is kept', () => {
    const long = toLong(read(WIDE), { columns: ['load_tone', 'load_voice'], name: 'alert', value: 'load' });
    expect(grid(long)).toEqual([
      ['participant', 'age', 'alert', 'load'],
      ['P1', '31', 'tone', '3.5'],
      ['P1', '31', 'voice', '4'],
      ['P2', '40', 'tone', ''],
      ['P2', '40', 'voice', '2.25'],
    ]);
    expect([...long.origin]).toEqual([1, 1, 2, 2]);
    expect(long.columns.map((column) => column.type)).toEqual(['text', 'number', 'text', 'number']);
  });

  it('by hand: text columns share one list of levels, an empty column takes the type of the others', () => {
    const table = read('id,a_x,a_y,a_z\n1,no,yes,\n2,yes,,\n');
    const long = toLong(table, { columns: ['a_x', 'a_y', 'a_z'], name: 'when', value: 'answer' });
    expect(grid(long).map((row) => row.at(-1))).toEqual(['answer', 'no', 'yes', '', 'yes', '', '']);
    expect(long.columns.at(-1)).toMatchObject({ type: 'text', levels: ['no', 'yes'] });
  });

  it('degenerate: doubles come through to the last bit', () => {
    const table = read('id,v_1,v_2\n1,0.1,5e-324\n2,-1.7976931348623157e308,0.30000000000000004\n');
    const long = toLong(table, { columns: ['v_1', 'v_2'], name: 'k', value: 'v' });
    expect(grid(long).map((row) => row.at(-1))).toEqual([
      'v',
      '0.1',
      '5e-324',
      '-1.7976931348623157e+308',
      '0.30000000000000004',
    ]);
  });

  it('refuses columns of two types, a taken name, fewer than two columns, a column that is not there', () => {
    const table = read('id,a,b,c\nP1,1,x,2\n');
    const run =
      (columns: string[], name = 'k', value = 'v') =>
      () =>
        toLong(table, { columns, name, value });
    expect(run(['a', 'b'])).toThrow('Column a holds numbers and column b text: only columns of one type');
    expect(run(['a', 'c'], 'id')).toThrow('There is a column called "id" already');
    expect(run(['a', 'c'], 'v', 'v')).toThrow('two different names');
    expect(run(['a'])).toThrow('needs two different columns or more');
    expect(run(['a', 'zz'])).toThrow('There is no column called "zz": choose one of id, a, b and c.');
  });
});

describe('suggestLong', () => {
  it.each([
    [['load_tone', 'load_voice'], 'load', ['tone', 'voice']],
    [['load_tone', 'load_total'], 'load', ['tone', 'total']],
    [['pre_score', 'post_score'], 'score', ['pre', 'post']],
    [['rtToneMs', 'rtVoiceMs'], 'rt_Ms', ['Tone', 'Voice']],
    [['T1', 'T2', 'T10'], 'T', ['1', '2', '10']],
    [['tone', 'voice'], 'value', ['tone', 'voice']],
    [['load', 'load_2'], 'value', ['load', 'load_2']],
    [['only'], 'value', ['only']],
  ])('by hand: %j', (columns, value, levels) => {
    expect(suggestLong(columns)).toEqual({ name: 'condition', value, levels });
  });
});

describe('toWide', () => {
  it('by hand: levels become columns, what is not there is missing, the first row gives the origin', () => {
    const table = read('participant,alert,load,age,x\nP2,voice,1,40,1\nP1,tone,3.5,31,2\nP1,voice,4,31,3\n');
    const wide = toWide(table, { id: ['participant'], by: 'alert', value: 'load' });
    expect(grid(wide)).toEqual([
      ['participant', 'age', 'load_voice', 'load_tone'],
      ['P2', '40', '1', ''],
      ['P1', '31', '4', '3.5'],
    ]);
    expect([...wide.origin]).toEqual([1, 2]);
  });

  it('by hand: text values and two id columns', () => {
    const table = read('who,day,alert,answer\nP1,1,a,yes\nP1,2,a,no\nP1,1,b,no\n');
    const wide = toWide(table, { id: ['who', 'day'], by: 'alert', value: 'answer' });
    expect(grid(wide)).toEqual([
      ['who', 'day', 'answer_a', 'answer_b'],
      ['P1', '1', 'yes', 'no'],
      ['P1', '2', 'no', ''],
    ]);
  });

  it('invariance: long and back is the table itself', () => {
    const table = read(LONG);
    const wide = toWide(table, { id: ['participant'], by: 'alert', value: 'load' });
    const long = toLong(wide, { columns: ['load_tone', 'load_voice'], name: 'alert', value: 'load' });
    expect(grid(long)).toEqual(grid(table));
  });

  it('refuses two values for one cell, naming participant and level', () => {
    const table = read('participant,alert,load\nP1,tone,3\nP1,voice,4\nP1,tone,5\n');
    expect(() => toWide(table, { id: ['participant'], by: 'alert', value: 'load' })).toThrow(
      'participant P1 has 2 rows for "tone" (rows 1 and 3), but a column has room for one value of load. Score each participant first',
    );
  });

  it('refuses missing ids and levels, the same column twice, names that would clash', () => {
    const gap = read('participant,alert,load\nP1,tone,3\nP1,,4\n');
    expect(() => toWide(gap, { id: ['participant'], by: 'alert', value: 'load' })).toThrow(
      'Column alert is missing in 1 row (first: row 2)',
    );
    const table = read('a_x,a,b\nP1,1,x\n');
    expect(() => toWide(table, { id: ['a'], by: 'a', value: 'b' })).toThrow('must be different columns');
    expect(() => toWide(table, { id: ['a_x'], by: 'b', value: 'a' })).toThrow('two columns called "a_x"');
  });
});

describe('the fence around compiled code', () => {
  afterEach(() => vi.unstubAllGlobals());

  it('invariance: hostile names and values never reach a compiled source', () => {
    const sources: string[] = [];
    const genuine = globalThis.Function;
    const spy = function spied(...args: string[]) {
      sources.push(args.join('\n'));
      return genuine(...args);
    };
    spy.prototype = genuine.prototype;
    vi.stubGlobal('Function', spy);
    const evil = [
      "');globalThis.pwned=1;('",
      '`$'.concat('{globalThis.pwned=1}`'),
      'd => d.x',
      '__proto__',
      'constructor',
    ];
    const header = ['who', ...evil].map((name) => `"${name}"`).join(',');
    const table = read(`${header}\n${evil.map((value) => `"${value}",1,2,3,4,5`).join('\n')}\n`);
    const long = toLong(table, { columns: evil, name: '"]; pwned', value: 'globalThis' });
    const wide = toWide(long, { id: ['who'], by: '"]; pwned', value: 'globalThis' });
    expect(grid(wide).slice(1)).toEqual(evil.map((value) => [value, '1', '2', '3', '4', '5']));
    expect(sources.length).toBeGreaterThan(0);
    for (const source of sources) {
      for (const text of ['pwned', 'who', 'globalThis', 'proto', 'constructor']) expect(source).not.toContain(text);
      const words = source.match(/[\p{L}_$][\p{L}\p{N}_$]*/gu) ?? [];
      expect(words.filter((word) => !KNOWN.test(word))).toEqual([]);
    }
    expect(globalThis).not.toHaveProperty('pwned');
  });
});

/** The words a compiled source may hold: column ids made here, and the library's own. */
const KNOWN = /^(c\d+|use|strict|return|fn|\$|row|data|op|const|_\d*|state|v\d+|add|rem)$/;
