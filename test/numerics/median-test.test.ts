import { describe, expect, it } from 'vitest';
import { medianTest } from '../../src/numerics/median-test.ts';
import { close, scores, soybean, sunflower } from './samples.ts';

describe('median test', () => {
  it('by hand: 1, 2 against 3, 4: each cell 2 or 0 with 1 expected', () => {
    const own = medianTest([scores(1, 2), scores(3, 4)], { correct: false });
    expect([own.grandMedian, own.table, own.chiSquare, own.df]).toEqual([
      2.5,
      [
        [0, 2],
        [2, 0],
      ],
      4,
      1,
    ]);
    expect(medianTest([scores(1, 2), scores(3, 4)]).chiSquare).toBe(1);
  });
  it('by hand: where ties go', () => {
    const table = (ties: 'below' | 'above' | 'ignore') => medianTest([scores(1, 2), scores(2, 3)], { ties }).table;
    expect(table('below')).toEqual([
      [0, 1],
      [2, 1],
    ]);
    expect(table('above')).toEqual([
      [1, 2],
      [1, 0],
    ]);
    expect(table('ignore')).toEqual([
      [0, 1],
      [1, 0],
    ]);
  });
  it('agrees with SciPy 1.10 median_test (rtol 1e-11)', () => {
    const own = medianTest([sunflower, soybean]);
    expect([own.grandMedian, own.table]).toEqual([
      296,
      [
        [10, 3],
        [2, 11],
      ],
    ]);
    expect(close(own.chiSquare, 7.583333333333333, 1e-12) && close(own.p, 0.005891040460225588, 1e-11)).toBe(true);
  });
  it('agrees with R 4.2 chisq.test(correct = FALSE) (rtol 1e-11)', () => {
    expect(close(medianTest([sunflower, soybean], { correct: false }).p, 0.0016485165533331688, 1e-11)).toBe(true);
  });
  it('theory: more than two groups have k - 1 degrees and no correction', () => {
    const three = [sunflower, soybean, soybean.map((x) => x + 30)];
    expect(medianTest(three)).toEqual(medianTest(three, { correct: false }));
    expect(medianTest(three).df).toBe(2);
  });
  it('invariance: increasing transformations when the median is a score', () => {
    const x = scores(1, 5, 9);
    const y = scores(2, 3);
    expect(medianTest([x.map(Math.exp), y.map(Math.exp)]).table).toEqual(medianTest([x, y]).table);
  });
  it('degenerate: all scores equal, one group all ties', () => {
    expect(medianTest([scores(1, 1), scores(1)])).toMatchObject({
      p: null,
      reason: 'no score lies on one side of the grand median',
    });
    expect(medianTest([scores(1, 3), scores(2, 2)], { ties: 'ignore' }).reason).toBe(
      'all scores of a condition are ties',
    );
  });
  it('refuses one group and empty groups', () => {
    expect(() => medianTest([sunflower])).toThrow('*groups* must be at least two');
    expect(() => medianTest([sunflower, scores()])).toThrow(RangeError);
  });
});
