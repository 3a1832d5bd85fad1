import { requireScores } from '../scores.ts';
import { normalLogLower } from '../tails/normal.ts';
import { standardScores } from './standard-scores.ts';

/** Anderson-Darling distance from a normal distribution with the sample's mean and SD; null with a reason. */
export interface AndersonDarling {
  readonly a2: number | null;
  /** a2 (1 + .75/n + 2.25/n^2). */
  readonly a2Star: number | null;
  /** Null beyond a2Star = 10, where the formula no longer holds. */
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * Anderson-Darling check of normal scores, mean and SD estimated.
 * @param x scores (n of 3 or more, any unit)
 * @returns A2, A2 adjusted for n, p; null with a reason for fewer than 3 or equal scores; p null when the adjusted A2 is 10
 *   or more
 * @throws RangeError when a score is not finite
 * @source D'Agostino & Stephens 1986, Goodness-of-Fit Techniques, table 4.9: A2 = -n - sum (2i-1)(log F_i + log(1 -
 *   F_(n+1-i))) / n, p by four exponentials
 * @checked outside check cases anderson_darling_normal, relative 1e-9
 */
export function andersonDarling(x: Float64Array): AndersonDarling {
  requireScores(x, 0);
  const n = x.length;
  if (n < 3) return { a2: null, a2Star: null, p: null, reason: 'fewer than 3 scores' };
  const z = standardScores(x);
  if (z === null) return { a2: null, a2Star: null, p: null, reason: 'all scores are equal' };
  let total = 0;
  // Logs of the tails themselves: a score 40 SD out would make a plain tail 0 and its log infinite.
  for (let i = 0; i < n; i++) total += (2 * i + 1) * (normalLogLower(z[i]!) + normalLogLower(-z[n - 1 - i]!));
  const a2 = -n - total / n;
  const a2Star = a2 * (1 + 0.75 / n + 2.25 / (n * n));
  if (a2Star >= 10)
    return { a2, a2Star, p: null, reason: 'too far from normal for the p formula (adjusted A2 of 10 or more)' };
  return { a2, a2Star, p: pOf(a2Star) };
}

function pOf(a: number): number {
  if (a >= 0.6) return Math.exp(1.2937 - 5.709 * a + 0.0186 * a * a);
  if (a >= 0.34) return Math.exp(0.9177 - 4.279 * a - 1.38 * a * a);
  if (a >= 0.2) return -Math.expm1(-8.318 + 42.796 * a - 59.938 * a * a);
  return -Math.expm1(-13.436 + 101.14 * a - 223.73 * a * a);
}
