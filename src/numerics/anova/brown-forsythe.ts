import { type FTest, type GroupScores, noFTest, trimmedSummaries } from '../groups.ts';
import { fUpper } from '../tails/f.ts';

export interface BrownForsytheF extends FTest {
  /** Numerator df of Mehrotra (1997), below k - 1 when spreads differ. */
  readonly df1Mehrotra: number | null;
  readonly pMehrotra: number | null;
}

/**
 * Brown and Forsythe's F* for means under unequal spread.
 * @param groups scores of each condition, two conditions or more, finite, two scores or more in each
 * @returns F, df1 = k - 1, df2, p, and Mehrotra's df1 with its p; null with a reason when a condition holds fewer than
 *   two scores or no condition's scores vary
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Brown & Forsythe (1974): F* = sum n (m - m.)^2 / sum (1 - n/N) s^2, 1/df2 = sum c^2 / (n-1),
 *   c = (1 - n/N) s^2 / sum (1 - n/N) s^2; Mehrotra (1997): df1 = (sum (1-f) s^2)^2 / (sum s^4 + (sum f s^2)^2 - 2 sum f s^4)
 * @checked cases `brown_forsythe_f`, rtol 1e-9
 */
export function brownForsytheF(groups: GroupScores): BrownForsytheF {
  const none = { df1Mehrotra: null, pMehrotra: null };
  const summaries = trimmedSummaries(groups, 0);
  if (typeof summaries === 'string') return { ...noFTest(summaries), ...none };
  const total = summaries.reduce((sum, one) => sum + one.n, 0);
  const largest = Math.max(...summaries.map((one) => one.winsorizedVariance));
  if (largest === 0) return { ...noFTest('scores do not vary within conditions'), ...none };
  // Variances relative to the largest, so that their squares cannot leave the range of doubles.
  const variances = summaries.map((one) => one.winsorizedVariance / largest);
  const shares = summaries.map((one) => one.n / total);
  const over = (term: (j: number) => number) => summaries.reduce((sum, _, j) => sum + term(j), 0);
  const base = summaries[0]!.mean;
  const center = over((j) => shares[j]! * (summaries[j]!.mean - base));
  const between = over((j) => summaries[j]!.n * (summaries[j]!.mean - base - center) ** 2);
  const within = over((j) => (1 - shares[j]!) * variances[j]!);
  const df1 = summaries.length - 1;
  const df2 = 1 / over((j) => (((1 - shares[j]!) * variances[j]!) / within) ** 2 / (summaries[j]!.n - 1));
  const F = between / largest / within;
  const spread = over((j) => variances[j]! ** 2) + over((j) => shares[j]! * variances[j]!) ** 2;
  const df1Mehrotra = within ** 2 / (spread - 2 * over((j) => shares[j]! * variances[j]! ** 2));
  return { F, df1, df2, p: fUpper(F, df1, df2), df1Mehrotra, pMehrotra: fUpper(F, df1Mehrotra, df2) };
}
