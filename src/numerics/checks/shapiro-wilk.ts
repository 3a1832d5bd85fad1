import { noSpread } from '../inference.ts';
import { sorted } from '../order.ts';
import { requireScores } from '../scores.ts';
import { normalQuantile, normalUpper } from '../tails/normal.ts';

/** W between 0 and 1 (1 = as normal scores would lie) and its p; null with a reason. */
export interface ShapiroWilk {
  readonly w: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/** Polynomials of Royston's algorithm, constant term first. */
const A_LAST = [0, 0.221157, -0.147981, -2.07119, 4.434685, -2.706056];
const A_SECOND = [0, 0.042981, -0.293762, -1.752461, 5.682633, -3.582633];
const GAMMA = [-2.273, 0.459];
const SMALL_MEAN = [0.544, -0.39978, 0.025054, -6.714e-4];
const SMALL_LOG_SD = [1.3822, -0.77857, 0.062767, -0.0020322];
const LARGE_MEAN = [-1.5861, -0.31082, -0.083751, 0.0038915];
const LARGE_LOG_SD = [-0.4803, -0.082676, 0.0030302];

/**
 * Shapiro-Wilk check of normal scores.
 * @param x scores (n from 3 to 5000, any unit)
 * @returns W and p; null with a reason outside 3 to 5000 scores or when all are equal
 * @throws RangeError when a score is not finite
 * @source Royston 1995, Appl. Stat. 44, 547-551 (AS R94): W = (sum a_i x_(i))^2 / SS, p from a normal score of log(1 - W)
 * @checked outside check cases shapiro_wilk, W 1e-8, p 1e-6 relative
 */
export function shapiroWilk(x: Float64Array): ShapiroWilk {
  requireScores(x, 0);
  const n = x.length;
  if (n < 3) return { w: null, p: null, reason: 'fewer than 3 scores' };
  if (n > 5000) return { w: null, p: null, reason: 'more than 5000 scores: the approximation ends there' };
  const s = sorted(x);
  const range = s[n - 1]! - s[0]!;
  if (noSpread(range, Math.max(-s[0]!, s[n - 1]!))) return { w: null, p: null, reason: 'all scores are equal' };
  const missing = missingShare(s, range, weightsOf(n));
  return { w: 1 - missing, p: pOf(missing, n) };
}

/** Weights last used: a sweep checks many samples of one size. */
let last: { readonly n: number; readonly weights: Float64Array } = { n: 0, weights: new Float64Array(0) };

function weightsOf(n: number): Float64Array {
  if (last.n !== n) last = { n, weights: weights(n) };
  return last.weights;
}

/** Weights of the upper half, largest score first; the lower half has the opposite sign. */
function weights(n: number): Float64Array {
  if (n === 3) return Float64Array.of(Math.SQRT1_2);
  const half = n >> 1;
  const m = Float64Array.from({ length: half }, (_, i) => -normalQuantile((i + 1 - 0.375) / (n + 0.25)));
  const total = 2 * m.reduce((all, value) => all + value * value, 0);
  const root = Math.sqrt(total);
  const u = 1 / Math.sqrt(n);
  const first = valueAt(A_LAST, u) + m[0]! / root;
  if (n <= 5) {
    const scale = Math.sqrt((total - 2 * m[0]! ** 2) / (1 - 2 * first * first));
    return m.map((value, i) => (i === 0 ? first : value / scale));
  }
  const second = valueAt(A_SECOND, u) + m[1]! / root;
  const left = total - 2 * m[0]! ** 2 - 2 * m[1]! ** 2;
  const scale = Math.sqrt(left / (1 - 2 * first * first - 2 * second * second));
  return m.map((value, i) => (i === 0 ? first : i === 1 ? second : value / scale));
}

/** 1 - W, computed so that it keeps its digits when W is close to 1. */
function missingShare(s: Float64Array, range: number, a: Float64Array): number {
  const n = s.length;
  const low = s[0]!;
  // Shares of the range keep sums of any size of score in hand.
  let total = 0;
  for (let i = 0; i < n; i++) total += (s[i]! - low) / range;
  const center = total / n;
  let aa = 0;
  let xx = 0;
  let ax = 0;
  for (let i = 0; i < n; i++) {
    const mirror = n - 1 - i;
    const weight = i === mirror ? 0 : i < mirror ? -a[i]! : a[mirror]!;
    const d = (s[i]! - low) / range - center;
    aa += weight * weight;
    xx += d * d;
    ax += weight * d;
  }
  const both = Math.sqrt(aa * xx);
  return Math.max(0, ((both - ax) * (both + ax)) / (aa * xx));
}

function pOf(missing: number, n: number): number {
  if (n === 3) {
    const smallest = Math.asin(Math.sqrt(0.75));
    return Math.min(1, Math.max(0, (6 / Math.PI) * (Math.asin(Math.sqrt(1 - missing)) - smallest)));
  }
  if (missing === 0) return 1;
  const log = Math.log(missing);
  if (n > 11) {
    const u = Math.log(n);
    return normalUpper((log - valueAt(LARGE_MEAN, u)) / Math.exp(valueAt(LARGE_LOG_SD, u)));
  }
  const gamma = valueAt(GAMMA, n);
  // Beyond gamma the score is not defined; W is then smaller than any that can be told from 0.
  if (log >= gamma) return 1e-99;
  return normalUpper((-Math.log(gamma - log) - valueAt(SMALL_MEAN, n)) / Math.exp(valueAt(SMALL_LOG_SD, n)));
}

function valueAt(coefficients: readonly number[], u: number): number {
  return coefficients.reduceRight((value, coefficient) => value * u + coefficient, 0);
}
