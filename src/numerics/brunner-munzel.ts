import { type Limits, normalInterval, normalP, type TestOptions, tInterval, tP } from './inference.ts';
import { pooled } from './mann-whitney.ts';
import { mean, sum } from './moments.ts';
import { ranks } from './order.ts';
import { requireScores } from './scores.ts';

export interface BrunnerMunzelTest {
  /** P(first < second) + .5 P(equal). */
  readonly pHat: number;
  /** Standard error of pHat. */
  readonly se: number | null;
  /** Positive when the SECOND group tends to have larger scores. */
  readonly statistic: number | null;
  /** Null with the normal distribution. */
  readonly df: number | null;
  readonly p: number | null;
  /** Limits of pHat, not cut at 0 and 1. */
  readonly interval: Limits | null;
  readonly reason?: string;
}

/** Variance of the placements: overall ranks minus ranks within the own group. */
function placementVariance(overall: Float64Array, within: Float64Array): number {
  const n = overall.length;
  const placements = overall.map((rank, i) => rank - (within[i] as number));
  const center = sum(placements) / n;
  return sum(placements.map((value) => (value - center) * (value - center))) / (n - 1);
}

/**
 * Brunner-Munzel test of P(first < second) + .5 P(equal) = .5, spreads may differ.
 * @param x scores of the first group, at least two, finite
 * @param y scores of the second group, at least two, finite
 * @param options direction ('greater': the FIRST group tends to be larger, pHat below .5), level, and `distribution` 't'
 *   (default, Satterthwaite df) or 'normal'
 * @returns pHat, se, statistic, df, p, interval of pHat (for 'greater' an upper limit only); null with a reason for a
 *   group of one or complete separation
 * @throws RangeError when a group is empty or not finite, or the level is out of range
 * @source Brunner & Munzel (2000): W = n1 n2 (R2 - R1) / (N sqrt(n1 S1^2 + n2 S2^2))
 * @checked cases `brunner_munzel`, rtol 1e-9
 */
export function brunnerMunzel(
  x: Float64Array,
  y: Float64Array,
  options: TestOptions & { readonly distribution?: 't' | 'normal' } = {},
): BrunnerMunzelTest {
  requireScores(x);
  requireScores(y, 1, 'y');
  const { alternative = 'two-sided', distribution = 't' } = options;
  const n1 = x.length;
  const n2 = y.length;
  const all = ranks(pooled(x, y)).ranks;
  const first = all.subarray(0, n1);
  const second = all.subarray(n1);
  const pHat = 0.5 + (mean(second) - mean(first)) / (n1 + n2);
  const none = { pHat, se: null, statistic: null, df: null, p: null, interval: null };
  if (n1 < 2 || n2 < 2) return { ...none, reason: 'a condition has only one score' };
  const v1 = n1 * placementVariance(first, ranks(x).ranks);
  const v2 = n2 * placementVariance(second, ranks(y).ranks);
  if (v1 + v2 === 0) {
    return {
      ...none,
      reason: pHat === 0.5 ? 'all scores are equal' : 'the scores of the two conditions do not overlap',
    };
  }
  const se = Math.sqrt(v1 + v2) / (n1 * n2);
  const statistic = (pHat - 0.5) / se;
  // The statistic counts the second group, the direction the first.
  const turned = alternative === 'two-sided' ? alternative : alternative === 'greater' ? 'less' : 'greater';
  const own = { ...options, alternative: turned } as const;
  if (distribution === 'normal') {
    return { pHat, se, statistic, df: null, p: normalP(statistic, turned), interval: normalInterval(pHat, se, own) };
  }
  const share = v1 / (v1 + v2);
  const df = 1 / ((share * share) / (n1 - 1) + ((1 - share) * (1 - share)) / (n2 - 1));
  return { pHat, se, statistic, df, p: tP(statistic, df, turned), interval: tInterval(pHat, se, df, own) };
}
