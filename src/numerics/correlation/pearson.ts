import { type Limits, requireLevel, type TestOptions } from '../inference.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { type Correlation, correlationTest, fisherInterval, noCorrelation, productMoment } from './correlation-test.ts';

/** Product-moment correlation with test and interval. */
export interface PearsonCorrelation extends Correlation {
  readonly interval: Limits | null;
}

/**
 * Product-moment correlation, its t test against 0 and Fisher's interval.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options level of the interval (.95) and direction
 * @returns r, t, df = n - 2, p, interval; null with a reason for fewer than 3 pairs, or a vector that does not
 *   vary; t and interval null when |r| = 1; interval null for fewer than 4 pairs
 * @throws RangeError when lengths differ, a score is not finite or the level is not between 0 and 1
 * @source Pearson 1896; Fisher 1915, 1921: t = r sqrt((n-2)/(1-r^2)), atanh(r) -+ z / sqrt(n-3)
 * @checked outside check cases pearson_correlation, relative 1e-9
 */
export function pearsonCorrelation(x: Float64Array, y: Float64Array, options: TestOptions = {}): PearsonCorrelation {
  const { level = 0.95, alternative = 'two-sided' } = options;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  requireLevel(level);
  const n = x.length;
  if (n < 3) return { ...noCorrelation(n, 'fewer than 3 pairs'), interval: null };
  const found = productMoment(x, y);
  if (found.r === null) return { ...noCorrelation(n, `${found.flat} does not vary`), interval: null };
  const test = correlationTest(found.r, n, n - 2, alternative);
  if (test.t === null) return { ...test, interval: null };
  if (n < 4) return { ...test, interval: null, reason: 'fewer than 4 pairs: no interval' };
  return { ...test, interval: fisherInterval(found.r, n, { level, alternative }) };
}
