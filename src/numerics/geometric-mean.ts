import { type Limits, type TestOptions, tInterval } from './inference.ts';
import { mean, standardDeviation } from './moments.ts';
import { requireScores } from './scores.ts';

export interface GeometricMean {
  readonly estimate: number | null;
  /** exp of the t interval of the mean of the logs. */
  readonly interval: Limits | null;
  /** exp of the SD of the logs: a factor. */
  readonly geometricSd: number | null;
  readonly harmonicMean: number | null;
  readonly reason?: string;
}

/**
 * Geometric mean with its interval, and the harmonic mean.
 * @param x scores, at least one, finite
 * @param options direction, level
 * @returns estimate = exp(mean of logs), interval, geometricSd, harmonicMean; all null with a reason when a score is not
 *   above 0; interval and geometricSd null for a single score
 * @throws RangeError when empty, not finite, or the level is out of range
 * @source common practice: the t interval on the log scale, transformed back
 * @checked cases `geometric_mean`, rtol 1e-9
 */
export function geometricMean(x: Float64Array, options: TestOptions = {}): GeometricMean {
  requireScores(x);
  if (x.some((score) => score <= 0)) {
    const reason = 'a score is not above 0';
    return { estimate: null, interval: null, geometricSd: null, harmonicMean: null, reason };
  }
  const n = x.length;
  const logs = x.map(Math.log);
  const center = mean(logs);
  const estimate = Math.exp(center);
  const harmonicMean = 1 / mean(x.map((score) => 1 / score));
  if (n < 2) return { estimate, interval: null, geometricSd: null, harmonicMean, reason: 'only one score' };
  const sd = standardDeviation(logs);
  const [low, high] = sd === 0 ? [center, center] : tInterval(center, sd / Math.sqrt(n), n - 1, options);
  const interval: Limits = [low === null ? null : Math.exp(low), high === null ? null : Math.exp(high)];
  return { estimate, interval, geometricSd: Math.exp(sd), harmonicMean };
}
