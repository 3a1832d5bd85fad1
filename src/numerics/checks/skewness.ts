import { normalP } from '../inference.ts';
import { requireScores } from '../scores.ts';
import { centralMoments } from './central-moments.ts';

/** Skewness in its three definitions and two tests; without unit, positive for a longer upper tail. */
export interface Skewness {
  /** m3 / m2^1.5; null with a reason. */
  readonly g1: number | null;
  /** g1 sqrt(n(n-1)) / (n-2). */
  readonly bigG1: number | null;
  /** g1 ((n-1)/n)^1.5. */
  readonly b1: number | null;
  /** SE of bigG1 in normal samples. */
  readonly se: number | null;
  /** bigG1 / se. */
  readonly zSimple: number | null;
  /** D'Agostino's normal score; null for fewer than 8 scores. */
  readonly z: number | null;
  /** Two-sided p of z. */
  readonly p: number | null;
  /** Why something is null. */
  readonly reason?: string;
}

/**
 * Skewness with D'Agostino's test.
 * @param x scores (n, any unit)
 * @returns g1, G1, b1, SE, z, p; null with a reason for fewer than 3 or equal scores; z and p for fewer than 8
 * @throws RangeError when a score is not finite
 * @source Joanes & Gill 1998, The Statistician 47, 183-189 (definitions); D'Agostino 1970, Biometrika 57, 679-681 (z)
 * @checked outside check cases skewness, relative 1e-9
 */
export function skewness(x: Float64Array): Skewness {
  requireScores(x, 0);
  const n = x.length;
  const none = { g1: null, bigG1: null, b1: null, se: null, zSimple: null, z: null, p: null };
  if (n < 3) return { ...none, reason: 'fewer than 3 scores' };
  const moments = centralMoments(x);
  if (moments === null) return { ...none, reason: 'all scores are equal' };
  const g1 = moments.m3 / (moments.m2 * Math.sqrt(moments.m2));
  const bigG1 = (g1 * Math.sqrt(n * (n - 1))) / (n - 2);
  const share = (n - 1) / n;
  const b1 = g1 * share * Math.sqrt(share);
  const se = skewnessError(n);
  const simple = { g1, bigG1, b1, se, zSimple: bigG1 / se };
  if (n < 8) return { ...simple, z: null, p: null, reason: 'fewer than 8 scores: no test' };
  const z = dagostinoZ(g1, n);
  return { ...simple, z, p: normalP(z, 'two-sided') };
}

/**
 * Standard error of G1 in normal samples.
 * @param n scores, 3 or more
 * @returns sqrt(6 n (n-1) / ((n-2)(n+1)(n+3)))
 * @source Fisher 1930, Proc. R. Soc. A 130, 16-28
 * @checked outside check cases skewness, relative 1e-9
 */
export function skewnessError(n: number): number {
  return Math.sqrt((6 * n * (n - 1)) / ((n - 2) * (n + 1) * (n + 3)));
}

function dagostinoZ(g1: number, n: number): number {
  const y = g1 * Math.sqrt(((n + 1) * (n + 3)) / (6 * (n - 2)));
  const beta2 = (3 * (n * n + 27 * n - 70) * (n + 1) * (n + 3)) / ((n - 2) * (n + 5) * (n + 7) * (n + 9));
  const w2 = Math.sqrt(2 * (beta2 - 1)) - 1;
  const delta = 1 / Math.sqrt(0.5 * Math.log(w2));
  const alpha = Math.sqrt(2 / (w2 - 1));
  return delta * Math.asinh(y / alpha);
}
