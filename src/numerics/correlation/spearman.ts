import type { Alternative } from '../inference.ts';
import { ranks } from '../order.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { spearmanLower, spearmanUpper } from '../tails/spearman.ts';
import { correlationTest, productMoment } from './correlation-test.ts';

/** Rank correlation with its p. */
export interface SpearmanCorrelation {
  /** Between -1 and 1; null with a reason. */
  readonly rho: number | null;
  /** Pairs. */
  readonly n: number;
  /** Sum of squared rank differences. */
  readonly s: number | null;
  readonly p: number | null;
  /** How p was found: all orders counted (to 9 pairs), the Edgeworth series beyond, or t on n - 2 df. */
  readonly pHow: 'counted' | 'series' | 't' | null;
  /** Why rho or p is null. */
  readonly reason?: string;
}

/** Up to this many pairs all orders are counted. */
const COUNTED_TO = 9;

/**
 * Correlation of midranks, with p from all permutations (no ties) or from t on n - 2 df.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options method: 'exact' or 't' ('t'); direction
 * @returns rho, S = sum of squared rank differences, p; null with a reason for fewer than 3 pairs or a vector that does
 *   not vary; exact p null with a reason with ties
 * @throws RangeError when lengths differ or a score is not finite
 * @source Spearman 1904, Am. J. Psychol. 15, 72-101; two-sided exact p = twice the smaller tail of S, at most 1
 * @checked outside check cases spearman_correlation, relative 1e-9
 */
export function spearmanCorrelation(
  x: Float64Array,
  y: Float64Array,
  options: { readonly method?: 'exact' | 't'; readonly alternative?: Alternative } = {},
): SpearmanCorrelation {
  const { method = 't', alternative = 'two-sided' } = options;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  const n = x.length;
  if (n < 3) return { rho: null, n, s: null, p: null, pHow: null, reason: 'fewer than 3 pairs' };
  const rx = ranks(x);
  const ry = ranks(y);
  const found = productMoment(rx.ranks, ry.ranks);
  if (found.r === null) return { rho: null, n, s: null, p: null, pHow: null, reason: `${found.flat} does not vary` };
  const s = rx.ranks.reduce((total, rank, i) => total + (rank - ry.ranks[i]!) ** 2, 0);
  if (method === 't') {
    const test = correlationTest(found.r, n, n - 2, alternative);
    return { rho: found.r, n, s, p: test.p, pHow: 't' };
  }
  if (rx.tieSum > 0 || ry.tieSum > 0)
    return { rho: found.r, n, s, p: null, pHow: null, reason: 'no exact p with ties' };
  return { rho: found.r, n, s, p: exactP(s, n, alternative), pHow: n <= COUNTED_TO ? 'counted' : 'series' };
}

function exactP(s: number, n: number, alternative: Alternative): number {
  // A small sum of squared differences means ranks that run together.
  if (alternative === 'greater') return spearmanLower(s, n);
  if (alternative === 'less') return spearmanUpper(s, n);
  return Math.min(1, 2 * Math.min(spearmanLower(s, n), spearmanUpper(s, n)));
}
