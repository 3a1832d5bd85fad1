import { type Matrix, matrix } from './matrix.ts';

/** Householder factors of a matrix of m rows and n columns; made by `qr`, read by the functions of this file. */
export interface Qr {
  readonly rows: number;
  readonly cols: number;
  /** Number of columns that are not linear combinations of columns before them. */
  readonly rank: number;
  /** `pivot[j]` = index in the given matrix of the column now at place j; dependent columns come last. */
  readonly pivot: Int32Array;
  /** Column by column: R above and on the diagonal, the Householder vectors below it. */
  readonly packed: Float64Array;
  /** First entry of each Householder vector. */
  readonly heads: Float64Array;
  /** Factor of each reflection, 2 / |v|^2. */
  readonly factors: Float64Array;
}

/**
 * QR decomposition by Householder reflections; a column that is (nearly) a combination of earlier ones is moved to the end.
 * @param a m by n, m >= 1, n >= 1
 * @param tolerance a column counts as dependent when less than this share of its length is left, default 1e-10
 * @returns the factors
 * @throws RangeError when tolerance is not between 0 and 1
 * @source Householder (1958); limited column exchange as in Golub & Van Loan (1996) 5.4, order of independent columns kept
 * @checked by hand 1e-15; Q R against the matrix 1e-14
 */
export function qr(a: Matrix, tolerance = 1e-10): Qr {
  if (!(tolerance > 0 && tolerance < 1)) throw new RangeError(`*tolerance* must be between 0 and 1; got ${tolerance}`);
  const { rows: m, cols: n } = a;
  const packed = new Float64Array(m * n);
  for (let i = 0; i < m; i++) for (let j = 0; j < n; j++) packed[j * m + i] = a.data[i * n + j]!;
  const pivot = Int32Array.from({ length: n }, (_, j) => j);
  const lengths = Float64Array.from({ length: n }, (_, j) => columnLength(packed, m, j, 0));
  const steps = Math.min(m, n);
  const heads = new Float64Array(steps);
  const factors = new Float64Array(steps);
  let rank = 0;
  let last = n;
  while (rank < steps && rank < last) {
    if (columnLength(packed, m, rank, rank) <= tolerance * lengths[pivot[rank]!]!) {
      moveToEnd(packed, pivot, m, rank);
      last--;
    } else {
      reflect(packed, heads, factors, m, n, rank);
      rank++;
    }
  }
  return { rows: m, cols: n, rank, pivot, packed, heads, factors };
}

function columnLength(packed: Float64Array, m: number, j: number, from: number): number {
  let largest = 0;
  for (let i = from; i < m; i++) largest = Math.max(largest, Math.abs(packed[j * m + i]!));
  if (largest === 0) return 0;
  let sum = 0;
  for (let i = from; i < m; i++) {
    const part = packed[j * m + i]! / largest;
    sum += part * part;
  }
  return largest * Math.sqrt(sum);
}

function moveToEnd(packed: Float64Array, pivot: Int32Array, m: number, j: number): void {
  const column = packed.slice(j * m, (j + 1) * m);
  packed.copyWithin(j * m, (j + 1) * m);
  packed.set(column, packed.length - m);
  const index = pivot[j]!;
  pivot.copyWithin(j, j + 1);
  pivot[pivot.length - 1] = index;
}

function reflect(
  packed: Float64Array,
  heads: Float64Array,
  factors: Float64Array,
  m: number,
  n: number,
  k: number,
): void {
  const length = columnLength(packed, m, k, k);
  const top = packed[k * m + k]!;
  // The sign that avoids a subtraction of nearly equal numbers.
  const diagonal = top > 0 ? -length : length;
  const head = top - diagonal;
  heads[k] = head;
  // |v|^2 = 2 length (length + |top|), so 2 / |v|^2 = 1 / (length |head|).
  factors[k] = 1 / (length * Math.abs(head));
  packed[k * m + k] = diagonal;
  for (let j = k + 1; j < n; j++) reflectVector(packed, head, factors[k]!, m, k, packed.subarray(j * m, (j + 1) * m));
}

function reflectVector(
  packed: Float64Array,
  head: number,
  factor: number,
  m: number,
  k: number,
  y: Float64Array,
): void {
  let sum = head * y[k]!;
  for (let i = k + 1; i < m; i++) sum += packed[k * m + i]! * y[i]!;
  sum *= factor;
  y[k] = y[k]! - sum * head;
  for (let i = k + 1; i < m; i++) y[i] = y[i]! - sum * packed[k * m + i]!;
}

/**
 * Q'y: its first `rank` entries are the parts of y along the columns in pivot order, the rest the residual part.
 * @param factors the result of `qr`
 * @param y as many numbers as rows
 * @returns as many numbers; squares of entries add up to sums of squares
 * @throws RangeError when the length of y is not the number of rows
 * @source Householder (1958)
 * @checked by hand 1e-15
 */
