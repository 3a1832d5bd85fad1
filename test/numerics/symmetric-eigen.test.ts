import { describe, expect, it } from 'vitest';
import { matrix, multiply, transpose } from '../../src/numerics/matrix.ts';
import { symmetricEigen } from '../../src/numerics/symmetric-eigen.ts';

const hilbert = matrix(
  4,
  4,
  [...Array(16).keys()].map((i) => 1 / (1 + (i % 4) + Math.floor(i / 4))),
);

describe('symmetricEigen', () => {
  // (2 1; 1 2): values 3 and 1 along (1, 1) and (1, -1)
  it('by hand: a 2 by 2 matrix (1e-15)', () => {
    const { values, vectors } = symmetricEigen(matrix(2, 2, [2, 1, 1, 2]));
    expect(Math.abs(values[0]! - 3)).toBeLessThan(1e-15);
    expect(Math.abs(values[1]! - 1)).toBeLessThan(1e-15);
    const half = Math.SQRT1_2;
    expect(Math.abs(vectors.data[0]! - half) + Math.abs(vectors.data[2]! - half)).toBeLessThan(1e-15);
  });

  // numpy.linalg.eigvalsh of the 4 by 4 Hilbert matrix, NumPy 1.24
  it('agrees with NumPy on the Hilbert matrix (1e-15 absolute)', () => {
    const expected = [1.5002142800592424, 0.16914122022145, 0.006738273605760657, 9.670230402260053e-5];
    symmetricEigen(hilbert).values.forEach((value, i) => {
      expect(Math.abs(value - expected[i]!)).toBeLessThan(1e-15);
    });
  });

  it('theory: vectors are orthonormal and a V = V diag(values) (1e-14)', () => {
    const { values, vectors } = symmetricEigen(hilbert);
    const gram = multiply(transpose(vectors), vectors).data;
    gram.forEach((value, i) => {
      expect(Math.abs(value - (i % 5 === 0 ? 1 : 0))).toBeLessThan(1e-14);
    });
    const image = multiply(hilbert, vectors).data;
    image.forEach((value, i) => {
      expect(Math.abs(value - vectors.data[i]! * values[i % 4]!)).toBeLessThan(1e-14);
    });
  });

  it('invariance: reordering rows and columns leaves the values (1e-15)', () => {
    const order = [2, 0, 3, 1];
    const mixed = matrix(
      4,
      4,
      [...Array(16).keys()].map((i) => hilbert.data[order[i >> 2]! * 4 + order[i & 3]!]!),
    );
    const expected = symmetricEigen(hilbert).values;
    symmetricEigen(mixed).values.forEach((value, i) => {
      expect(Math.abs(value - expected[i]!)).toBeLessThan(1e-15);
    });
  });

  it('degenerate: diagonal, zero and one by one matrices', () => {
    expect([...symmetricEigen(matrix(2, 2, [1, 0, 0, 5])).values]).toEqual([5, 1]);
    expect([...symmetricEigen(matrix(2, 2)).values]).toEqual([0, 0]);
    expect([...symmetricEigen(matrix(1, 1, [-3])).values]).toEqual([-3]);
  });

  it('refuses a matrix that is not square', () => {
    expect(() => symmetricEigen(matrix(2, 3))).toThrow('*a* must be square; got 2 by 3');
  });
});
