/** Adapters of the section "Association and regression" of test/reference/cases/README.md. */
import { biweightMidcorrelation } from '../../../src/numerics/correlation/biweight-midcorrelation.ts';
import { kendallTau } from '../../../src/numerics/correlation/kendall.ts';
import { pearsonCorrelation } from '../../../src/numerics/correlation/pearson.ts';
import { percentageBendCorrelation } from '../../../src/numerics/correlation/percentage-bend.ts';
import { spearmanCorrelation } from '../../../src/numerics/correlation/spearman.ts';
import { winsorizedCorrelation } from '../../../src/numerics/correlation/winsorized-correlation.ts';
import { breuschPagan } from '../../../src/numerics/regression/breusch-pagan.ts';
import { durbinWatson } from '../../../src/numerics/regression/durbin-watson.ts';
import { regressionInfluence } from '../../../src/numerics/regression/influence.ts';
import { linearRegression } from '../../../src/numerics/regression/linear-regression.ts';
import { mRegression } from '../../../src/numerics/regression/m-regression.ts';
import { repeatedMedians } from '../../../src/numerics/regression/repeated-medians.ts';
import { type HcType, robustStandardErrors } from '../../../src/numerics/regression/robust-standard-errors.ts';
import { theilSen } from '../../../src/numerics/regression/theil-sen.ts';
import {
  alternativeArg,
  type CaseArgs,
  type CaseData,
  type CaseMethods,
  type CaseRow,
  intervalText,
  levelArg,
  numberArg,
  numbersOf,
  stringArg,
  stringsArg,
  trimPercent,
  undefinedResult,
  usedRows,
} from './case-data.ts';

type Result = Record<string, unknown>;

function pairs(data: CaseData, args: CaseArgs): { x: Float64Array; y: Float64Array } {
  const names = [stringArg(args, 'x'), stringArg(args, 'y')] as const;
  const rows = usedRows(data, args, [...names]);
  return { x: numbersOf(rows, names[0]), y: numbersOf(rows, names[1]) };
}

function regression(data: CaseData, args: CaseArgs): { rows: CaseRow[]; y: Float64Array; predictors: Float64Array[] } {
  const outcome = stringArg(args, 'outcome');
  const names = stringsArg(args, 'predictors');
  const rows = usedRows(data, args, [outcome, ...names]);
  return { rows, y: numbersOf(rows, outcome), predictors: names.map((name) => numbersOf(rows, name)) };
}

function pearson(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const found = pearsonCorrelation(x, y, { level: levelArg(args), alternative: alternativeArg(args) });
  if (found.r === null) return { ...undefinedResult };
  return { ...found, ci: found.interval === null ? null : intervalText(found.interval) };
}

function spearman(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const method = stringArg(args, 'p_method') === 'exact' ? 'exact' : 't';
  const found = spearmanCorrelation(x, y, { method, alternative: alternativeArg(args) });
  return found.rho === null ? { ...undefinedResult } : { ...found };
}

function kendall(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const method = stringArg(args, 'p_method') === 'exact' ? 'exact' : 'asymptotic';
  const found = kendallTau(x, y, { method, alternative: alternativeArg(args) });
  return found.tau === null ? { ...undefinedResult } : { ...found };
}

function winsorized(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const found = winsorizedCorrelation(x, y, { trim: trimPercent(args, 0.2), alternative: alternativeArg(args) });
  return found.r === null ? { ...undefinedResult } : { ...found };
}

function percentageBend(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const found = percentageBendCorrelation(x, y, { beta: numberArg(args, 'beta', 0.2) });
  return found.r === null ? { ...undefinedResult } : { ...found };
}

function biweight(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const found = biweightMidcorrelation(x, y, { c: numberArg(args, 'c', 9) });
  return found.r === null ? { ...undefinedResult } : { ...found };
}

function leastSquares(data: CaseData, args: CaseArgs): Result {
  const { y, predictors } = regression(data, args);
  const found = linearRegression(y, predictors, { level: levelArg(args) });
  if (found.coefficients === null) return { ...undefinedResult };
  const { coefficients: coef, se, t, p, lower, upper, r2, adjustedR2, f, fDf, fP, residualSd } = found;
  const rest = { ci_lower: lower, ci_upper: upper, r2, adj_r2: adjustedR2, F: f, F_df: fDf, F_p: fP };
  return { coef, se, t, p, ...rest, residual_sd: residualSd };
}

function robustErrors(data: CaseData, args: CaseArgs): Result {
  const { y, predictors } = regression(data, args);
  const found = robustStandardErrors(y, predictors, { hc: stringArg(args, 'hc') as HcType });
  return found.se === null ? { ...undefinedResult } : { ...found, coef: found.coefficients };
}

function influence(data: CaseData, args: CaseArgs): Result {
  const { rows, y, predictors } = regression(data, args);
  const found = regressionInfluence(y, predictors);
  if (found.hat === null) return { ...undefinedResult };
  return {
    rows: rows.map((row) => row.number),
    hat: found.hat,
    standardized_residual: found.standardized,
    studentized_residual: found.studentized,
    cooks_distance: found.cooksDistance,
    dffits: found.dffits,
  };
}

function theil(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const found = theilSen(x, y, { level: levelArg(args) });
  if (found.slope === null) return { ...undefinedResult };
  return { ...found, ci_slope: found.interval };
}

function siegel(data: CaseData, args: CaseArgs): Result {
  const { x, y } = pairs(data, args);
  const found = repeatedMedians(x, y);
  return found.slope === null ? { ...undefinedResult } : { ...found };
}

function bounded(data: CaseData, args: CaseArgs): Result {
  const { y, predictors } = regression(data, args);
  const psi = stringArg(args, 'psi') === 'bisquare' ? 'bisquare' : 'huber';
  const tuning = numberArg(args, 'tuning', psi === 'huber' ? 1.345 : 4.685);
  const found = mRegression(y, predictors, { psi, tuning, madDivisor: numberArg(args, 'mad_divisor', 0.6745) });
  return found.coefficients === null ? { ...undefinedResult } : { coef: found.coefficients, scale: found.scale };
}

function spreadCheck(data: CaseData, args: CaseArgs): Result {
  const { y, predictors } = regression(data, args);
  const found = breuschPagan(y, predictors);
  return found.chi2 === null ? { ...undefinedResult } : { ...found };
}

function serialCheck(data: CaseData, args: CaseArgs): Result {
  const { y, predictors } = regression(data, args);
  const found = durbinWatson(y, predictors);
  return found.ratio === null ? { ...undefinedResult } : { dw: found.ratio };
}

export const associationMethods: CaseMethods = {
  pearson_correlation: pearson,
  spearman_correlation: spearman,
  kendall_tau_b: kendall,
  winsorized_correlation: winsorized,
  percentage_bend_correlation: percentageBend,
  biweight_midcorrelation: biweight,
  linear_regression: leastSquares,
  robust_standard_errors: robustErrors,
  regression_influence: influence,
  theil_sen: theil,
  repeated_medians: siegel,
  m_regression: bounded,
  breusch_pagan: spreadCheck,
  durbin_watson_regression: serialCheck,
};
