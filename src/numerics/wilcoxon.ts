import type { Alternative } from './inference.ts';
import { ranks } from './order.ts';
import { decimalTies, rankZ, tailP } from './rank-test.ts';
import { requireScores } from './scores.ts';
import { signedRankLower, signedRankTied, signedRankUpper } from './tails/signed-rank.ts';

export interface SignedRankOptions {
  /** Null value of the centre (default 0). */
  readonly mu?: number;
  readonly alternative?: Alternative;
  /** 'drop' (default): zeros are removed before ranking; 'pratt': ranked, then left out. */
  readonly zeroMethod?: 'drop' | 'pratt';
  /**
   * 'exact-conditional' (default): all signs given the midranks, the normal approximation beyond 300 used scores;
   * 'exact': the distribution without ties, undefined with ties or zeros; 'asymptotic': normal.
   */
  readonly method?: 'exact-conditional' | 'exact' | 'asymptotic';
  /** Continuity correction of the normal approximation (default true). */
  readonly correct?: boolean;
}

export interface SignedRankTest {
  /** Sum of the ranks of the positive differences. */
  readonly V: number;
  readonly wMinus: number;
  readonly nZero: number;
  /** Scores other than zero. */
  readonly nUsed: number;
  /** (W+ - W-) / (W+ + W-), -1 to 1. */
  readonly rankBiserial: number | null;
  /** Normal statistic; null for exact p. */
  readonly z: number | null;
  readonly p: number | null;
  /** How p was really found. */
  readonly method: 'exact-conditional' | 'exact' | 'asymptotic';
  readonly reason?: string;
}

/** Beyond this many used scores the conditional distribution is replaced by its normal approximation. */
const LARGEST_EXACT = 300;

interface SignedRanks {
  readonly used: Float64Array;
  readonly V: number;
  readonly wMinus: number;
  readonly nZero: number;
  readonly tied: boolean;
}

function signedRanks(x: Float64Array, mu: number, zeroMethod: 'drop' | 'pratt'): SignedRanks {
  const d = decimalTies(x.map((score) => score - mu));
  const ranked = zeroMethod === 'pratt' ? d : d.filter((value) => value !== 0);
  const all = ranks(ranked.map(Math.abs)).ranks;
  const used = all.filter((_, i) => ranked[i] !== 0);
  let V = 0;
  let wMinus = 0;
  all.forEach((rank, i) => {
    if ((ranked[i] as number) > 0) V += rank;
    if ((ranked[i] as number) < 0) wMinus += rank;
  });
  const tied = new Set(used).size < used.length;
  return { used, V, wMinus, nZero: d.length - used.length, tied };
}

/**
 * Wilcoxon's signed-rank test of scores, or of the differences of pairs.
 * @param x scores or differences, at least one, finite; taken to 10 decimals, so that decimal ties are ties
 * @param options null value, direction, how zeros are treated, how p is found
 * @returns V, wMinus, nZero, nUsed, rankBiserial, z, p; null with a reason when every difference is zero or the exact
 *   distribution does not exist
 * @throws RangeError when empty or not finite
 * @source Wilcoxon (1945); Pratt (1959); conditional distribution: Streitberg & Roehmel (1986); normal variance:
 *   sum of squared midranks / 4 = n(n+1)(2n+1)/24 - sum(t^3-t)/48
 * @checked cases `wilcoxon_signed_rank`, rtol 1e-9
 */
export function signedRankTest(x: Float64Array, options: SignedRankOptions = {}): SignedRankTest {
  requireScores(x);
  const {
    mu = 0,
    alternative = 'two-sided',
    zeroMethod = 'drop',
    method = 'exact-conditional',
    correct = true,
  } = options;
  const { used, V, wMinus, nZero, tied } = signedRanks(x, mu, zeroMethod);
  const n = used.length;
  const counts = { V, wMinus, nZero, nUsed: n, rankBiserial: n === 0 ? null : (V - wMinus) / (V + wMinus) };
  if (n === 0) return { ...counts, z: null, p: null, method, reason: 'all differences are zero' };
  if (method === 'exact') {
    const reason = 'the exact distribution needs differences without ties and zeros';
    if (tied || nZero > 0) return { ...counts, z: null, p: null, method, reason };
    const p = tailP(signedRankLower(V, n), V < 1 ? 1 : signedRankUpper(V - 1, n), alternative);
    return { ...counts, z: null, p, method };
  }
  if (method === 'exact-conditional' && n <= LARGEST_EXACT) {
    const { lower, upper } = signedRankTied(used, V);
    return { ...counts, z: null, p: tailP(lower, upper, alternative), method };
  }
  let squares = 0;
  for (const rank of used) squares += rank * rank;
  const { z, p } = rankZ((V - wMinus) / 2, Math.sqrt(squares / 4), correct, alternative);
  return { ...counts, z, p, method: 'asymptotic' };
}
