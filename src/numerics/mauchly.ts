import { cholesky, choleskyLogDeterminant } from './cholesky.ts';
import { type Matrix, trace } from './matrix.ts';
import { chiSquareLower, chiSquareUpper } from './tails/chi-square.ts';

export interface MauchlyTest {
  /** 1 where sphericity holds exactly in the sample. */
  readonly W: number | null;
  readonly chi2: number | null;
  readonly df: number | null;
  /** By the chi-square approximation alone. */
  readonly p: number | null;
  /** With the next term of the expansion. */
  readonly pSecondOrder: number | null;
  readonly reason?: string;
}

/**
 * Mauchly's test of sphericity.
 * @param products p by p sums of squares and products (or covariances) of orthonormal comparisons
 * @param dfError participants minus groups, at least 1
 * @returns W, chi2, df, p and the second-order p; null with a reason for a single comparison (two levels), fewer
 *   degrees of freedom than comparisons, or comparisons that determine each other
 * @throws RangeError when the matrix is not square or dfError is below 1
 * @source Mauchly (1940): W = det(S) / (tr(S)/p)^p; Box (1949): chi2 = -(df - (2p^2+p+2)/(6p)) ln W on p (p+1)/2 - 1;
 *   second order (Anderson 1958, 10.7.4): p1 + w (p2 - p1), p2 on 4 df more,
 *   w = (p+2)(p-1)(p-2)(2p^3+6p^2+3p+2) / (288 p^2 df^2 rho^2), rho = 1 - (2p^2+p+2)/(6 p df)
 * @checked cases `repeated_measures_anova`, `mixed_anova`, rtol 1e-9
 */
export function mauchlyTest(products: Matrix, dfError: number): MauchlyTest {
  const none = (reason: string) => ({ W: null, chi2: null, df: null, p: null, pSecondOrder: null, reason });
  if (!(dfError >= 1)) throw new RangeError(`*dfError* must be at least 1; got ${dfError}`);
  const total = trace(products);
  const p = products.rows;
  if (p === 1) return none('with two levels sphericity always holds');
  if (dfError < p) return none('fewer participants than the test needs');
  const lower = cholesky(products);
  if (lower === null) return none('the differences between levels determine each other');
  const logW = Math.min(0, choleskyLogDeterminant(lower) - p * Math.log(total / p));
  const df = (p * (p + 1)) / 2 - 1;
  const rho = 1 - (2 * p * p + p + 2) / (6 * p * dfError);
  const chi2 = -dfError * rho * logW;
  const first = chiSquareUpper(chi2, df);
  const weight =
    ((p + 2) * (p - 1) * (p - 2) * (2 * p ** 3 + 6 * p * p + 3 * p + 2)) / (288 * (p * dfError * rho) ** 2);
  // The difference of two upper tails, taken from whichever tails are small.
  const rise =
    first < 0.5 ? chiSquareUpper(chi2, df + 4) - first : chiSquareLower(chi2, df) - chiSquareLower(chi2, df + 4);
  const second = Math.min(1, Math.max(0, first + weight * rise));
  return { W: Math.exp(logW), chi2, df, p: first, pSecondOrder: second };
}
