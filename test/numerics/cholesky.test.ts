import { describe, expect, it } from 'vitest';
import {
  cholesky,
  choleskyInverse,
  choleskyLogDeterminant,
  choleskySolve,
  forwardSolve,
} from '../../src/numerics/cholesky.ts';
import { matrix, multiply, transpose } from '../../src/numerics/matrix.ts';

const a = matrix(3, 3, [4, 12, -16, 12, 37, -43, -16, -43, 98]);
const lower = cholesky(a)!;

describe('cholesky', () => {
  // L = (2; 6 1; -8 5 3), worked with pen and paper: 4 = 2^2, 37 = 6^2 + 1, 98 = 8^2 + 5^2 + 3^2
  it('by hand: factor, solution and determinant of a 3 by 3 matrix', () => {
    expect([...lower.data]).toEqual([2, 0, 0, 6, 1, 0, -8, 5, 3]);
    expect([...forwardSolve(lower, [2, 7, 0])]).toEqual([1, 1, 1]);
    expect([...choleskySolve(lower, [0, 6, 39])]).toEqual([1, 1, 1]);
    expect(Math.abs(choleskyLogDeterminant(lower) - Math.log(36))).toBeLessThan(1e-15);
  });

  // numpy.linalg.inv, NumPy 1.24
  it('agrees with NumPy on the inverse (1e-12)', () => {
    const inverse = choleskyInverse(lower).data;
    const expected = [1777 / 36, -122 / 9, 19 / 9, -122 / 9, 34 / 9, -5 / 9, 19 / 9, -5 / 9, 1 / 9];
    expected.forEach((value, i) => {
      expect(Math.abs(inverse[i]! - value)).toBeLessThan(1e-12);
    });
  });

  it("theory: L L' is the matrix and a a^-1 the identity (1e-13)", () => {
    expect([...multiply(lower, transpose(lower)).data]).toEqual([...a.data]);
    const one = multiply(a, choleskyInverse(lower)).data;
    one.forEach((value, i) => {
      expect(Math.abs(value - (i % 4 === 0 ? 1 : 0))).toBeLessThan(1e-12);
    });
  });

  it('invariance: a change of unit by a power of two scales the factor exactly', () => {
    const scaled = cholesky(
      matrix(
        3,
        3,
        Array.from(a.data, (value) => value * 2 ** -40),
      ),
    )!;
    expect([...scaled.data]).toEqual(Array.from(lower.data, (value) => value * 2 ** -20));
  });

  it('degenerate: singular, zero and indefinite matrices have no factor', () => {
    expect(cholesky(matrix(2, 2, [1, 2, 2, 4]))).toBeNull();
    expect(cholesky(matrix(2, 2, [0.1, 0.3, 0.3, 0.9]))).toBeNull();
    expect(cholesky(matrix(1, 1))).toBeNull();
    expect(cholesky(matrix(2, 2, [1, 2, 2, 1]))).toBeNull();
  });

  it('refuses a matrix that is not square and a vector of another length', () => {
    expect(() => cholesky(matrix(1, 2))).toThrow('*a* must be square; got 1 by 2');
    expect(() => choleskySolve(lower, [1])).toThrow('*b* must be 3 numbers; got 1');
  });
});
