import type { Alternative } from './inference.ts';
import { decimalTies, tailP } from './rank-test.ts';
import { requireScores } from './scores.ts';
import { binomialLower, binomialUpper } from './tails/binomial.ts';

export interface SignTest {
  readonly nPositive: number;
  readonly nNegative: number;
  readonly nZero: number;
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * Sign test of scores, or of the differences of pairs; zeros are left out.
 * @param x scores or differences, at least one, finite; taken to 10 decimals
 * @param options `mu` null value (default 0) and direction
 * @returns counts of signs and the exact binomial p; null with a reason when every difference is zero
 * @throws RangeError when empty or not finite
 * @source Dixon & Mood (1946): number of positive signs is binomial(n, 1/2); two-sided p is the doubled smaller tail
 * @checked cases `sign_test`, rtol 1e-9
 */
export function signTest(
  x: Float64Array,
  options: { readonly mu?: number; readonly alternative?: Alternative } = {},
): SignTest {
  requireScores(x);
  const { mu = 0, alternative = 'two-sided' } = options;
  const d = decimalTies(x.map((score) => score - mu));
  const nPositive = d.filter((value) => value > 0).length;
  const nNegative = d.filter((value) => value < 0).length;
  const counts = { nPositive, nNegative, nZero: d.length - nPositive - nNegative };
  const n = nPositive + nNegative;
  if (n === 0) return { ...counts, p: null, reason: 'all differences are zero' };
  const upper = nPositive === 0 ? 1 : binomialUpper(nPositive - 1, n, 0.5);
  return { ...counts, p: tailP(binomialLower(nPositive, n, 0.5), upper, alternative) };
}
