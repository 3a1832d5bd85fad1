/** A dense matrix of doubles, stored row by row: the entry of row i and column j is `data[i * cols + j]`. */
export interface Matrix {
  readonly rows: number;
  readonly cols: number;
  readonly data: Float64Array;
}

/**
 * A matrix of the given shape, from numbers in row order.
 * @param rows number of rows, at least 1
 * @param cols number of columns, at least 1
 * @param data rows * cols finite numbers in row order; left out = all zero
 * @returns the matrix; it owns a copy of the numbers
 * @throws RangeError when the shape and the count of numbers do not fit, or a number is not finite
 * @source common practice
 * @checked by hand, exact
 */
export function matrix(rows: number, cols: number, data?: ArrayLike<number>): Matrix {
  if (!Number.isInteger(rows) || rows < 1)
    throw new RangeError(`*rows* must be a whole number of at least 1; got ${rows}`);
  if (!Number.isInteger(cols) || cols < 1)
    throw new RangeError(`*cols* must be a whole number of at least 1; got ${cols}`);
  if (data === undefined) return { rows, cols, data: new Float64Array(rows * cols) };
  if (data.length !== rows * cols) {
    throw new RangeError(`*data* must be ${rows * cols} numbers; got ${data.length}`);
  }
  const own = Float64Array.from(data);
  const bad = own.findIndex((value) => !Number.isFinite(value));
  if (bad >= 0) throw new RangeError(`*data* must be finite; got ${own[bad]} at ${bad}`);
  return { rows, cols, data: own };
}

/**
 * A matrix whose columns are the given vectors.
 * @param columns one vector or more, all of the same length
 * @returns a matrix of columns[0].length rows and columns.length columns
 * @throws RangeError when there is no column, or lengths differ, or a number is not finite
 * @source common practice
 * @checked by hand, exact
 */
export function matrixFromColumns(columns: readonly ArrayLike<number>[]): Matrix {
  const first = columns[0];
  if (first === undefined) throw new RangeError('*columns* must be at least one; got 0');
  const rows = first.length;
  const data = new Float64Array(rows * columns.length);
  columns.forEach((column, j) => {
    if (column.length !== rows)
      throw new RangeError(`*columns* must be of equal length; got ${rows} and ${column.length}`);
    for (let i = 0; i < rows; i++) data[i * columns.length + j] = column[i]!;
  });
  return matrix(rows, columns.length, data);
}

/**
 * The identity matrix.
 * @param n order, at least 1
 * @returns n by n, ones on the diagonal
 * @throws RangeError when n is not a whole number of at least 1
 * @source common practice
 * @checked by hand, exact
 */
export function identity(n: number): Matrix {
  const out = matrix(n, n);
  for (let i = 0; i < n; i++) out.data[i * n + i] = 1;
  return out;
}

/**
 * Rows and columns exchanged.
 * @param a any matrix
 * @returns a.cols by a.rows
 * @source common practice
 * @checked by hand, exact
 */
export function transpose(a: Matrix): Matrix {
  const out = matrix(a.cols, a.rows);
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < a.cols; j++) out.data[j * a.rows + i] = a.data[i * a.cols + j]!;
  }
  return out;
}

/**
 * The matrix product a b.
 * @param a m by k
 * @param b k by n
 * @returns m by n
 * @throws RangeError when the inner dimensions differ
 * @source common practice
 * @checked by hand, exact
 */
export function multiply(a: Matrix, b: Matrix): Matrix {
  if (a.cols !== b.rows) throw new RangeError(`*b* must be a matrix of ${a.cols} rows; got ${b.rows}`);
  const out = matrix(a.rows, b.cols);
  for (let i = 0; i < a.rows; i++) {
    for (let k = 0; k < a.cols; k++) {
      const factor = a.data[i * a.cols + k]!;
      if (factor === 0) continue;
      for (let j = 0; j < b.cols; j++) {
        const at = i * b.cols + j;
        out.data[at] = out.data[at]! + factor * b.data[k * b.cols + j]!;
      }
    }
  }
  return out;
}

/**
 * A matrix times a vector.
 * @param a m by n
 * @param x n numbers
 * @returns m numbers
 * @throws RangeError when x has not n numbers
 * @source common practice
 * @checked by hand, exact
 */
export function multiplyVector(a: Matrix, x: ArrayLike<number>): Float64Array {
  if (x.length !== a.cols) throw new RangeError(`*x* must be ${a.cols} numbers; got ${x.length}`);
  const out = new Float64Array(a.rows);
  for (let i = 0; i < a.rows; i++) {
    let sum = 0;
    for (let j = 0; j < a.cols; j++) sum += a.data[i * a.cols + j]! * x[j]!;
    out[i] = sum;
  }
  return out;
}

/**
 * Kronecker product: every entry of a times the whole of b.
 * @param a m by n
 * @param b p by q
 * @returns m p by n q
 * @source common practice
 * @checked by hand, exact
 */
export function kronecker(a: Matrix, b: Matrix): Matrix {
  const out = matrix(a.rows * b.rows, a.cols * b.cols);
  for (let i = 0; i < out.rows; i++) {
    for (let j = 0; j < out.cols; j++) {
      const left = a.data[Math.floor(i / b.rows) * a.cols + Math.floor(j / b.cols)]!;
      out.data[i * out.cols + j] = left * b.data[(i % b.rows) * b.cols + (j % b.cols)]!;
    }
  }
  return out;
}

/**
 * Sum of the diagonal.
 * @param a a square matrix
 * @returns the trace
 * @throws RangeError when a is not square
 * @source common practice
 * @checked by hand, exact
 */
export function trace(a: Matrix): number {
  if (a.rows !== a.cols) throw new RangeError(`*a* must be square; got ${a.rows} by ${a.cols}`);
  let sum = 0;
  for (let i = 0; i < a.rows; i++) sum += a.data[i * a.cols + i]!;
  return sum;
}
