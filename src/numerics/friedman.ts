import { sum } from './moments.ts';
import { ranks } from './order.ts';
import { type RepeatedScores, requireRepeated } from './repeated.ts';
import { chiSquareUpper } from './tails/chi-square.ts';
import { fUpper } from './tails/f.ts';

export interface FriedmanTest {
  /** Corrected for ties; referred to chi-square on `df`. */
  readonly chi2: number | null;
  readonly df: number | null;
  readonly p: number | null;
  /** Kendall's coefficient of agreement, 0 to 1. */
  readonly kendallsW: number | null;
  /** The F form; null with `imanDavenportReason` when the participants agree completely. */
  readonly imanDavenportF: number | null;
  readonly imanDavenportDf: readonly [number, number] | null;
  readonly imanDavenportP: number | null;
  readonly imanDavenportReason?: string;
  readonly n: number;
  readonly reason?: string;
}

/**
 * Friedman's test of repeated scores by ranks within participants.
 * @param scores one vector a level (two or more), one score a participant, finite
 * @returns chi2 corrected for ties, df = k - 1, p, Kendall's W, and the F form of Iman & Davenport; null with a reason when
 *   there are no participants or every participant's scores are all equal
 * @throws RangeError when there are fewer than two levels, lengths differ, or a score is not finite
 * @source Friedman (1937), ties: Conover (1999) 5.8: chi2 = (k-1) sum (R - n (k+1)/2)^2 / (sum r^2 - n k (k+1)^2 / 4);
 *   W = chi2 / (n (k-1)); Iman & Davenport (1980): F = (n-1) chi2 / (n (k-1) - chi2)
 * @checked cases `friedman_test`, rtol 1e-9
 */
export function friedmanTest(scores: RepeatedScores): FriedmanTest {
  requireRepeated(scores);
  const k = scores.length;
  const n = scores[0]!.length;
  const center = (k + 1) / 2;
  const totals = new Float64Array(k);
  let spread = 0;
  for (let i = 0; i < n; i++) {
    const own = ranks(Float64Array.from(scores, (level) => level[i]!)).ranks;
    own.forEach((rank, j) => {
      totals[j] = totals[j]! + rank - center;
      spread += (rank - center) ** 2;
    });
  }
  if (spread === 0) return noFriedman(n, n === 0 ? 'no participant has a score under every level' : equalReason);
  const chi2 = ((k - 1) * sum(totals.map((total) => total * total))) / spread;
  const df = k - 1;
  const base = { chi2, df, p: chiSquareUpper(chi2, df), kendallsW: chi2 / (n * df), n };
  const rest = n * df - chi2;
  if (n < 2 || !(rest > 1e-12 * n * df)) {
    const reason = n < 2 ? 'one participant' : 'the ranks of all participants agree';
    return { ...base, imanDavenportF: null, imanDavenportDf: null, imanDavenportP: null, imanDavenportReason: reason };
  }
  const F = ((n - 1) * chi2) / rest;
  const df2 = (n - 1) * df;
  return { ...base, imanDavenportF: F, imanDavenportDf: [df, df2], imanDavenportP: fUpper(F, df, df2) };
}

const equalReason = "every participant's scores are all equal";

function noFriedman(n: number, reason: string): FriedmanTest {
  const none = { chi2: null, df: null, p: null, kendallsW: null };
  return { ...none, imanDavenportF: null, imanDavenportDf: null, imanDavenportP: null, n, reason };
}
