import { fitLinear } from './linear-model.ts';

/**
 * Durbin-Watson ratio of numbers in row order.
 * @param e residuals (n of 2 or more), in row order
 * @returns between 0 and 4, about 2 when neighbours are unrelated; null when all are 0
 * @throws RangeError when there are fewer than two
 * @source Durbin & Watson 1950, Biometrika 37, 409-428: sum (e_t - e_{t-1})^2 / sum e_t^2
 * @checked outside check cases durbin_watson_regression, relative 1e-9
 */
export function durbinWatsonRatio(e: Float64Array): number | null {
  if (e.length < 2) throw new RangeError(`*e* must hold at least 2 residuals; got ${e.length}`);
  let steps = 0;
  let total = e[0]! * e[0]!;
  for (let i = 1; i < e.length; i++) {
    steps += (e[i]! - e[i - 1]!) ** 2;
    total += e[i]! * e[i]!;
  }
  return total > 0 ? steps / total : null;
}

/**
 * Durbin-Watson ratio of the residuals of a least-squares fit, in row order.
 * @param y outcome (n, any unit), in the order of collection
 * @param predictors vectors of n numbers each
 * @returns ratio; null with a reason when the coefficients are not determined or the fit is exact
 * @throws RangeError when lengths differ or a number is not finite
 * @source Durbin & Watson 1950, Biometrika 37, 409-428
 * @checked outside check cases durbin_watson_regression, relative 1e-9
 */
export function durbinWatson(
  y: Float64Array,
  predictors: readonly Float64Array[],
): { readonly ratio: number | null; readonly reason?: string } {
  const model = fitLinear(y, predictors);
  if (model.coefficients === null) return { ratio: null, reason: model.reason };
  if (model.df === 0 || model.exact) return { ratio: null, reason: 'the fit is exact: no residual spread' };
  return { ratio: durbinWatsonRatio(model.residuals) };
}
