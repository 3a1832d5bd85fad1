import { type Limits, limits, outside, type TestOptions } from '../inference.ts';
import { sorted } from '../order.ts';
import { requireScores } from '../scores.ts';
import { normalQuantileUpper } from '../tails/normal.ts';

export interface CliffsDeltaOptions extends TestOptions {
  /** Estimate of the variance: 'consistent' (default) or 'unbiased' (never below (1 - delta^2)/(n1 n2 - 1)). */
  readonly variance?: 'consistent' | 'unbiased';
}

export interface CliffsDelta {
  /** P(first > second) - P(first < second), -1 to 1. */
  readonly value: number;
  /** P(first > second) + .5 P(equal), 0 to 1. */
  readonly superiority: number;
  readonly variance: number | null;
  readonly interval: Limits | null;
  readonly reason?: string;
}

/** For each score: how many of the other group lie below minus how many lie above, and how many are equal. */
function dominance(x: Float64Array, other: Float64Array): { net: Float64Array; ties: number } {
  const s = sorted(other);
  let ties = 0;
  const net = x.map((score) => {
    const below = countBelow(s, score, false);
    const upTo = countBelow(s, score, true);
    ties += upTo - below;
    return below + upTo - s.length;
  });
  return { net, ties };
}

function countBelow(s: Float64Array, score: number, orEqual: boolean): number {
  let low = 0;
  let high = s.length;
  while (low < high) {
    const middle = (low + high) >> 1;
    const value = s[middle] as number;
    if (value < score || (orEqual && value === score)) low = middle + 1;
    else high = middle;
  }
  return low;
}

function squaredDeviations(net: Float64Array, size: number, delta: number): number {
  let squares = 0;
  for (const value of net) squares += (value / size - delta) * (value / size - delta);
  return squares;
}

/**
 * Cliff's delta of two independent groups.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @param options `variance` estimate, direction, level
 * @returns value delta, superiority, variance, interval; interval null with a reason for a group of one or when the
 *   groups do not overlap
 * @throws RangeError when a group is empty or not finite, or the level is out of range
 * @source Cliff (1996): variances of the row and column means of sign(x - y); limits
 *   (delta - delta^3 -+ z s sqrt((1-delta^2)^2 + z^2 s^2)) / (1 - delta^2 + z^2 s^2)
 * @checked cases `cliffs_delta`, rtol 1e-9
 */
export function cliffsDelta(x: Float64Array, y: Float64Array, options: CliffsDeltaOptions = {}): CliffsDelta {
  requireScores(x);
  requireScores(y, 1, 'y');
  const n1 = x.length;
  const n2 = y.length;
  const rows = dominance(x, y);
  const columns = dominance(y, x);
  const value = rows.net.reduce((total, one) => total + one, 0) / (n1 * n2);
  const none = { value, superiority: (value + 1) / 2, variance: null, interval: null };
  if (n1 < 2 || n2 < 2) return { ...none, reason: 'a condition has only one score' };
  const s1 = squaredDeviations(rows.net, n2, value);
  const s2 = squaredDeviations(columns.net, n1, -value);
  const all = n1 * n2 - rows.ties - n1 * n2 * value * value;
  const variance =
    options.variance === 'unbiased'
      ? Math.max(
          (n2 * n2 * s1 + n1 * n1 * s2 - all) / (n1 * n2 * (n1 - 1) * (n2 - 1)),
          (1 - value * value) / (n1 * n2 - 1),
        )
      : (((n2 - 1) * s1) / (n1 - 1) + ((n1 - 1) * s2) / (n2 - 1) + all / (n1 * n2 - 1)) / (n1 * n2);
  if (Math.abs(value) === 1) return { ...none, variance, reason: 'the scores of the two conditions do not overlap' };
  return { ...none, variance, interval: deltaLimits(value, variance, options) };
}

function deltaLimits(delta: number, variance: number, options: TestOptions): Limits {
  const { level = 0.95, alternative = 'two-sided' } = options;
  const z = normalQuantileUpper(outside(level, alternative));
  const reach = z * z * variance;
  const rest = 1 - delta * delta;
  const half = Math.sqrt(reach) * Math.sqrt(rest * rest + reach);
  return limits((delta * rest - half) / (rest + reach), (delta * rest + half) / (rest + reach), alternative);
}
