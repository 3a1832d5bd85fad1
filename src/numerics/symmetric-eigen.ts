import { identity, type Matrix, matrix } from './matrix.ts';

export interface SymmetricEigen {
  /** Eigenvalues, largest first. */
  readonly values: Float64Array;
  /** Column j is the unit eigenvector of value j; its entry of largest size is positive. */
  readonly vectors: Matrix;
}

/**
 * Eigenvalues and eigenvectors of a symmetric matrix by cyclic Jacobi rotations.
 * @param a n by n, symmetric (the upper triangle is read)
 * @returns values, largest first, and orthonormal vectors
 * @throws RangeError when a is not square
 * @source Jacobi (1846); rotation tan t = sign(d) / (|d| + sqrt(1 + d^2)), d = (a_qq - a_pp) / (2 a_pq) (Golub & Van Loan 1996, 8.4)
 * @checked by hand 1e-15; a V = V diag(values) 1e-13
 */
export function symmetricEigen(a: Matrix): SymmetricEigen {
  if (a.rows !== a.cols) throw new RangeError(`*a* must be square; got ${a.rows} by ${a.cols}`);
  const n = a.rows;
  const work = matrix(n, n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) work.data[i * n + j] = a.data[Math.min(i, j) * n + Math.max(i, j)]!;
  }
  const turned = identity(n);
  // Convergence is quadratic: 60 sweeps are never reached by a finite matrix, they only bound the loop.
  for (let sweep = 0; sweep < 60 && offDiagonal(work) > 0; sweep++) {
    for (let p = 0; p < n - 1; p++) {
      for (let q = p + 1; q < n; q++) rotate(work, turned, p, q);
    }
  }
  return sorted(work, turned);
}

function offDiagonal(a: Matrix): number {
  let largest = 0;
  for (let i = 0; i < a.rows; i++) {
    for (let j = i + 1; j < a.rows; j++) largest = Math.max(largest, Math.abs(a.data[i * a.rows + j]!));
  }
  return largest;
}

function rotate(work: Matrix, turned: Matrix, p: number, q: number): void {
  const n = work.rows;
  const w = work.data;
  const apq = w[p * n + q]!;
  const app = w[p * n + p]!;
  const aqq = w[q * n + q]!;
  if (apq === 0) return;
  // Entries that no longer change either diagonal value are rounding: removing them ends the sweeps.
  if (Math.abs(app) + Math.abs(apq) / 100 === Math.abs(app) && Math.abs(aqq) + Math.abs(apq) / 100 === Math.abs(aqq)) {
    w[p * n + q] = 0;
    w[q * n + p] = 0;
    return;
  }
  const d = (aqq - app) / (2 * apq);
  const t = (d < 0 ? -1 : 1) / (Math.abs(d) + Math.sqrt(1 + d * d));
  const c = 1 / Math.sqrt(1 + t * t);
  const s = t * c;
  for (let k = 0; k < n; k++) {
    if (k !== p && k !== q) {
      const kp = w[k * n + p]!;
      const kq = w[k * n + q]!;
      w[k * n + p] = c * kp - s * kq;
      w[p * n + k] = w[k * n + p]!;
      w[k * n + q] = s * kp + c * kq;
      w[q * n + k] = w[k * n + q]!;
    }
    const vp = turned.data[k * n + p]!;
    const vq = turned.data[k * n + q]!;
    turned.data[k * n + p] = c * vp - s * vq;
    turned.data[k * n + q] = s * vp + c * vq;
  }
  w[p * n + p] = app - t * apq;
  w[q * n + q] = aqq + t * apq;
  w[p * n + q] = 0;
  w[q * n + p] = 0;
}

function sorted(work: Matrix, turned: Matrix): SymmetricEigen {
  const n = work.rows;
  const order = Array.from({ length: n }, (_, i) => i);
  order.sort((i, j) => work.data[j * n + j]! - work.data[i * n + i]! || i - j);
  const vectors = matrix(n, n);
  order.forEach((from, to) => {
    let peak = 0;
    for (let i = 0; i < n; i++) {
      const entry = turned.data[i * n + from]!;
      if (Math.abs(entry) > Math.abs(peak)) peak = entry;
    }
    const sign = peak < 0 ? -1 : 1;
    for (let i = 0; i < n; i++) vectors.data[i * n + to] = sign * turned.data[i * n + from]!;
  });
  return { values: Float64Array.from(order, (i) => work.data[i * n + i]!), vectors };
}
