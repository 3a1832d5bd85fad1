import { type Matrix, matrix } from './matrix.ts';

/** Share of a diagonal entry below which what is left of it counts as rounding: the matrix is then singular. */
const SINGULAR = 1e-13;

/**
 * Cholesky factor of a symmetric positive definite matrix; only the lower triangle is read.
 * @param a n by n, symmetric
 * @returns the lower triangular L with L L' = a, or null when a is not positive definite (to 13 digits of its diagonal)
 * @throws RangeError when a is not square
 * @source Cholesky (1910), L_ij = (a_ij - sum_k L_ik L_jk) / L_jj
 * @checked by hand 1e-15; L L' against the matrix 1e-14
 */
export function cholesky(a: Matrix): Matrix | null {
  if (a.rows !== a.cols) throw new RangeError(`*a* must be square; got ${a.rows} by ${a.cols}`);
  const n = a.rows;
  const lower = matrix(n, n);
  const l = lower.data;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = a.data[i * n + j]!;
      for (let k = 0; k < j; k++) sum -= l[i * n + k]! * l[j * n + k]!;
      if (i === j) {
        if (!(sum > SINGULAR * a.data[i * n + i]!)) return null;
        l[i * n + i] = Math.sqrt(sum);
      } else {
        l[i * n + j] = sum / l[j * n + j]!;
      }
    }
  }
  return lower;
}

/**
 * L^-1 b for a lower triangular L: after it, b' a^-1 b is the sum of squares of the result.
 * @param lower the factor returned by `cholesky`
 * @param b n numbers
 * @returns n numbers
 * @throws RangeError when b has not n numbers
 * @source common practice (forward substitution)
 * @checked by hand 1e-15
 */
export function forwardSolve(lower: Matrix, b: ArrayLike<number>): Float64Array {
  const n = lower.rows;
  if (b.length !== n) throw new RangeError(`*b* must be ${n} numbers; got ${b.length}`);
  const out = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let sum = b[i]!;
    for (let k = 0; k < i; k++) sum -= lower.data[i * n + k]! * out[k]!;
    out[i] = sum / lower.data[i * n + i]!;
  }
  return out;
}

/**
 * Solves a x = b, given the Cholesky factor of a.
 * @param lower the factor returned by `cholesky`
 * @param b n numbers
 * @returns x, n numbers
 * @throws RangeError when b has not n numbers
 * @source common practice (forward then backward substitution)
 * @checked by hand 1e-15
 */
export function choleskySolve(lower: Matrix, b: ArrayLike<number>): Float64Array {
  const n = lower.rows;
  const out = forwardSolve(lower, b);
  for (let i = n - 1; i >= 0; i--) {
    let sum = out[i]!;
    for (let k = i + 1; k < n; k++) sum -= lower.data[k * n + i]! * out[k]!;
    out[i] = sum / lower.data[i * n + i]!;
  }
  return out;
}

/**
 * Inverse of a symmetric positive definite matrix, given its Cholesky factor.
 * @param lower the factor returned by `cholesky`
 * @returns a^-1, symmetric
 * @source common practice (solves for each unit vector)
 * @checked a a^-1 = identity 1e-13
 */
export function choleskyInverse(lower: Matrix): Matrix {
  const n = lower.rows;
  const out = matrix(n, n);
  const unit = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    unit.fill(0);
    unit[j] = 1;
    const column = choleskySolve(lower, unit);
    for (let i = j; i < n; i++) {
      out.data[i * n + j] = column[i]!;
      out.data[j * n + i] = column[i]!;
    }
  }
  return out;
}

/**
 * Natural logarithm of the determinant, given the Cholesky factor.
 * @param lower the factor returned by `cholesky`
 * @returns log det(a) = 2 sum log L_ii
 * @source common practice
 * @checked by hand 1e-15
 */
export function choleskyLogDeterminant(lower: Matrix): number {
  let sum = 0;
  for (let i = 0; i < lower.rows; i++) sum += Math.log(lower.data[i * lower.rows + i]!);
  return 2 * sum;
}
