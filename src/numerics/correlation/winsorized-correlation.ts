import type { Alternative } from '../inference.ts';
import { requirePairs, requireScores, trimCount } from '../scores.ts';
import { winsorized } from '../winsorized.ts';
import { type Correlation, correlationTest, noCorrelation, productMoment } from './correlation-test.ts';

/**
 * Correlation of scores winsorized on each variable by itself.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options trim: integer percentage at each end, 0 to 49 (20); direction
 * @returns r, t, df = h - 2 with h = n - 2g, p; null with a reason for fewer than 3 pairs or a vector that does not vary
 *   after winsorizing; p null with a reason when h < 3
 * @throws RangeError when lengths differ, a score is not finite or *trim* is not 0 to 49
 * @source Wilcox 2012, Introduction to Robust Estimation and Hypothesis Testing, 9.3.2: t = r sqrt((n-2)/(1-r^2)), h - 2 df
 * @checked outside check cases winsorized_correlation, relative 1e-9
 */
export function winsorizedCorrelation(
  x: Float64Array,
  y: Float64Array,
  options: { readonly trim?: number; readonly alternative?: Alternative } = {},
): Correlation {
  const { trim = 20, alternative = 'two-sided' } = options;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  const n = x.length;
  const h = n - 2 * trimCount(n, trim);
  if (n < 3) return noCorrelation(n, 'fewer than 3 pairs');
  const found = productMoment(winsorized(x, trim), winsorized(y, trim));
  if (found.r === null) return noCorrelation(n, `${found.flat} does not vary after winsorizing`);
  if (h < 3) return noCorrelation(n, `${h} of ${n} pairs left after winsorizing`, found.r);
  return correlationTest(found.r, n, h - 2, alternative);
}
