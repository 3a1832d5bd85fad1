import { type Alternative, normalP } from '../inference.ts';
import { requirePairs, requireScores } from '../scores.ts';
import { kendallLower, kendallUpper } from '../tails/kendall.ts';
import { type TieCounts, tieCounts } from './tie-counts.ts';

/** Kendall's tau-b with its p. */
export interface KendallCorrelation {
  /** Between -1 and 1; null with a reason. */
  readonly tau: number | null;
  /** Pairs of scores. */
  readonly n: number;
  /** Concordant minus discordant. */
  readonly s: number;
  /** S over its standard deviation with ties; null with the exact p. */
  readonly z: number | null;
  readonly p: number | null;
  /** Why tau or p is null. */
  readonly reason?: string;
}

/** Counting concordant pairs of all orders ends here. */
const MOST_EXACT = 1000;

/**
 * Tau-b, with p from all permutations (no ties) or from the normal distribution with the variance that ties leave.
 * @param x scores (n, any unit)
 * @param y scores paired with *x*
 * @param options method: 'exact' or 'asymptotic' ('asymptotic'); direction
 * @returns tau, S, z, p; null with a reason for fewer than 2 pairs or a vector that does not vary; exact p null with ties
 *   or beyond 1000 pairs
 * @throws RangeError when lengths differ or a score is not finite
 * @source Kendall 1945, Biometrika 33, 239-251: tau_b = S / sqrt((n0 - n1)(n0 - n2)); variance of S with ties (Kendall
 *   1970, Rank Correlation Methods, 4.9), no continuity correction; exact: twice the smaller tail of the concordant pairs
 * @checked outside check cases kendall_tau_b, relative 1e-9
 */
export function kendallTau(
  x: Float64Array,
  y: Float64Array,
  options: { readonly method?: 'exact' | 'asymptotic'; readonly alternative?: Alternative } = {},
): KendallCorrelation {
  const { method = 'asymptotic', alternative = 'two-sided' } = options;
  requirePairs(x, y);
  requireScores(x, 0);
  requireScores(y, 0, 'y');
  const n = x.length;
  if (n < 2) return { tau: null, n, s: 0, z: null, p: null, reason: 'fewer than 2 pairs' };
  const s = concordance(x, y);
  const tx = tieCounts(x);
  const ty = tieCounts(y);
  const all = n * (n - 1);
  if (tx.pairs === all || ty.pairs === all) {
    return { tau: null, n, s, z: null, p: null, reason: `${tx.pairs === all ? 'x' : 'y'} does not vary` };
  }
  const tau = Math.max(-1, Math.min(1, (2 * s) / Math.sqrt(all - tx.pairs) / Math.sqrt(all - ty.pairs)));
  if (method === 'exact') {
    if (tx.pairs + ty.pairs > 0) return { tau, n, s, z: null, p: null, reason: 'no exact p with ties' };
    if (n > MOST_EXACT) return { tau, n, s, z: null, p: null, reason: `no exact p beyond ${MOST_EXACT} pairs` };
    return { tau, n, s, z: null, p: exactP((all / 2 + s) / 2, n, alternative) };
  }
  const z = s / Math.sqrt(tiedVariance(n, tx, ty));
  return { tau, n, s, z, p: normalP(z, alternative) };
}

/**
 * Concordant minus discordant pairs; pairs tied in either vector count for neither.
 * @param x scores (n)
 * @param y scores paired with *x*
 * @returns S, a whole number
 * @source Kendall 1938, Biometrika 30, 81-93
 * @checked by hand, exact
 */
export function concordance(x: Float64Array, y: Float64Array): number {
  let s = 0;
  for (let i = 1; i < x.length; i++) {
    const xi = x[i]!;
    const yi = y[i]!;
    for (let j = 0; j < i; j++) {
      const product = (xi - x[j]!) * (yi - y[j]!);
      if (product > 0) s++;
      else if (product < 0) s--;
    }
  }
  return s;
}

function tiedVariance(n: number, tx: TieCounts, ty: TieCounts): number {
  const base = (n * (n - 1) * (2 * n + 5) - tx.spread - ty.spread) / 18;
  const second = (tx.pairs * ty.pairs) / (2 * n * (n - 1));
  const third = n > 2 ? (tx.triples * ty.triples) / (9 * n * (n - 1) * (n - 2)) : 0;
  return base + second + third;
}

function exactP(concordant: number, n: number, alternative: Alternative): number {
  const atLeast = concordant === 0 ? 1 : kendallUpper(concordant - 1, n);
  if (alternative === 'greater') return atLeast;
  const atMost = kendallLower(concordant, n);
  return alternative === 'less' ? atMost : Math.min(1, 2 * Math.min(atMost, atLeast));
}
