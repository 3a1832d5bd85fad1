import { requireScores } from '../scores.ts';
import { tQuantileUpper } from '../tails/t.ts';
import { furthest } from './grubbs.ts';

/** Rosner's test for up to r extreme scores. */
export interface GeneralizedEsd {
  /** R_1 .. R_r in standard deviations; shorter than r where the remaining scores were equal; null with a reason. */
  readonly r: Float64Array | null;
  /** lambda_1 .. lambda_r, as many as r. */
  readonly critical: Float64Array | null;
  /** Largest i with R_i > lambda_i; null with a reason. */
  readonly count: number | null;
  /** Indices of the *count* scores, in the order they were taken out. */
  readonly indices: Int32Array;
  /** n marks: 1 = one of the *count* scores. */
  readonly flags: Uint8Array;
  /** Why r is null. */
  readonly reason?: string;
}

/**
 * Generalized extreme studentized deviate: are there up to *most* scores too far out for one normal sample?
 * @param x scores (n of 3 or more, any unit)
 * @param options most: largest number of extreme scores looked for (1 to n - 2); alpha: level, between 0 and 1 (.05)
 * @returns R_i, lambda_i, how many are declared, which; null with a reason for fewer than 3 or equal scores
 * @throws RangeError when *x* holds NaN or an infinity, *most* is not a whole number from 1 to n - 2 or *alpha* is not
 *   between 0 and 1
 * @source Rosner 1983, Technometrics 25, 165-172: lambda_i = (n-i) t / sqrt((n-i-1+t^2)(n-i+1)), t at
 *   alpha / (2 (n-i+1)) with n-i-1 df; count = largest i with R_i > lambda_i
 * @checked outside check cases generalized_esd, relative 1e-9
 */
export function generalizedEsd(
  x: Float64Array,
  options: { readonly most: number; readonly alpha?: number },
): GeneralizedEsd {
  const { most, alpha = 0.05 } = options;
  requireScores(x, 0);
  const n = x.length;
  if (!Number.isInteger(most) || most < 1)
    throw new RangeError(`*most* must be a whole number of 1 or more; got ${most}`);
  if (!(alpha > 0 && alpha < 1)) throw new RangeError(`*alpha* must be between 0 and 1; got ${alpha}`);
  if (n < 3) return undefinedEsd(n, 'fewer than 3 scores');
  if (most > n - 2) throw new RangeError(`*most* must be at most n - 2 = ${n - 2}; got ${most}`);
  const taken = takeFurthest(x, most);
  if (taken.length === 0) return undefinedEsd(n, 'all scores are equal');
  const r = Float64Array.from(taken, (step) => step.distance);
  const critical = r.map((_, i) => criticalValue(n, i + 1, alpha));
  const count = r.reduce((largest, value, i) => (value > critical[i]! ? i + 1 : largest), 0);
  const indices = Int32Array.from(taken.slice(0, count), (step) => step.index);
  const flags = new Uint8Array(n);
  for (const index of indices) flags[index] = 1;
  return { r, critical, count, indices, flags };
}

function undefinedEsd(n: number, reason: string): GeneralizedEsd {
  return { r: null, critical: null, count: null, indices: new Int32Array(0), flags: new Uint8Array(n), reason };
}

function takeFurthest(x: Float64Array, most: number): { distance: number; index: number }[] {
  const left = Array.from(x.keys());
  const taken: { distance: number; index: number }[] = [];
  for (let i = 0; i < most; i++) {
    const extreme = furthest(Float64Array.from(left, (index) => x[index]!));
    if (extreme === null) break;
    taken.push({ distance: extreme.distance, index: left[extreme.index]! });
    left.splice(extreme.index, 1);
  }
  return taken;
}

function criticalValue(n: number, i: number, alpha: number): number {
  const df = n - i - 1;
  const t = tQuantileUpper(alpha / (2 * (n - i + 1)), df);
  return ((n - i) * t) / Math.sqrt((df + t * t) * (n - i + 1));
}