export function applyQt(factors: Qr, y: ArrayLike<number>): Float64Array {
  if (y.length !== factors.rows) throw new RangeError(`*y* must be ${factors.rows} numbers; got ${y.length}`);
  const out = Float64Array.from(y);
  for (let k = 0; k < factors.rank; k++) {
    reflectVector(factors.packed, factors.heads[k]!, factors.factors[k]!, factors.rows, k, out);
  }
  return out;
}

/**
 * Q z, the inverse of `applyQt`.
 * @param factors the result of `qr`
 * @param z as many numbers as rows
 * @returns as many numbers
 * @throws RangeError when the length of z is not the number of rows
 * @source Householder (1958)
 * @checked undoes applyQt 1e-14
 */
export function applyQ(factors: Qr, z: ArrayLike<number>): Float64Array {
  if (z.length !== factors.rows) throw new RangeError(`*z* must be ${factors.rows} numbers; got ${z.length}`);
  const out = Float64Array.from(z);
  for (let k = factors.rank - 1; k >= 0; k--) {
    reflectVector(factors.packed, factors.heads[k]!, factors.factors[k]!, factors.rows, k, out);
  }
  return out;
}

export interface LeastSquares {
  /** In the order of the given columns; 0 for a column left out as dependent. */
  readonly coefficients: Float64Array;
  readonly residuals: Float64Array;
  readonly residualSumOfSquares: number;
  readonly rank: number;
}

/**
 * Coefficients that make the sum of squared residuals smallest.
 * @param factors the result of `qr` of the design matrix
 * @param y as many numbers as rows
 * @returns coefficients in the order of the given columns, residuals, their sum of squares, and the rank
 * @throws RangeError when the length of y is not the number of rows
 * @source Golub (1965), R b = first entries of Q'y
 * @checked by hand 1e-14
 */
export function leastSquares(factors: Qr, y: ArrayLike<number>): LeastSquares {
  const { rank, rows: m, packed, pivot } = factors;
  const turned = applyQt(factors, y);
  const coefficients = new Float64Array(factors.cols);
  const solved = new Float64Array(rank);
  for (let i = rank - 1; i >= 0; i--) {
    let sum = turned[i]!;
    for (let j = i + 1; j < rank; j++) sum -= packed[j * m + i]! * solved[j]!;
    solved[i] = sum / packed[i * m + i]!;
    coefficients[pivot[i]!] = solved[i]!;
  }
  turned.fill(0, 0, rank);
  let residualSumOfSquares = 0;
  for (let i = rank; i < m; i++) residualSumOfSquares += turned[i]! * turned[i]!;
  return { coefficients, residuals: applyQ(factors, turned), residualSumOfSquares, rank };
}

/**
 * Diagonal of the hat matrix (leverages): squared row lengths of the first `rank` columns of Q.
 * @param factors the result of `qr` of the design matrix
 * @returns one number a row, between 0 and 1; they add up to the rank
 * @source common practice, h_i = sum_j q_ij^2
 * @checked sum = rank 1e-13
 */
export function leverages(factors: Qr): Float64Array {
  const out = new Float64Array(factors.rows);
  const unit = new Float64Array(factors.rows);
  for (let j = 0; j < factors.rank; j++) {
    unit.fill(0);
    unit[j] = 1;
    const column = applyQ(factors, unit);
    for (let i = 0; i < out.length; i++) out[i] = out[i]! + column[i]! * column[i]!;
  }
  return out;
}

/**
 * (X'X)^-1 of a design of full column rank, from R alone, so that X'X is never formed.
 * @param factors the result of `qr` of X
 * @returns n by n in the order of the given columns, or null when a column is dependent on others
 * @source common practice, (X'X)^-1 = R^-1 R^-T
 * @checked by hand 1e-14
 */
export function inverseGram(factors: Qr): Matrix | null {
  const { rank: n, rows: m, packed, pivot } = factors;
  if (n < factors.cols) return null;
  const inverse = matrix(n, n);
  for (let c = 0; c < n; c++) {
    for (let i = c; i >= 0; i--) {
      let sum = i === c ? 1 : 0;
      for (let j = i + 1; j <= c; j++) sum -= packed[j * m + i]! * inverse.data[j * n + c]!;
      inverse.data[i * n + c] = sum / packed[i * m + i]!;
    }
  }
  const out = matrix(n, n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = 0;
      for (let c = i; c < n; c++) sum += inverse.data[i * n + c]! * inverse.data[j * n + c]!;
      out.data[pivot[i]! * n + pivot[j]!] = sum;
      out.data[pivot[j]! * n + pivot[i]!] = sum;
    }
  }
  return out;
}
