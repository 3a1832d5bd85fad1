import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { checkCases, compareValue } from './check-cases.ts';
import {
  alternativeArg,
  cellsBy,
  differencesOrValues,
  groupsOf,
  outcomeValues,
  pairsOf,
  parseCaseCsv,
  repeatedScores,
  trimPercent,
  usedRows,
} from './methods/case-data.ts';

const exact = { rtol: 0, atol: 0 };

// Four subjects, two conditions, one missing score; made up for these tests.
const data = parseCaseCsv(
  'id,group,when,score\np1,b,pre,1\np1,b,post,4\np2,a,pre,2\np2,a,post,\np3,a,pre,3\np3,a,post,5\np4,b,post,9\np4,b,pre,7\n',
);
const args = { outcome: 'score', subject: 'id' };

describe('comparison of a case', () => {
  it('by hand: numbers pass within atol + rtol |expected|, by key at any depth', () => {
    expect(compareValue({ p: 10 }, { p: 10.5 }, '', { rtol: 0.04, atol: 0.1 })).toBe(null);
    expect(compareValue({ p: 10 }, { p: 10.51 }, '', { rtol: 0.04, atol: 0.1 })).toContain('p: expected 10');
    expect(
      compareValue({ a: { ci: [1, 2] } }, { a: { ci: [1, 2.1] } }, '', { ...exact, rtol_by_key: { ci: 0.1 } }),
    ).toBe(null);
  });
  it('by hand: infinite limits are text, null is null, other text and lists must be equal', () => {
    expect(compareValue({ ci: ['-Infinity', 1] }, { ci: ['-Infinity', 1] }, '', exact)).toBe(null);
    expect(compareValue({ ci: ['-Infinity', 1] }, { ci: [-Infinity, 1] }, '', exact)).toBe(null);
    expect(compareValue({ ci: ['Infinity'] }, { ci: [3] }, '', exact)).toContain('expected Infinity');
    expect(compareValue({ se: null }, { se: null }, '', exact)).toBe(null);
    expect(compareValue({ se: null }, { se: 0 }, '', exact)).toContain('expected null');
    expect(compareValue({ rows: [1, 2] }, { rows: [1] }, '', exact)).toContain('expected 2 values');
    expect(compareValue({ x: [1] }, { x: Float64Array.from([1]) }, '', exact)).toBe(null);
  });
  it('refuses NaN and missing keys, and numbers where nothing should be computable', () => {
    expect(compareValue({ p: 1 }, { p: Number.NaN }, '', { rtol: 1, atol: 1 })).toContain('got NaN');
    expect(compareValue({ p: 1 }, {}, '', exact)).toContain('got undefined');
    expect(compareValue({ status: 'undefined' }, { p: 0.2 }, '', exact)).toContain('status: expected undefined');
  });
  it('counts passed, failed and skipped of a folder and names what it does not have', () => {
    const dir = mkdtempSync(join(tmpdir(), 'cases-'));
    const one = (id: string, method: string, expected: object) => ({
      id,
      method,
      args: { outcome: 'x' },
      expect: expected,
      ...exact,
    });
    const cases = [
      one('a', 'n', { n: 2 }),
      one('b', 'n', { n: 3 }),
      one('c', 'broken', { n: 1 }),
      one('d', 'other', { n: 1 }),
    ];
    writeFileSync(join(dir, 's.csv'), 'x\n1\n\n2\n');
    writeFileSync(join(dir, 's.json'), JSON.stringify({ cases }));
    const offered = {
      n: (own: typeof data, a: object) => ({ n: outcomeValues(own, a as Record<string, unknown>).length }),
      broken: () => {
        throw new RangeError('no');
      },
    };
    const result = checkCases(dir, undefined, offered);
    rmSync(dir, { recursive: true });
    expect([result.passed, result.failed, result.skipped, result.skippedMethods]).toEqual([1, 2, 1, ['other']]);
    expect(result.misses[0]).toContain('b n {"outcome":"x"}: n: expected 3, got 2');
    expect(result.misses[1]).toContain('threw RangeError: no');
  });
});

describe('scores of a case', () => {
  it('by hand: missing outcomes are dropped, rows keep their number', () => {
    expect([...outcomeValues(data, args)]).toEqual([1, 4, 2, 3, 5, 9, 7]);
    expect(usedRows(data, { ...args, where: { when: ['post'] } }).map((row) => row.number)).toEqual([2, 6, 7]);
  });
  it('by hand: groups follow the order of first appearance, or the levels named', () => {
    const own = groupsOf(data, { ...args, group: 'group', where: { when: 'pre' } });
    expect([own.levels, own.scores.map((x) => [...x])]).toEqual([
      ['b', 'a'],
      [
        [1, 7],
        [2, 3],
      ],
    ]);
    expect(groupsOf(data, { ...args, group: 'group', levels: ['a', 'b'] }).levels).toEqual(['a', 'b']);
    expect(cellsBy(usedRows(data, args), ['group', 'when']).map((cell) => cell.rows.length)).toEqual([2, 2, 2, 1]);
  });
  it('by hand: pairs need both scores and follow the subjects, whatever the order of rows', () => {
    const own = pairsOf(data, { ...args, condition: 'when', levels: ['post', 'pre'] });
    expect([[...own.x], [...own.y]]).toEqual([
      [4, 5, 9],
      [1, 3, 7],
    ]);
    expect([...differencesOrValues(data, { ...args, condition: 'when', levels: ['pre', 'post'] })]).toEqual([
      -3, -2, -2,
    ]);
    const repeated = repeatedScores(data, { ...args, within: 'when' });
    expect([repeated.subjects, repeated.columns]).toEqual([
      ['p1', 'p3', 'p4'],
      [['pre'], ['post']],
    ]);
  });
  it('by hand: a fraction trimmed becomes whole percent, alternatives our spelling', () => {
    expect([trimPercent({ trim: 0.15 }), trimPercent({}, 0.2), alternativeArg({ alternative: 'two.sided' })]).toEqual([
      15,
      20,
      'two-sided',
    ]);
  });
  it('refuses unknown columns, text for numbers, odd trims, two scores for one cell', () => {
    expect(() => outcomeValues(data, { outcome: 'nothing' })).toThrow('*column* must be a column');
    expect(() => outcomeValues(data, { outcome: 'group' })).toThrow('must hold numbers');
    expect(() => trimPercent({ trim: 0.125 })).toThrow('whole percent');
    expect(() => repeatedScores(data, { ...args, subject: 'group', within: 'when' })).toThrow('one row per cell');
  });
});
