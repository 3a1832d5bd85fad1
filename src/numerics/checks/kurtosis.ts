import { normalP } from '../inference.ts';
import { requireScores } from '../scores.ts';
import { centralMoments } from './central-moments.ts';
import { skewnessError } from './skewness.ts';

/** Excess kurtosis in its three definitions and two tests; without unit, positive for heavier tails than normal. */
export interface Kurtosis {
  /** m4 / m2^2 - 3; null with a reason. */
  readonly g2: number | null;
  /** (n-1) / ((n-2)(n-3)) ((n+1) g2 + 6). */
  readonly bigG2: number | null;
  /** (g2 + 3)(1 - 1/n)^2 - 3. */
  readonly b2: number | null;
  /** SE of bigG2 in normal samples. */
  readonly se: number | null;
  /** bigG2 / se. */
  readonly zSimple: number | null;
  /** Anscombe and Glynn's normal score; null for fewer than 5 scores. */
  readonly z: number | null;
  /** Two-sided p of z. */
  readonly p: number | null;
  /** Why something is null. */
  readonly reason?: string;
}

/**
 * Excess kurtosis with the test of Anscombe and Glynn (meant for 20 scores or more).
 * @param x scores (n, any unit)
 * @returns g2, G2, b2, SE, z, p; null with a reason for fewer than 4 or equal scores; z and p for fewer than 5
 * @throws RangeError when a score is not finite
 * @source Joanes & Gill 1998, The Statistician 47, 183-189 (definitions); Anscombe & Glynn 1983, Biometrika 70, 227-234 (z)
 * @checked outside check cases kurtosis, relative 1e-9
 */
export function kurtosis(x: Float64Array): Kurtosis {
  requireScores(x, 0);
  const n = x.length;
  const none = { g2: null, bigG2: null, b2: null, se: null, zSimple: null, z: null, p: null };
  if (n < 4) return { ...none, reason: 'fewer than 4 scores' };
  const moments = centralMoments(x);
  if (moments === null) return { ...none, reason: 'all scores are equal' };
  const ratio = moments.m4 / (moments.m2 * moments.m2);
  const g2 = ratio - 3;
  const bigG2 = ((n - 1) / ((n - 2) * (n - 3))) * ((n + 1) * g2 + 6);
  const b2 = ratio * (1 - 1 / n) ** 2 - 3;
  const se = 2 * skewnessError(n) * Math.sqrt((n * n - 1) / ((n - 3) * (n + 5)));
  const simple = { g2, bigG2, b2, se, zSimple: bigG2 / se };
  if (n < 5) return { ...simple, z: null, p: null, reason: 'fewer than 5 scores: no test' };
  const z = anscombeGlynnZ(ratio, n);
  return { ...simple, z, p: normalP(z, 'two-sided') };
}

function anscombeGlynnZ(ratio: number, n: number): number {
  const expected = (3 * (n - 1)) / (n + 1);
  const variance = (24 * n * (n - 2) * (n - 3)) / ((n + 1) ** 2 * (n + 3) * (n + 5));
  const x = (ratio - expected) / Math.sqrt(variance);
  const skew =
    ((6 * (n * n - 5 * n + 2)) / ((n + 7) * (n + 9))) * Math.sqrt((6 * (n + 3) * (n + 5)) / (n * (n - 2) * (n - 3)));
  const a = 6 + (8 / skew) * (2 / skew + Math.sqrt(1 + 4 / (skew * skew)));
  const lower = 1 + x * Math.sqrt(2 / (a - 4));
  const root = Math.cbrt((1 - 2 / a) / lower);
  return (1 - 2 / (9 * a) - root) / Math.sqrt(2 / (9 * a));
}
