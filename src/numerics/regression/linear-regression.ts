import { outside } from '../inference.ts';
import { applyQt } from '../qr.ts';
import { fUpper } from '../tails/f.ts';
import { tQuantileUpper, tTwoSided } from '../tails/t.ts';
import { fitLinear, type LinearModel } from './linear-model.ts';

/** Coefficients (intercept first) with their tests, and how much of the outcome they explain. */
export interface LinearRegression {
  /** p numbers, in outcome units per predictor unit; null with a reason. */
  readonly coefficients: Float64Array | null;
  readonly se: Float64Array | null;
  readonly t: Float64Array | null;
  readonly p: Float64Array | null;
  readonly lower: Float64Array | null;
  readonly upper: Float64Array | null;
  /** Share of the outcome's sum of squares explained; null when the outcome does not vary. */
  readonly r2: number | null;
  readonly adjustedR2: number | null;
  /** F of all predictors together, on fDf. */
  readonly f: number | null;
  readonly fDf: readonly [number, number];
  readonly fP: number | null;
  /** In outcome units, on n - p degrees of freedom. */
  readonly residualSd: number | null;
  /** n - p. */
  readonly df: number;
  /** Why something is null. */
  readonly reason?: string;
}

/**
 * Ordinary least squares with t tests of the coefficients and the F test of all predictors.
 * @param y outcome (n, any unit)
 * @param predictors vectors of n numbers each
 * @param options level of the intervals (.95)
 * @returns coefficients, SE, t, two-sided p, intervals, r2, F; tests null with a reason when no degrees of freedom are
 *   left or the fit is exact; everything null with a reason when the coefficients are not determined
 * @throws RangeError when lengths differ, a number is not finite or the level is not between 0 and 1
 * @source common practice; se_j = s sqrt((X'X)^-1_jj), s^2 = RSS / (n - p), F = ((TSS - RSS) / (p - 1)) / s^2
 * @checked outside check cases linear_regression, relative 1e-9
 */
export function linearRegression(
  y: Float64Array,
  predictors: readonly Float64Array[],
  options: { readonly level?: number } = {},
): LinearRegression {
  const tail = outside(options.level ?? 0.95, 'two-sided');
  const model = fitLinear(y, predictors);
  const df = y.length - predictors.length - 1;
  const fDf: readonly [number, number] = [predictors.length, df];
  const none = { se: null, t: null, p: null, lower: null, upper: null, r2: null, adjustedR2: null };
  const noTests = { ...none, f: null, fDf, fP: null, residualSd: null, df };
  if (model.coefficients === null) return { ...noTests, coefficients: null, reason: model.reason };
  const { coefficients } = model;
  if (df === 0) return { ...noTests, coefficients, reason: 'as many coefficients as rows: no residual left' };
  if (model.exact) return { ...noTests, coefficients, residualSd: 0, reason: 'the fit is exact: no residual spread' };
  const s2 = model.residualSumOfSquares / df;
  const se = coefficients.map((_, j) => Math.sqrt(s2 * model.unscaled.data[j * coefficients.length + j]!));
  const t = coefficients.map((value, j) => value / se[j]!);
  const reach = tQuantileUpper(tail, df);
  return {
    coefficients,
    se,
    t,
    p: t.map((value) => tTwoSided(value, df)),
    lower: coefficients.map((value, j) => value - reach * se[j]!),
    upper: coefficients.map((value, j) => value + reach * se[j]!),
    ...explained(y, model, s2),
    fDf,
    residualSd: Math.sqrt(s2),
    df,
  };
}

function explained(y: Float64Array, model: LinearModel, s2: number) {
  const p = model.coefficients.length;
  // The part of Q'y along the predictors, so that no sum of squares is a difference of two others.
  const along = applyQt(model.factors, y).subarray(1, p);
  const explainedSum = along.reduce((total, part) => total + part * part, 0);
  const rest = model.residualSumOfSquares / (explainedSum + model.residualSumOfSquares);
  const r2 = explainedSum / (explainedSum + model.residualSumOfSquares);
  const adjustedR2 = 1 - (rest * (y.length - 1)) / model.df;
  if (p === 1) return { r2, adjustedR2, f: null, fP: null };
  const f = explainedSum / (p - 1) / s2;
  return { r2, adjustedR2, f, fP: fUpper(f, p - 1, model.df) };
}
