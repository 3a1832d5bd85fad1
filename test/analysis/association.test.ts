import { expect, test } from 'vitest';
import { ASSOCIATIONS, associateRows, associationOf, takePairs } from '../../src/analysis/association.ts';
import { referencePairs, spec } from '../support/associations.ts';
import { tableOf } from '../support/tables.ts';

const table = tableOf({
  listener: ['a', 'b', 'c', '', 'e'],
  level: [10, 20, null, 40, 50],
  words: [90, 80, 70, 60, null],
  aid: ['yes', 'no', 'no', 'no', 'yes'],
});
const columns = { x: 'level', y: 'words', participant: 'listener' };

test('by hand: complete pairs enter, the others are listed with what they lack', () => {
  const pairs = takePairs(table, columns);
  expect([...pairs.x]).toEqual([10, 20]);
  expect([...pairs.y]).toEqual([90, 80]);
  expect(pairs.participants).toEqual(['a', 'b']);
  expect([...pairs.rows]).toEqual([1, 2]);
  expect(pairs.left).toEqual([
    { participant: 'c', why: 'no level' },
    { participant: 'row 4', why: 'no listener' },
    { participant: 'e', why: 'no words' },
  ]);
  expect(takePairs(table, { ...columns, participant: null }).participants).toEqual(['row 1', 'row 2', 'row 4']);
});

test('refuses rows that repeat a participant, naming who and the rows (methods R10)', () => {
  const trials = tableOf({ officer: ['7', '8', '7', '7', '7'], a: [1, 2, 3, 4, 5], b: [1, 2, 3, 4, 6] });
  expect(() => takePairs(trials, { x: 'a', y: 'b', participant: 'officer' })).toThrow(
    /officer 7 has 4 rows \(rows 1, 3, 4 and more\).*one row per participant.*Score the trials first.*reshape/,
  );
});

test('refuses a missing column, text, and numbers too large to square', () => {
  expect(() => takePairs(table, { ...columns, x: 'dose' })).toThrow(/no column called "dose".*Choose one of: listener/);
  expect(() => takePairs(table, { ...columns, y: 'aid' })).toThrow(/Column "aid" holds text/);
  expect(() => takePairs(table, { ...columns, participant: 'who' })).toThrow(/no column called "who"/);
  const large = tableOf({ a: [1, 1e200], b: [1, 2] });
  expect(() => takePairs(large, { x: 'a', y: 'b', participant: null })).toThrow(/Row 2 of column "a"/);
});

test('theory: rows come in the order of the list whatever order they were computed in, and the plan is found', () => {
  const pairs = referencePairs('mtcars', 'wt', 'mpg');
  const some = ['percentage-bend', 'ols', 'pearson'].flatMap((id) => associateRows({ pairs, spec, rows: [id] }));
  const value = associationOf(pairs, spec, some);
  expect(value.findings.map((finding) => finding.estimator)).toEqual(['pearson', 'percentage-bend', 'ols']);
  expect(value.planned).toBe(1);
  expect(associationOf(pairs, { ...spec, estimator: 'kendall' }, some).planned).toBe(-1);
  expect(new Set(ASSOCIATIONS.map((each) => each.id)).size).toBe(15);
});

// R 4.2.2 lm and SciPy 1.10 theilslopes, as recorded in test/reference/cases/mtcars.json.
test('agrees with R and SciPy: lines of 32 cars, least squares 37.2851 - 5.34447 wt, Theil-Sen 37.9081 - 5.62649 wt', () => {
  const { lines } = associationOf(referencePairs('mtcars', 'wt', 'mpg'), spec, []);
  expect(lines.ols?.intercept).toBeCloseTo(37.28512616734203, 9);
  expect(lines.ols?.slope).toBeCloseTo(-5.344471572722678, 9);
  expect(lines.theilSen?.intercept).toBeCloseTo(37.908080782988876, 9);
  expect(lines.theilSen?.slope).toBeCloseTo(-5.626490461049285, 9);
});

test('degenerate: two pairs, and an x that does not vary, have no lines', () => {
  const two = takePairs(table, columns);
  expect(associationOf(two, spec, []).lines).toEqual({ ols: null, theilSen: null });
  const flat = takePairs(tableOf({ x: [3, 3, 3, 3], y: [1, 2, 4, 3] }), spec);
  expect(associationOf(flat, spec, []).lines).toEqual({ ols: null, theilSen: null });
});
