import { largestSize, noSpread } from '../inference.ts';
import { sumOfSquares } from '../moments.ts';
import { applyQt } from '../qr.ts';
import { chiSquareUpper } from '../tails/chi-square.ts';
import { fitLinear } from './linear-model.ts';

/** Whether squared residuals run with the predictors; null with a reason. */
export interface BreuschPagan {
  readonly chi2: number | null;
  readonly df: number;
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * Breusch-Pagan check of equal residual spread, in the form that does not assume normal residuals.
 * @param y outcome (n, any unit)
 * @param predictors vectors of n numbers each, at least one
 * @returns chi2 = n R^2 of the squared residuals on the predictors, df, p; null with a reason when the coefficients are not
 *   determined, the fit is exact or all squared residuals are equal
 * @throws RangeError when there is no predictor, lengths differ or a number is not finite
 * @source Koenker 1981, J. Econometrics 17, 107-112: n R^2
 * @checked outside check cases breusch_pagan, relative 1e-9
 */
export function breuschPagan(y: Float64Array, predictors: readonly Float64Array[]): BreuschPagan {
  const df = predictors.length;
  if (df === 0) throw new RangeError('*predictors* must hold at least 1 vector; got 0');
  const model = fitLinear(y, predictors);
  if (model.coefficients === null) return { chi2: null, df, p: null, reason: model.reason };
  if (model.df === 0 || model.exact) return { chi2: null, df, p: null, reason: 'the fit is exact: no residual spread' };
  const squared = model.residuals.map((e) => e * e);
  const total = sumOfSquares(squared);
  if (noSpread(Math.sqrt(total / y.length), largestSize(squared))) {
    return { chi2: null, df, p: null, reason: 'all squared residuals are equal' };
  }
  // The explained part itself: as total minus rest it would lose its digits when it is small.
  const along = applyQt(model.factors, squared).subarray(1, df + 1);
  const chi2 = (y.length * along.reduce((sum, part) => sum + part * part, 0)) / total;
  return { chi2, df, p: chiSquareUpper(chi2, df) };
}
