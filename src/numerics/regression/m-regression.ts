import { largestSize, noSpread } from '../inference.ts';
import { type Matrix, matrix } from '../matrix.ts';
import { median } from '../order.ts';
import { leastSquares, qr } from '../qr.ts';
import { fitLinear } from './linear-model.ts';

/** Coefficients of a fit that bounds the pull of large residuals; null with a reason. */
export interface MRegression {
  /** p numbers, intercept first, in outcome units per predictor unit. */
  readonly coefficients: Float64Array | null;
  /** Residual scale, in outcome units. */
  readonly scale: number | null;
  /** n weights between 0 and 1 of the last step. */
  readonly weights: Float64Array | null;
  readonly steps: number;
  readonly reason?: string;
}

/** Tukey's biweight at 95 % efficiency for normal residuals, and Huber's. */
const TUNING = { huber: 1.345, bisquare: 4.685 } as const;
const MOST_STEPS = 2000;

/**
 * Regression M-estimate by reweighted least squares from the least-squares start. Bounds outlying outcomes, not leverage.
 * @param y outcome (n, any unit)
 * @param predictors vectors of n numbers each
 * @param options psi: 'huber' or 'bisquare' ('huber'); tuning in residual scales (1.345 or 4.685); madDivisor: median of
 *   normal |z| (.6744897501960817)
 * @returns coefficients, scale, weights; null with a reason when the coefficients are not determined, at least half of the
 *   residuals become 0, or the steps do not settle
 * @throws RangeError when lengths differ, a number is not finite or an option is out of range
 * @source Huber 1981, Robust Statistics, 7.8; Beaton & Tukey 1974: w = psi(u) / u, u = r / scale, scale = median |r| /
 *   madDivisor in every step
 * @checked outside check cases m_regression, relative 1e-7
 */
export function mRegression(
  y: Float64Array,
  predictors: readonly Float64Array[],
  options: { readonly psi?: 'huber' | 'bisquare'; readonly tuning?: number; readonly madDivisor?: number } = {},
): MRegression {
  const { psi = 'huber', tuning = TUNING[psi], madDivisor = 0.6744897501960817 } = options;
  if (!(tuning > 0)) throw new RangeError(`*tuning* must be a number above 0; got ${tuning}`);
  if (!(madDivisor > 0)) throw new RangeError(`*madDivisor* must be a number above 0; got ${madDivisor}`);
  const start = fitLinear(y, predictors);
  if (start.coefficients === null) return nothing(start.reason, 0);
  const size = largestSize(y);
  let { coefficients, residuals } = start;
  for (let steps = 1; steps <= MOST_STEPS; steps++) {
    const scale = median(residuals.map(Math.abs)) / madDivisor;
    if (noSpread(scale, size)) return nothing('at least half of the residuals are 0: no residual scale', steps);
    const weights = residuals.map((r) => weightOf(r / scale, psi, tuning));
    const next = weightedFit(start.design, y, weights);
    if (next === null) return nothing('the points that keep a weight do not determine the line', steps);
    const moved = largestSize(next.residuals.map((r, i) => r - residuals[i]!));
    coefficients = next.coefficients;
    residuals = next.residuals;
    if (moved <= 1e-12 * scale + 8 * Number.EPSILON * size) return { coefficients, scale, weights, steps };
  }
  return nothing(`the steps had not settled after ${MOST_STEPS}`, MOST_STEPS);
}

function nothing(reason: string, steps: number): MRegression {
  return { coefficients: null, scale: null, weights: null, steps, reason };
}

function weightOf(u: number, psi: 'huber' | 'bisquare', tuning: number): number {
  const size = Math.abs(u);
  if (psi === 'huber') return size <= tuning ? 1 : tuning / size;
  return size < tuning ? (1 - (u / tuning) ** 2) ** 2 : 0;
}

function weightedFit(
  design: Matrix,
  y: Float64Array,
  weights: Float64Array,
): { coefficients: Float64Array; residuals: Float64Array } | null {
  const { rows, cols, data } = design;
  const roots = weights.map(Math.sqrt);
  const factors = qr(
    matrix(
      rows,
      cols,
      data.map((value, at) => value * roots[Math.floor(at / cols)]!),
    ),
    1e-12,
  );
  if (factors.rank < cols) return null;
  const { coefficients } = leastSquares(
    factors,
    y.map((value, i) => value * roots[i]!),
  );
  const residuals = y.map((value, i) => {
    let fitted = 0;
    for (let j = 0; j < cols; j++) fitted += data[i * cols + j]! * coefficients[j]!;
    return value - fitted;
  });
  return { coefficients, residuals };
}
