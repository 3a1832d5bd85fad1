import { requireScores } from '../scores.ts';

/** Sums over groups of t tied scores. */
export interface TieCounts {
  /** sum t (t - 1). */
  readonly pairs: number;
  /** sum t (t - 1)(t - 2). */
  readonly triples: number;
  /** sum t (t - 1)(2t + 5). */
  readonly spread: number;
}

/**
 * Ties of a vector, as Kendall's variance needs them.
 * @param x scores (n)
 * @returns the three sums, 0 without ties
 * @throws RangeError when a score is not finite
 * @source Kendall 1970, Rank Correlation Methods, 4.9
 * @checked by hand, exact
 */
export function tieCounts(x: Float64Array): TieCounts {
  requireScores(x, 0);
  const s = Float64Array.from(x).sort();
  let pairs = 0;
  let triples = 0;
  let spread = 0;
  for (let start = 0, end = 0; start < s.length; start = end) {
    while (end < s.length && s[end] === s[start]) end++;
    const t = end - start;
    pairs += t * (t - 1);
    triples += t * (t - 1) * (t - 2);
    spread += t * (t - 1) * (2 * t + 5);
  }
  return { pairs, triples, spread };
}
