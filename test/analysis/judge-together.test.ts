import { expect, test } from 'vitest';
import { flagExtremeBlind } from '../../src/analysis/flagging.ts';
import { judgeTogether } from '../../src/analysis/judge-together.ts';
import type { ExtremeRule } from '../../src/analysis/rules.ts';
import { mcdDistances } from '../../src/numerics/rules/mcd.ts';
import { columnIn, referenceColumns } from '../support/reference-columns.ts';

const stars = referenceColumns('stars_cyg');
const columns = [columnIn(stars, 'log_te'), columnIn(stars, 'log_light')];
const marked = (flags: Uint8Array) => [...flags].flatMap((mark, i) => (mark === 1 ? [i + 1] : []));
const rule: ExtremeRule = {
  rule: 'extreme',
  on: 'participant',
  column: 'log_te',
  columns: ['log_te', 'log_light'],
  measure: 'MCD',
  cutoff: 97.5,
  scope: 'pooled',
  sides: 'both',
};

// covMcd of robustbase 0.95 for R with alpha .75: test/reference/cases/hbk.json and stackloss.json, mcd_mahalanobis.
test('agrees with the outside cases: rows 1 to 14 of hbk beyond .99, rows 1 and 2 of stackloss beyond .975', () => {
  const hbk = referenceColumns('hbk');
  const three = ['x1', 'x2', 'x3'].map((name) => columnIn(hbk, name));
  expect(marked(judgeTogether(three, { cutoff: 99 }).flags)).toEqual(Array.from({ length: 14 }, (_, i) => i + 1));
  const stack = referenceColumns('stackloss');
  const plant = ['air_flow', 'water_temp', 'acid_conc'].map((name) => columnIn(stack, name));
  expect(marked(judgeTogether(plant, { cutoff: 97.5 }).flags)).toEqual([1, 2]);
});

test('theory: marks, distances and limit are those of the robust distances, the limit sqrt of chi-square .975 on 2 df', () => {
  const judged = judgeTogether(columns, rule);
  expect(marked(judged.flags)).toEqual([7, 9, 11, 14, 20, 30, 34]);
  // SciPy 1.10 chi2.ppf(.975, 2) = 7.377758908227871.
  expect(judged.limits.upper).toBeCloseTo(Math.sqrt(7.377758908227871), 12);
  expect(judged.distances[10]).toBeCloseTo(Math.sqrt(mcdDistances(columns).distance2?.[10] as number), 12);
});

test('by hand: participants are judged by their means over every kept row, whatever the row', () => {
  // Each star twice, a little below and above its value: the means are the values.
  const twice = columns.map((column) =>
    Float64Array.from({ length: 94 }, (_, i) => (column[i >> 1] as number) + (i % 2 ? 1 : -1)),
  );
  const scores = {
    values: twice[0] as Float64Array,
    together: twice,
    kept: new Uint8Array(94).fill(1),
    participant: Int32Array.from({ length: 94 }, (_, i) => i >> 1),
    participants: 47,
  };
  const flagged = flagExtremeBlind(scores, rule);
  expect(marked(flagged.rows)).toEqual([13, 14, 17, 18, 21, 22, 27, 28, 39, 40, 59, 60, 67, 68]);
  expect(flagged.distances?.length).toBe(47);
});

test('by hand: a participant without a kept value in one column is not judged', () => {
  const gap = (columns[1] as Float64Array).with(10, NaN);
  const scores = {
    values: columns[0] as Float64Array,
    together: [columns[0] as Float64Array, gap],
    kept: new Uint8Array(47).fill(1),
    participant: Int32Array.from({ length: 47 }, (_, i) => i),
    participants: 47,
  };
  const flagged = flagExtremeBlind(scores, rule);
  expect(flagged.rows[10]).toBe(0);
  expect(flagged.distances?.[10]).toBe(NaN);
  expect(flagged.limits[0]?.n).toBe(46);
});

test('degenerate: without a share nobody is set aside; few participants and columns on a line give a reason', () => {
  const none = judgeTogether(columns, { cutoff: null });
  expect(marked(none.flags)).toEqual([]);
  expect(none.distances.every((each) => each >= 0)).toBe(true);
  const three = columns.map((column) => column.subarray(0, 3));
  expect(judgeTogether(three, rule).limits.reason).toBe('fewer than 4 rows');
  const line = [columns[0] as Float64Array, (columns[0] as Float64Array).map((v) => 2 * v)];
  expect(judgeTogether(line, rule).limits.reason).toMatch(/combination of the others/);
  expect(judgeTogether([new Float64Array(0), new Float64Array(0)], rule).limits.reason).toMatch(/nobody has a value/);
});
