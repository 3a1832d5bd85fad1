import { type Limits, largestSize, noSpread, type TestOptions } from '../inference.ts';
import { mean, variance } from '../moments.ts';
import { requireScores } from '../scores.ts';
import { type Effect, noncentralInterval } from './effect.ts';

export interface CohensDOptions extends TestOptions {
  /** SD that divides: 'pooled' (default), 'average' (root of the mean variance) or 'second' (the second condition's). */
  readonly denominator?: 'pooled' | 'average' | 'second';
}

const denominators = {
  pooled: (v1: number, v2: number, n1: number, n2: number) => ((n1 - 1) * v1 + (n2 - 1) * v2) / (n1 + n2 - 2),
  average: (v1: number, v2: number) => (v1 + v2) / 2,
  second: (_v1: number, v2: number) => v2,
};

/**
 * Standardized difference of two independent means, first minus second.
 * @param x scores of the first group, at least two, finite
 * @param y scores of the second group, at least two, finite
 * @param options `denominator`, direction, level
 * @returns value d; interval by inverting the noncentral t ('pooled' only, else null); null with a reason for a group of
 *   one or an SD of 0
 * @throws RangeError when a group is empty or not finite, or the level is out of range
 * @source Cohen (1988): d = (mean1 - mean2) / SD; interval: Hedges & Olkin (1985)
 * @checked cases `cohens_d`, rtol 1e-9, limits 1e-8
 */
export function cohensD(x: Float64Array, y: Float64Array, options: CohensDOptions = {}): Effect {
  requireScores(x);
  requireScores(y, 1, 'y');
  const { denominator = 'pooled', level = 0.95, alternative = 'two-sided' } = options;
  const n1 = x.length;
  const n2 = y.length;
  if (n1 < 2 || n2 < 2) return { value: null, interval: null, reason: 'a condition has only one score' };
  const sd = Math.sqrt(denominators[denominator](variance(x), variance(y), n1, n2));
  if (noSpread(sd, largestSize(x, y))) {
    const whose = denominator === 'second' ? 'the second condition' : 'each condition';
    return { value: null, interval: null, reason: `all scores within ${whose} are equal` };
  }
  const value = (mean(x) - mean(y)) / sd;
  if (denominator !== 'pooled') return { value, interval: null };
  const scale = Math.sqrt((n1 * n2) / (n1 + n2));
  const interval: Limits = noncentralInterval(value * scale, n1 + n2 - 2, scale, level, alternative);
  return { value, interval };
}
