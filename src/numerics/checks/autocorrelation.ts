import { largestSize, noSpread } from '../inference.ts';
import { mean } from '../moments.ts';
import { durbinWatsonRatio } from '../regression/durbin-watson.ts';
import { requireScores } from '../scores.ts';

/** Correlation of scores with later ones, in row order; null with a reason. */
export interface Autocorrelation {
  /** Lags 1 to *lags*, each between -1 and 1. */
  readonly r: Float64Array | null;
  /** Durbin-Watson ratio of the scores measured from their mean. */
  readonly durbinWatson: number | null;
  readonly reason?: string;
}

/**
 * Autocorrelations of scores in the order of collection.
 * @param x scores (n, any unit)
 * @param options lags: largest lag, 1 to n - 1
 * @returns r_1 to r_lags and the Durbin-Watson ratio; null with a reason when the scores do not vary
 * @throws RangeError when a score is not finite or *lags* is not a whole number from 1 to n - 1
 * @source Box & Jenkins 1976, Time Series Analysis, 2.1.5: sum (x_t - m)(x_{t+k} - m) / sum (x_t - m)^2
 * @checked outside check cases autocorrelation, relative 1e-9
 */
export function autocorrelation(x: Float64Array, options: { readonly lags: number }): Autocorrelation {
  const { lags } = options;
  requireScores(x, 2);
  const n = x.length;
  if (!Number.isInteger(lags) || lags < 1 || lags >= n) {
    throw new RangeError(`*lags* must be a whole number from 1 to ${n - 1}; got ${lags}`);
  }
  const center = mean(x);
  const d = x.map((score) => score - center);
  if (noSpread(largestSize(d), largestSize(x))) return { r: null, durbinWatson: null, reason: 'all scores are equal' };
  const total = product(d, 0);
  const r = Float64Array.from({ length: lags }, (_, i) => product(d, i + 1) / total);
  return { r, durbinWatson: durbinWatsonRatio(d) };
}

function product(d: Float64Array, lag: number): number {
  let total = 0;
  for (let i = lag; i < d.length; i++) total += d[i]! * d[i - lag]!;
  return total;
}
