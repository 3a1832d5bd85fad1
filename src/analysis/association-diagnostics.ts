import { regressionInfluence } from '../numerics/regression/influence.ts';
import { fQuantileUpper } from '../numerics/tails/f.ts';

/** How much one pair bends the least-squares line. */
export interface PairDiagnostic {
  /** Leverage of the pair, 0 to 1. */
  readonly hat: number | null;
  /** Cook's distance. */
  readonly cook: number | null;
  /** Residual in standard deviations of a fit without the pair. */
  readonly studentized: number | null;
  /** Whether leverage, Cook's distance and residual are beyond their limits. */
  readonly beyond: readonly [hat: boolean, cook: boolean, studentized: boolean];
}

/** The diagnostics of all pairs with the limits they are held against. */
export interface Diagnostics {
  readonly pairs: readonly PairDiagnostic[];
  readonly limits: { readonly hat: number; readonly cook: number | null; readonly studentized: number };
  /** Why there are none. */
  readonly reason?: string;
}

/** Studentized residuals beyond this are pointed out (common practice). */
const LARGE_RESIDUAL = 3;

/**
 * Leverage, Cook's distance and studentized residual of every pair in the least-squares line of y on x.
 *
 * @param x scores (n, any unit)
 * @param y outcome paired with *x*
 * @returns n diagnostics and their limits: leverage 2 (k + 1) / n, Cook's distance the median of F(k + 1, n - k - 1), residual
 *   3, with k = 1 predictor; null with a reason where the line is not determined or exact
 * @source limits: common practice (Aguinis, Gottfredson & Joo 2013 list them)
 * @checked outside check cases regression_influence, relative 1e-8
 */
export function diagnosePairs(x: Float64Array, y: Float64Array): Diagnostics {
  const n = x.length;
  const limits = { hat: 4 / n, cook: n > 2 ? fQuantileUpper(0.5, 2, n - 2) : null, studentized: LARGE_RESIDUAL };
  if (n < 3) return { pairs: [], limits, reason: 'fewer than 3 pairs' };
  const found = regressionInfluence(y, [x]);
  if (found.hat === null) return { pairs: [], limits, reason: found.reason ?? 'no least-squares line' };
  const pairs = Array.from(found.hat, (hat, i): PairDiagnostic => {
    const cook = found.cooksDistance[i] ?? null;
    const studentized = found.studentized[i] ?? null;
    const isFar = cook !== null && limits.cook !== null && cook > limits.cook;
    const isLarge = studentized !== null && Math.abs(studentized) > limits.studentized;
    return { hat, cook, studentized, beyond: [hat > limits.hat, isFar, isLarge] };
  });
  return { pairs, limits };
}

/** Indices of the pairs whose leverage is beyond its limit, the largest first. */
export function leveragePairs({ pairs }: Diagnostics): number[] {
  const indices = pairs.flatMap((pair, i) => (pair.beyond[0] ? [i] : []));
  return indices.sort((a, b) => (pairs[b]?.hat ?? 0) - (pairs[a]?.hat ?? 0) || a - b);
}
