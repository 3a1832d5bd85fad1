import { leverages } from '../qr.ts';
import { tTwoSided } from '../tails/t.ts';
import { fitLinear, type LinearModel } from './linear-model.ts';

/** How squared residuals are weighted: HC0 none, HC1 n/(n-p), HC2 1/(1-h), HC3 1/(1-h)^2, HC4 exponent min(4, n h / p). */
export type HcType = 'HC0' | 'HC1' | 'HC2' | 'HC3' | 'HC4';

/** Standard errors that allow the residual spread to differ from row to row. */
export interface RobustStandardErrors {
  /** p coefficients, intercept first; null with a reason. */
  readonly coefficients: Float64Array | null;
  readonly se: Float64Array | null;
  readonly t: Float64Array | null;
  /** Two-sided, from t with df = n - p. */
  readonly p: Float64Array | null;
  readonly df: number;
  /** Why something is null. */
  readonly reason?: string;
}

/** Leverage this close to 1 is 1 with rounding. */
const FULL_LEVERAGE = 1 - 1e-10;

/**
 * Standard errors of least-squares coefficients from squared residuals row by row.
 * @param y outcome (n, any unit)
 * @param predictors vectors of n numbers each
 * @param options hc: HC0 to HC4 ('HC4')
 * @returns coefficients, SE, t, p; null with a reason when coefficients are not determined, no degrees of freedom are left,
 *   the fit is exact, or (HC2 to HC4) a row has leverage 1
 * @throws RangeError when lengths differ, a number is not finite or *hc* is none of the five
 * @source White 1980 (HC0); MacKinnon & White 1985, J. Econometrics 29, 305-325 (HC1-HC3); Cribari-Neto 2004, Comput. Stat.
 *   Data Anal. 45, 215-233 (HC4): (X'X)^-1 X' diag(w e^2) X (X'X)^-1
 * @checked outside check cases robust_standard_errors, relative 1e-9
 */
export function robustStandardErrors(
  y: Float64Array,
  predictors: readonly Float64Array[],
  options: { readonly hc?: HcType } = {},
): RobustStandardErrors {
  const hc = options.hc ?? 'HC4';
  if (!/^HC[0-4]$/.test(hc)) throw new RangeError(`*hc* must be HC0, HC1, HC2, HC3 or HC4; got ${hc}`);
  const model = fitLinear(y, predictors);
  const df = y.length - predictors.length - 1;
  const none = { se: null, t: null, p: null, df };
  if (model.coefficients === null) return { ...none, coefficients: null, reason: model.reason };
  const { coefficients } = model;
  if (df === 0) return { ...none, coefficients, reason: 'as many coefficients as rows: no residual left' };
  if (model.exact) return { ...none, coefficients, reason: 'the fit is exact: no residual spread' };
  const weights = rowWeights(model, hc);
  if (weights === null) {
    return {
      ...none,
      coefficients,
      reason: `a row determines its own fitted value (leverage 1): ${hc} is not defined`,
    };
  }
  const se = sandwich(model, weights);
  if (se.some((value) => !(value > 0))) return { ...none, coefficients, reason: 'a standard error of 0' };
  const t = coefficients.map((value, j) => value / se[j]!);
  return { coefficients, se, t, p: t.map((value) => tTwoSided(value, df)), df };
}

function rowWeights(model: LinearModel, hc: HcType): Float64Array | null {
  const n = model.residuals.length;
  const p = model.coefficients.length;
  if (hc === 'HC0' || hc === 'HC1') return new Float64Array(n).fill(hc === 'HC0' ? 1 : n / (n - p));
  const hat = leverages(model.factors);
  if (hat.some((h) => h > FULL_LEVERAGE)) return null;
  if (hc === 'HC2') return hat.map((h) => 1 / (1 - h));
  if (hc === 'HC3') return hat.map((h) => 1 / (1 - h) ** 2);
  return hat.map((h) => Math.exp(-Math.min(4, (n * h) / p) * Math.log1p(-h)));
}

/** Square roots of the diagonal of (X'X)^-1 X' diag(w e^2) X (X'X)^-1, as sums of squares of rows of X (X'X)^-1. */
function sandwich(model: LinearModel, weights: Float64Array): Float64Array {
  const { design, unscaled, residuals } = model;
  const p = design.cols;
  const total = new Float64Array(p);
  for (let i = 0; i < design.rows; i++) {
    for (let j = 0; j < p; j++) {
      let influence = 0;
      for (let k = 0; k < p; k++) influence += design.data[i * p + k]! * unscaled.data[k * p + j]!;
      total[j] = total[j]! + weights[i]! * (influence * residuals[i]!) ** 2;
    }
  }
  return total.map(Math.sqrt);
}
