import { describe, expect, it } from 'vitest';
import { identity, matrix } from '../../src/numerics/matrix.ts';
import { mauchlyTest } from '../../src/numerics/mauchly.ts';
import { contrastScores, helmertContrasts, squaresAndProducts } from '../../src/numerics/repeated.ts';
import { expectAll } from './anova/expect-close.ts';
import { orangeTrees } from './anova/published-scores.ts';

describe('mauchlyTest', () => {
  // diag(2, 1), 10 df: W = 2 / 1.5^2 = 8/9, factor 10 - 12/12 = 9, chi-square on 2 df: p = (8/9)^4.5;
  // with two comparisons the second-order term is 0
  it('by hand: two comparisons (1e-14)', () => {
    const p = (8 / 9) ** 4.5;
    expectAll(mauchlyTest(matrix(2, 2, [2, 0, 0, 1]), 10), { W: 8 / 9, df: 2, p, pSecondOrder: p }, 1e-14);
  });

  // R 4.2.2 mauchly.test (W); chi-square and both p values from the formulas written out in R
  it('agrees with R on four ages of the orange trees (1e-11)', () => {
    const { products } = squaresAndProducts(contrastScores(orangeTrees, helmertContrasts(4)));
    const want = { W: 0.0027267207905138477, chi2: 16.073784600174093, df: 5, p: 0.006636542604866996 };
    expectAll(mauchlyTest(products, 4), { ...want, pSecondOrder: 0.010274451290250232 }, 1e-11);
  });

  it('theory: perfect sphericity gives W 1 and p 1 (1e-15)', () => {
    expectAll(mauchlyTest(identity(3), 20), { W: 1, chi2: 0, p: 1, pSecondOrder: 1 }, 1e-15);
  });

  it('invariance: other orthonormal comparisons of the same levels give the same W (1e-12)', () => {
    const order = [3, 1, 0, 2];
    const mixed = order.map((j) => orangeTrees[j]!);
    const of = (scores: typeof orangeTrees) => squaresAndProducts(contrastScores(scores, helmertContrasts(4))).products;
    const base = mauchlyTest(of(orangeTrees), 4);
    expectAll(mauchlyTest(of(mixed), 4), { W: base.W!, p: base.p! }, 1e-11);
  });

  it('degenerate: two levels, too few participants, comparisons that determine each other', () => {
    expect(mauchlyTest(matrix(1, 1, [2]), 9).reason).toBe('with two levels sphericity always holds');
    expect(mauchlyTest(identity(4), 3).reason).toBe('fewer participants than the test needs');
    const dependent = mauchlyTest(matrix(2, 2, [1, 2, 2, 4]), 9);
    expect([dependent.W, dependent.reason]).toEqual([null, 'the differences between levels determine each other']);
  });

  it('refuses no error degrees of freedom and a matrix that is not square', () => {
    expect(() => mauchlyTest(identity(2), 0)).toThrow(RangeError);
    expect(() => mauchlyTest(matrix(2, 3), 9)).toThrow(RangeError);
  });
});
