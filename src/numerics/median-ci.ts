import { type Limits, outside, type TestOptions } from './inference.ts';
import { medianSorted, sorted } from './order.ts';
import { requireScores } from './scores.ts';
import { binomialLower, binomialMass, binomialQuantile } from './tails/binomial.ts';

export interface MedianInterval {
  readonly estimate: number;
  readonly interval: Limits | null;
  /** Ranks of the limits, 1 to n; null for the interpolated interval or without one. */
  readonly ranks: readonly [number, number] | null;
  /** Confidence the interval really has; null without an interval. */
  readonly coverage: number | null;
  readonly reason?: string;
}

/** P(x_(k) <= population median <= x_(n-k+1)), one or both limits counted. */
function coverageOf(k: number, n: number, sides: number): number {
  return k < 1 ? 1 : 1 - sides * binomialLower(k - 1, n, 0.5);
}

/** Limit between order statistics k and k + 1 counted from one end. */
function interpolated(s: Float64Array, k: number, n: number, miss: number, sides: number): [number, number] {
  const wide = coverageOf(k, n, sides);
  const share = (wide - 1 + sides * miss) / (sides * binomialMass(k, n, 0.5));
  const weight = ((n - k) * share) / (k + (n - 2 * k) * share);
  const mix = (outer: number, inner: number) => weight * inner + (1 - weight) * outer;
  return [mix(s[k - 1] as number, s[k] as number), mix(s[n - k] as number, s[n - k - 1] as number)];
}

/**
 * Interval of a population median from order statistics, of scores or of differences.
 * @param x scores, at least one, finite
 * @param options level, direction, and `variant`: 'exact-conservative' (default; covers at least the level) or
 *   'interpolated' (close to the level)
 * @returns estimate (median), interval, ranks, coverage; no interval, with a reason, when no rank reaches the level
 * @throws RangeError when empty, not finite, or the level is out of range
 * @source common practice: [x_(k), x_(n-k+1)], k the binomial(n, 1/2) quantile at the tail; interpolated: Hettmansperger &
 *   Sheather (1986)
 * @checked cases `median_ci`, rtol 1e-9
 */
export function medianInterval(
  x: Float64Array,
  options: TestOptions & { readonly variant?: 'exact-conservative' | 'interpolated' } = {},
): MedianInterval {
  requireScores(x);
  const { level = 0.95, alternative = 'two-sided', variant = 'exact-conservative' } = options;
  const s = sorted(x);
  const n = s.length;
  const estimate = medianSorted(s);
  const miss = outside(level, alternative);
  const sides = alternative === 'two-sided' ? 2 : 1;
  const k = binomialQuantile(miss, n, 0.5);
  if (k < 1) return { estimate, interval: null, ranks: null, coverage: null, reason: 'too few scores for this level' };
  const keep = ([low, high]: [number, number]): Limits => [
    alternative === 'less' ? null : low,
    alternative === 'greater' ? null : high,
  ];
  if (variant === 'interpolated') {
    return { estimate, interval: keep(interpolated(s, k, n, miss, sides)), ranks: null, coverage: level };
  }
  const interval = keep([s[k - 1] as number, s[n - k] as number]);
  return { estimate, interval, ranks: [k, n - k + 1], coverage: coverageOf(k, n, sides) };
}
