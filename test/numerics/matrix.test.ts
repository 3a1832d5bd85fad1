import { describe, expect, it } from 'vitest';
import {
  identity,
  kronecker,
  matrix,
  matrixFromColumns,
  multiply,
  multiplyVector,
  trace,
  transpose,
} from '../../src/numerics/matrix.ts';

const a = matrix(2, 3, [1, 2, 3, 4, 5, 6]);
const b = matrix(3, 2, [1, 0, 2, 1, 0, 3]);

describe('matrix', () => {
  it('by hand: product, transpose, trace and Kronecker product of small whole numbers, exactly', () => {
    expect([...multiply(a, b).data]).toEqual([5, 11, 14, 23]);
    expect([...multiplyVector(a, [1, 1, 2])]).toEqual([9, 21]);
    expect([...transpose(a).data]).toEqual([1, 4, 2, 5, 3, 6]);
    expect(trace(multiply(a, b))).toBe(28);
    expect([...kronecker(matrix(1, 2, [1, -1]), matrix(2, 1, [2, 3])).data]).toEqual([2, -2, 3, -3]);
  });

  it('by hand: columns become columns', () => {
    expect([...matrixFromColumns([[1, 2], Float64Array.of(3, 4)]).data]).toEqual([1, 3, 2, 4]);
  });

  // common practice: tr(ab) = tr(ba), (ab)' = b'a', (a (x) b)(c (x) d) = ac (x) bd
  it('theory: trace, transpose and Kronecker identities, exactly', () => {
    expect(trace(multiply(a, b))).toBe(trace(multiply(b, a)));
    expect(transpose(multiply(a, b))).toEqual(multiply(transpose(b), transpose(a)));
    expect(multiply(kronecker(a, b), kronecker(b, a))).toEqual(kronecker(multiply(a, b), multiply(b, a)));
  });

  it('invariance: the identity changes nothing, and arguments are not modified', () => {
    const before = [...a.data];
    expect(multiply(identity(2), a)).toEqual(a);
    expect([...a.data]).toEqual(before);
    const given = Float64Array.of(1, 2, 3, 4);
    const own = matrix(2, 2, given);
    given[0] = 9;
    expect(own.data[0]).toBe(1);
  });

  it('degenerate: one by one', () => {
    expect([...multiply(matrix(1, 1, [3]), matrix(1, 1, [4])).data]).toEqual([12]);
    expect([...matrix(1, 1).data]).toEqual([0]);
  });

  it('refuses shapes that do not fit and numbers that are not finite', () => {
    expect(() => matrix(0, 1)).toThrow('*rows* must be a whole number of at least 1; got 0');
    expect(() => matrix(1, 1.5)).toThrow(RangeError);
    expect(() => matrix(1, 2, [1])).toThrow('*data* must be 2 numbers; got 1');
    expect(() => matrix(1, 1, [Number.NaN])).toThrow('*data* must be finite; got NaN at 0');
    expect(() => matrixFromColumns([])).toThrow(RangeError);
    expect(() => matrixFromColumns([[1], [1, 2]])).toThrow('*columns* must be of equal length; got 1 and 2');
    expect(() => multiply(a, a)).toThrow(RangeError);
    expect(() => multiplyVector(a, [1])).toThrow(RangeError);
    expect(() => trace(a)).toThrow('*a* must be square; got 2 by 3');
  });
});
