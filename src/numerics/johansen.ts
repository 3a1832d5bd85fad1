import { cholesky, choleskyInverse } from './cholesky.ts';
import { type FTest, noFTest } from './groups.ts';
import { type Matrix, matrix, multiply, multiplyVector, transpose } from './matrix.ts';
import { chiSquareUpper } from './tails/chi-square.ts';
import { fUpper } from './tails/f.ts';

/** One independent group: its mean vector and how exactly it is known. */
export interface JohansenGroup {
  /** q means. */
  readonly means: Float64Array;
  /** q by q covariance matrix of the means (not of single scores). */
  readonly covariance: Matrix;
  /** Degrees of freedom of the covariance matrix, h - 1. */
  readonly df: number;
}

export interface JohansenTest extends FTest {
  readonly T: number | null;
  readonly A: number | null;
  /** From the corrected chi-square point instead of F. */
  readonly pChiSquare: number | null;
}

/**
 * Johansen's test of linear hypotheses about mean vectors of groups with unequal covariances.
 * @param groups one or more groups, each of q means
 * @param contrasts r by (groups * q) of rank r; the hypothesis is C m = 0, m the groups' means one after another
 * @returns T, A, F = T / c on df1 = r and df2, p, and p from the corrected chi-square point; null with a reason when the
 *   covariance matrix of the contrasts is singular
 * @throws RangeError when shapes do not fit or a df is below 1
 * @source Johansen (1980); Lix & Keselman (1995): T = (Cm)' (C V C')^-1 (Cm), M = V C' (C V C')^-1 C,
 *   A = sum_j [tr((M Q_j)^2) + (tr M Q_j)^2] / (2 df_j), c = r + 2A - 6A/(r+2), df2 = r (r+2) / (3A);
 *   corrected point x + x A (1 + 3x / (r+2)) / (2r) solved for x
 * @checked cases `welch_james`, rtol 1e-9
 */
export function johansenTest(groups: readonly JohansenGroup[], contrasts: Matrix): JohansenTest {
  const q = requireJohansen(groups, contrasts);
  const { means, covariance } = stacked(groups, q);
  const product = multiply(contrasts, covariance);
  const lower = cholesky(multiply(product, transpose(contrasts)));
  if (lower === null) return noJohansen('the compared means have no spread or determine each other');
  const inverse = choleskyInverse(lower);
  const values = multiplyVector(contrasts, means);
  const T = multiplyVector(inverse, values).reduce((sum, value, i) => sum + value * values[i]!, 0);
  const hat = multiply(multiply(transpose(product), inverse), contrasts);
  const A = groups.reduce((sum, group, j) => sum + blockTraces(hat, j * q, q) / (2 * group.df), 0);
  const r = contrasts.rows;
  const c = r + 2 * A - (6 * A) / (r + 2);
  const df2 = (r * (r + 2)) / (3 * A);
  const x = correctedPoint(T, A, r);
  return { T, A, F: T / c, df1: r, df2, p: fUpper(T / c, r, df2), pChiSquare: chiSquareUpper(x, r) };
}

/**
 * A test of Johansen that cannot be made.
 * @param reason a short clause
 * @returns the fields of the test, null, with the reason
 * @source common practice
 * @checked by hand
 */
export function noJohansen(reason: string): JohansenTest {
  return { T: null, A: null, pChiSquare: null, ...noFTest(reason) };
}

function requireJohansen(groups: readonly JohansenGroup[], contrasts: Matrix): number {
  const q = groups[0]?.means.length ?? 0;
  if (q < 1) throw new RangeError('*groups* must hold at least one group with one mean; got none');
  for (const { means, covariance, df } of groups) {
    if (means.length !== q || covariance.rows !== q || covariance.cols !== q) {
      throw new RangeError(`*groups* must hold ${q} means and their covariances each; got ${means.length}`);
    }
    if (!(df >= 1)) throw new RangeError(`*df* must be at least 1; got ${df}`);
  }
  if (contrasts.cols !== groups.length * q) {
    throw new RangeError(`*contrasts* must have ${groups.length * q} columns; got ${contrasts.cols}`);
  }
  return q;
}

function stacked(groups: readonly JohansenGroup[], q: number): { means: Float64Array; covariance: Matrix } {
  const size = groups.length * q;
  const covariance = matrix(size, size);
  const means = new Float64Array(size);
  groups.forEach((group, j) => {
    means.set(group.means, j * q);
    for (let i = 0; i < q; i++) {
      const row = group.covariance.data.subarray(i * q, (i + 1) * q);
      covariance.data.set(row, (j * q + i) * size + j * q);
    }
  });
  return { means, covariance };
}

/** tr(B B) + (tr B)^2 of the q by q diagonal block that starts at `from`. */
function blockTraces(a: Matrix, from: number, q: number): number {
  const at = (i: number, j: number) => a.data[(from + i) * a.cols + from + j]!;
  let own = 0;
  let squared = 0;
  for (let i = 0; i < q; i++) {
    own += at(i, i);
    for (let j = 0; j < q; j++) squared += at(i, j) * at(j, i);
  }
  return squared + own * own;
}

function correctedPoint(T: number, A: number, r: number): number {
  const linear = 1 + A / (2 * r);
  const quadratic = (3 * A) / (2 * r * (r + 2));
  return (2 * T) / (linear + Math.sqrt(linear * linear + 4 * quadratic * T));
}
