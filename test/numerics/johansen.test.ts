import { describe, expect, it } from 'vitest';
import { type JohansenGroup, johansenTest, noJohansen } from '../../src/numerics/johansen.ts';
import { matrix } from '../../src/numerics/matrix.ts';
import { chiSquareUpper } from '../../src/numerics/tails/chi-square.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';

/** One mean with its squared standard error. */
function scalar(mean: number, squaredError: number, df: number): JohansenGroup {
  return { means: Float64Array.of(mean), covariance: matrix(1, 1, [squaredError]), df };
}

const difference = matrix(1, 2, [1, -1]);
const two = [scalar(2, 1 / 3, 2), scalar(4, 4 / 3, 2)];

describe('johansenTest', () => {
  // T = 4 / (5/3) = 2.4; shares .2 and .8: A = (.04 + .64) / 2 = .34; c = 1, df2 = 1 / .34
  it('by hand: two means (1e-14)', () => {
    expectAll(johansenTest(two, difference), { T: 2.4, F: 2.4, A: 0.34, df1: 1, df2: 1 / 0.34 }, 1e-14);
  });

  // formula written out in R 4.2.2: two groups of three repeated scores, interaction of groups and levels
  it('agrees with R on mean vectors (1e-11)', () => {
    const a = { means: Float64Array.of(1, 2, 4), covariance: matrix(3, 3, [2, 1, 0.5, 1, 3, 1, 0.5, 1, 2]), df: 9 };
    const b = { means: Float64Array.of(2, 5, 1), covariance: matrix(3, 3, [1, 0.2, 0, 0.2, 1, 0.3, 0, 0.3, 4]), df: 5 };
    const contrasts = matrix(2, 6, [1, -1, 0, -1, 1, 0, 0, 1, -1, 0, -1, 1]);
    expectAll(
      johansenTest([a, b], contrasts),
      {
        T: 4.900133155792276,
        A: 0.2411752816041106,
        F: 2.310743051364259,
        df2: 11.05696507921571,
        p: 0.1450475581385289,
      },
      1e-11,
    );
  });

  // the corrected point x + x A (1 + 3x / (r+2)) / (2r) of the printed p must give T back
  it('theory: the corrected chi-square point of p is T (1e-13)', () => {
    const x = (-1.17 + Math.sqrt(1.17 ** 2 + 4 * 0.17 * 2.4)) / (2 * 0.17);
    expectClose(johansenTest(two, difference).pChiSquare, chiSquareUpper(x, 1), 1e-12);
  });

  it('theory: with endless degrees of freedom T is chi-square (1e-9)', () => {
    const sure = [scalar(2, 1 / 3, 1e12), scalar(4, 4 / 3, 1e12)];
    const test = johansenTest(sure, difference);
    expectAll(test, { p: chiSquareUpper(2.4, 1), pChiSquare: chiSquareUpper(2.4, 1) }, 1e-9);
  });

  it('invariance: other contrasts with the same hypothesis (1e-12)', () => {
    const three = [...two, scalar(5, 0.5, 7)];
    const base = johansenTest(three, matrix(2, 3, [1, -1, 0, 0, 1, -1]));
    const other = johansenTest(three, matrix(2, 3, [2, -2, 0, 1, 1, -2]));
    expectAll(other, { T: base.T!, A: base.A!, p: base.p! }, 1e-12);
  });

  it('degenerate: no spread where it is compared', () => {
    const flat = [scalar(2, 0, 2), scalar(4, 0, 2)];
    const reason = 'the compared means have no spread or determine each other';
    expect(johansenTest(flat, difference)).toEqual(noJohansen(reason));
  });

  it('refuses shapes that do not fit', () => {
    expect(() => johansenTest(two, matrix(1, 3))).toThrow('*contrasts* must have 2 columns; got 3');
    expect(() => johansenTest([], difference)).toThrow(RangeError);
    expect(() => johansenTest([scalar(1, 1, 0), scalar(1, 1, 1)], difference)).toThrow(
      '*df* must be at least 1; got 0',
    );
    const mixed = [two[0]!, { means: Float64Array.of(1, 2), covariance: matrix(2, 2), df: 3 }];
    expect(() => johansenTest(mixed, difference)).toThrow(RangeError);
  });
});
