import { describe, expect, it } from 'vitest';
import { matrix, matrixFromColumns } from '../../src/numerics/matrix.ts';
import { applyQ, applyQt, inverseGram, leastSquares, leverages, qr } from '../../src/numerics/qr.ts';

const ones = [1, 1, 1, 1];
const line = matrixFromColumns([ones, [0, 1, 2, 3]]);

describe('qr', () => {
  // y on 0 1 2 3: slope (sum of (x - 1.5) y) / 5 = 9 / 5, intercept 3.5 - 2.7; residuals .2 -.6 .6 -.2
  it('by hand: a straight line through four points (1e-14)', () => {
    const fit = leastSquares(qr(line), [1, 2, 5, 6]);
    expect(Math.abs(fit.coefficients[0]! - 0.8)).toBeLessThan(1e-14);
    expect(Math.abs(fit.coefficients[1]! - 1.8)).toBeLessThan(1e-14);
    expect(Math.abs(fit.residualSumOfSquares - 0.8)).toBeLessThan(1e-14);
    [0.2, -0.6, 0.6, -0.2].forEach((value, i) => {
      expect(Math.abs(fit.residuals[i]! - value)).toBeLessThan(1e-14);
    });
  });

  // leverages 1/4 + (x - 1.5)^2 / 5; (X'X)^-1 = (.7 -.3; -.3 .2)
  it("by hand: leverages and the inverse of X'X (1e-14)", () => {
    const factors = qr(line);
    [0.7, 0.3, 0.3, 0.7].forEach((value, i) => {
      expect(Math.abs(leverages(factors)[i]! - value)).toBeLessThan(1e-14);
    });
    [0.7, -0.3, -0.3, 0.2].forEach((value, i) => {
      expect(Math.abs(inverseGram(factors)!.data[i]! - value)).toBeLessThan(1e-14);
    });
  });

  // numpy.linalg.lstsq, NumPy 1.24: cubic through 7 points of exp(x / 2)
  it('agrees with NumPy on a cubic (1e-12)', () => {
    const x = [-3, -2, -1, 0, 1, 2, 3];
    const design = matrixFromColumns([0, 1, 2, 3].map((power) => x.map((value) => value ** power)));
    const { coefficients } = leastSquares(
      qr(design),
      x.map((value) => Math.exp(value / 2)),
    );
    const expected = [0.9704931871616685, 0.4929988863546515, 0.1518850042999309, 0.02405460866429266];
    expected.forEach((value, i) => {
      expect(Math.abs(coefficients[i]! - value)).toBeLessThan(1e-12);
    });
  });

  it("theory: Q undoes Q', lengths are kept, leverages add up to the rank (1e-14)", () => {
    const factors = qr(line);
    const y = [3, -1, 4, 1];
    const turned = applyQt(factors, y);
    expect(Math.abs(turned.reduce((sum, value) => sum + value * value, 0) - 27)).toBeLessThan(1e-13);
    applyQ(factors, turned).forEach((value, i) => {
      expect(Math.abs(value - y[i]!)).toBeLessThan(1e-14);
    });
    expect(Math.abs(leverages(factors).reduce((sum, value) => sum + value, 0) - 2)).toBeLessThan(1e-14);
  });

  it('invariance: the residuals do not depend on the order of columns (1e-13)', () => {
    const swapped = qr(matrixFromColumns([[0, 1, 2, 3], ones]));
    const given = leastSquares(qr(line), [1, 2, 5, 7]);
    leastSquares(swapped, [1, 2, 5, 7]).residuals.forEach((value, i) => {
      expect(Math.abs(value - given.residuals[i]!)).toBeLessThan(1e-13);
    });
  });

  it('degenerate: a dependent column is found, put last and given coefficient 0', () => {
    const factors = qr(matrixFromColumns([ones, [2, 2, 2, 2], [0, 1, 2, 3], [0, 0, 0, 0]]));
    expect(factors.rank).toBe(2);
    expect([...factors.pivot.slice(0, 2)]).toEqual([0, 2]);
    expect(inverseGram(factors)).toBeNull();
    const fit = leastSquares(factors, [1, 2, 5, 6]);
    expect(fit.coefficients[1]).toBe(0);
    expect(Math.abs(fit.residualSumOfSquares - 0.8)).toBeLessThan(1e-14);
  });

  it('degenerate: more columns than rows', () => {
    const factors = qr(matrix(1, 3, [2, 4, 6]));
    expect(factors.rank).toBe(1);
    expect(leastSquares(factors, [3]).residualSumOfSquares).toBe(0);
  });

  it('refuses a vector of another length and a tolerance outside 0 to 1', () => {
    expect(() => applyQt(qr(line), [1])).toThrow('*y* must be 4 numbers; got 1');
    expect(() => applyQ(qr(line), [1])).toThrow('*z* must be 4 numbers; got 1');
    expect(() => qr(line, 0)).toThrow('*tolerance* must be between 0 and 1; got 0');
  });
});
