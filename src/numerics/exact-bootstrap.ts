import { type Limits, requireLevel } from './inference.ts';
import { sorted } from './order.ts';
import { requireScores } from './scores.ts';

/** More distinct resamples than this are not enumerated. */
const MOST = 2_000_000;

export interface ExactBootstrap {
  /** Number of distinct resamples, C(2n-1, n). */
  readonly distinct: number;
  readonly mean: number | null;
  /** SD over all n^n resamples (divisor: their number). */
  readonly se: number | null;
  /** Smallest values whose cumulative probability reaches (1-level)/2 and (1+level)/2. */
  readonly interval: Limits | null;
  readonly reason?: string;
}

function logFactorials(n: number): Float64Array {
  const out = new Float64Array(n + 1);
  for (let i = 2; i <= n; i++) out[i] = (out[i - 1] as number) + Math.log(i);
  return out;
}

/** Number of distinct resamples of n scores. */
function distinctResamples(n: number): number {
  let count = 1;
  for (let i = 1; i < n; i++) count = (count * (n + i)) / i;
  return Math.round(count);
}

/** Calls `visit` with every resample, ascending, and its probability. */
function enumerate(s: Float64Array, visit: (resample: Float64Array, probability: number) => void): void {
  const n = s.length;
  const logs = logFactorials(n);
  const base = (logs[n] as number) - n * Math.log(n);
  const out = new Float64Array(n);
  const step = (i: number, at: number, log: number): void => {
    if (i === n - 1) {
      out.fill(s[i] as number, at);
      visit(out, Math.exp(log - (logs[n - at] as number)));
      return;
    }
    for (let c = 0; at + c <= n; c++) {
      if (c > 0) out[at + c - 1] = s[i] as number;
      step(i + 1, at + c, log - (logs[c] as number));
    }
  };
  step(0, 0, base);
}

function quantileOf(values: Float64Array, probabilities: Float64Array, order: Uint32Array, share: number): number {
  let reached = 0;
  for (const i of order) {
    reached += probabilities[i] as number;
    if (reached >= share * (1 - 1e-12)) return values[i] as number;
  }
  return values[order[order.length - 1] as number] as number;
}

/**
 * The ordinary bootstrap without drawing: every resample with its probability. What a drawn bootstrap approaches.
 * @param x scores, at least one, finite
 * @param statistic value of an ascending resample; must not keep or change it
 * @param level confidence level (default .95)
 * @returns distinct, mean, se and percentile interval of the statistic; null with a reason beyond two million distinct
 *   resamples (n > 11)
 * @throws RangeError when empty, not finite, or the level is out of range
 * @source Fisher & Hall (1991): a resample is a composition of n into n counts, with multinomial probability
 * @checked cases `exact_bootstrap`, rtol 1e-9
 */
export function exactBootstrap(
  x: Float64Array,
  statistic: (resample: Float64Array) => number,
  level = 0.95,
): ExactBootstrap {
  requireScores(x);
  requireLevel(level);
  const distinct = distinctResamples(x.length);
  if (distinct > MOST) return { distinct, mean: null, se: null, interval: null, reason: 'too many distinct resamples' };
  const values = new Float64Array(distinct);
  const probabilities = new Float64Array(distinct);
  let at = 0;
  enumerate(sorted(x), (resample, probability) => {
    values[at] = statistic(resample);
    probabilities[at++] = probability;
  });
  let mean = 0;
  for (let i = 0; i < distinct; i++) mean += (probabilities[i] as number) * (values[i] as number);
  let squares = 0;
  for (let i = 0; i < distinct; i++) {
    const gap = (values[i] as number) - mean;
    squares += (probabilities[i] as number) * gap * gap;
  }
  const order = Uint32Array.from(values, (_, i) => i).sort((i, j) => (values[i] as number) - (values[j] as number));
  const limit = (share: number) => quantileOf(values, probabilities, order, share);
  return { distinct, mean, se: Math.sqrt(squares), interval: [limit((1 - level) / 2), limit((1 + level) / 2)] };
}
