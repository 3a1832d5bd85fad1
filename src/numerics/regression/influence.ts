import { leverages } from '../qr.ts';
import { fitLinear } from './linear-model.ts';

/** How much each row bends a least-squares fit; an entry is null where its row has leverage 1 or is not defined. */
export interface RegressionInfluence {
  /** n leverages between 0 and 1; null with a reason. */
  readonly hat: Float64Array | null;
  /** e / (s sqrt(1 - h)). */
  readonly standardized: (number | null)[];
  /** e / (s without the row sqrt(1 - h)). */
  readonly studentized: (number | null)[];
  readonly cooksDistance: (number | null)[];
  readonly dffits: (number | null)[];
  /** Why hat or single entries are null. */
  readonly reason?: string;
}

/** Leverage this close to 1 is 1 with rounding. */
const FULL_LEVERAGE = 1 - 1e-10;

/**
 * Leverage, residuals in standard deviations, and the change of the fit without each row.
 * @param y outcome (n, any unit)
 * @param predictors vectors of n numbers each
 * @returns n leverages, standardized and studentized residuals, Cook's distances, DFFITS; null with a reason when the
 *   coefficients are not determined, no degrees of freedom are left or the fit is exact
 * @throws RangeError when lengths differ or a number is not finite
 * @source Cook & Weisberg 1982, Residuals and Influence in Regression: D = r^2 h / (p (1 - h)), t = r sqrt((n-p-1) /
 *   (n-p-r^2)), DFFITS = t sqrt(h / (1-h))
 * @checked outside check cases regression_influence, relative 1e-8
 */
export function regressionInfluence(y: Float64Array, predictors: readonly Float64Array[]): RegressionInfluence {
  const model = fitLinear(y, predictors);
  const none = { hat: null, standardized: [], studentized: [], cooksDistance: [], dffits: [] };
  if (model.coefficients === null) return { ...none, reason: model.reason };
  if (model.df === 0) return { ...none, reason: 'as many coefficients as rows: no residual left' };
  if (model.exact) return { ...none, reason: 'the fit is exact: no residual spread' };
  const hat = leverages(model.factors);
  const s = Math.sqrt(model.residualSumOfSquares / model.df);
  const standardized = Array.from(model.residuals, (e, i) => {
    return hat[i]! > FULL_LEVERAGE ? null : e / (s * Math.sqrt(1 - hat[i]!));
  });
  const studentized = standardized.map((r) => (r === null ? null : withoutRow(r, model.df)));
  const cooksDistance = standardized.map((r, i) => {
    return r === null ? null : (r * r * hat[i]!) / ((1 - hat[i]!) * model.coefficients.length);
  });
  const dffits = studentized.map((t, i) => (t === null ? null : t * Math.sqrt(hat[i]! / (1 - hat[i]!))));
  const gaps = studentized.includes(null);
  const reason = 'a row determines its own fitted value (leverage 1), or the fit is exact without it';
  return { hat, standardized, studentized, cooksDistance, dffits, ...(gaps ? { reason } : {}) };
}

/** Null when the fit without the row is exact (or, with one degree of freedom, does not exist). */
function withoutRow(standardized: number, df: number): number | null {
  const left = df - standardized * standardized;
  return left <= 1e-12 * df ? null : standardized * Math.sqrt((df - 1) / left);
}
