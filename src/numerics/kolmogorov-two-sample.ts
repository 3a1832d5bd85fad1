import { sorted } from './order.ts';
import { requireScores } from './scores.ts';
import { kolmogorovLimitUpper, kolmogorovTwoSampleUpper } from './tails/kolmogorov.ts';

/** Above this many pairs the exact distribution is replaced by its limit. */
const MOST_PAIRS = 1e7;

export interface KolmogorovTwoSample {
  /** Largest distance between the two empirical distributions. */
  readonly D: number;
  readonly p: number;
  readonly method: 'exact' | 'limit';
  /** With ties the exact p is too large rather than too small. */
  readonly ties: boolean;
}

/**
 * Kolmogorov-Smirnov test of two independent groups.
 * @param x scores of the first group, at least one, finite
 * @param y scores of the second group, at least one, finite
 * @returns D, two-sided p = P(D >= observed) (exact without ties, conservative with ties), method, ties
 * @throws RangeError when a group is empty or not finite
 * @source Kolmogorov (1933), Smirnov (1939); exact: counts of lattice paths
 * @checked cases `ks_two_sample`, rtol 1e-9
 */
export function kolmogorovTwoSample(x: Float64Array, y: Float64Array): KolmogorovTwoSample {
  requireScores(x);
  requireScores(y, 1, 'y');
  const a = sorted(x);
  const b = sorted(y);
  const n1 = a.length;
  const n2 = b.length;
  let i = 0;
  let j = 0;
  let widest = 0;
  let ties = false;
  while (i < n1 && j < n2) {
    const at = Math.min(a[i] as number, b[j] as number);
    const before = i + j;
    while (i < n1 && a[i] === at) i++;
    while (j < n2 && b[j] === at) j++;
    if (i + j - before > 1) ties = true;
    // Whole numbers: the distance times n1 n2 is exact.
    widest = Math.max(widest, Math.abs(i * n2 - j * n1));
  }
  const D = widest / (n1 * n2);
  if (n1 * n2 <= MOST_PAIRS) return { D, p: kolmogorovTwoSampleUpper(D, n1, n2), method: 'exact', ties };
  return { D, p: kolmogorovLimitUpper(D * Math.sqrt((n1 * n2) / (n1 + n2))), method: 'limit', ties };
}
