import { largestSize, noSpread } from '../inference.ts';
import { type Matrix, matrixFromColumns } from '../matrix.ts';
import { inverseGram, leastSquares, type Qr, qr } from '../qr.ts';
import { requirePairs, requireScores } from '../scores.ts';

/** A least-squares fit of an outcome on an intercept and predictors. */
export interface LinearModel {
  /** n rows, p columns: ones, then the predictors. */
  readonly design: Matrix;
  readonly factors: Qr;
  /** p numbers: intercept, then one a predictor, in outcome units per predictor unit. */
  readonly coefficients: Float64Array;
  /** n numbers, outcome minus fitted. */
  readonly residuals: Float64Array;
  readonly residualSumOfSquares: number;
  /** n - p. */
  readonly df: number;
  /** (X'X)^-1. */
  readonly unscaled: Matrix;
  /** Whether the fitted values meet every score, up to rounding. */
  readonly exact: boolean;
}

/** A model that cannot be fitted, and why. */
export interface NoModel {
  readonly coefficients: null;
  readonly reason: string;
}

/** A column counts as a combination of earlier ones when less than this share of its length is left. */
const DEPENDENT_SHARE = 1e-12;

/**
 * Least-squares fit of an outcome on an intercept and predictors.
 * @param y outcome (n, any unit)
 * @param predictors vectors of n numbers each; none = intercept only
 * @returns coefficients, residuals, (X'X)^-1; null with a reason when n < p or a predictor is a combination of the others
 * @throws RangeError when lengths differ or a number is not finite
 * @source Gauss 1809; Golub 1965: R b = Q'y
 * @checked NIST StRD Norris 1e-9; outside check cases linear_regression, relative 1e-9
 */
export function fitLinear(y: Float64Array, predictors: readonly Float64Array[]): LinearModel | NoModel {
  requireScores(y, 0, 'y');
  for (const predictor of predictors) {
    requireScores(predictor, 0, 'predictors');
    requirePairs(y, predictor);
  }
  const n = y.length;
  const p = predictors.length + 1;
  if (n < p) return { coefficients: null, reason: `fewer than ${p} rows` };
  const design = matrixFromColumns([new Float64Array(n).fill(1), ...predictors]);
  const factors = qr(design, DEPENDENT_SHARE);
  const unscaled = inverseGram(factors);
  if (unscaled === null)
    return { coefficients: null, reason: 'a predictor does not vary or is a combination of the others' };
  const { coefficients, residuals, residualSumOfSquares } = leastSquares(factors, y);
  const df = n - p;
  const exact = noSpread(Math.sqrt(residualSumOfSquares / n), largestSize(y));
  return { design, factors, coefficients, residuals, residualSumOfSquares, df, unscaled, exact };
}

/**
 * Fitted values of a linear model.
 * @param model the fit
 * @returns n numbers, in outcome units
 * @source common practice
 * @checked by hand, 1e-14
 */
export function fittedValues(model: LinearModel): Float64Array {
  const { rows, cols, data } = model.design;
  return Float64Array.from({ length: rows }, (_, i) => {
    let value = 0;
    for (let j = 0; j < cols; j++) value += data[i * cols + j]! * model.coefficients[j]!;
    return value;
  });
}
