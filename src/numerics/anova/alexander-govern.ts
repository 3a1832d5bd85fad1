import { type GroupScores, trimmedSummaries } from '../groups.ts';
import { chiSquareUpper } from '../tails/chi-square.ts';

export interface AlexanderGovern {
  /** Referred to chi-square on `df`. */
  readonly A: number | null;
  readonly df: number | null;
  readonly p: number | null;
  readonly reason?: string;
}

/**
 * Alexander and Govern's test of means under unequal spread.
 * @param groups scores of each condition, two conditions or more, finite, two scores or more in each
 * @returns A, df = k - 1, p; null with a reason when a condition holds fewer than two scores or its scores do not vary
 * @throws RangeError when there are fewer than two conditions or a score is not finite
 * @source Alexander & Govern (1994): A = sum z^2, z from t = (m - m.) / se by Hill's (1970) normalizing transformation,
 *   m. weighted by 1 / se^2
 * @checked cases `alexander_govern`, rtol 1e-9
 */
export function alexanderGovern(groups: GroupScores): AlexanderGovern {
  const none = (reason: string) => ({ A: null, df: null, p: null, reason });
  const summaries = trimmedSummaries(groups, 0);
  if (typeof summaries === 'string') return none(summaries);
  const flat = summaries.findIndex((one) => one.winsorizedVariance === 0);
  if (flat >= 0) return none(`scores of condition ${flat + 1} do not vary`);
  const least = Math.min(...summaries.map((one) => one.squaredError));
  const total = summaries.reduce((sum, one) => sum + least / one.squaredError, 0);
  const base = summaries[0]!.mean;
  const center = summaries.reduce((sum, one) => sum + (least / one.squaredError / total) * (one.mean - base), 0);
  const A = summaries.reduce((sum, one) => {
    const z = normalized((one.mean - base - center) / Math.sqrt(one.squaredError), one.n - 1);
    return sum + z * z;
  }, 0);
  const df = summaries.length - 1;
  return { A, df, p: chiSquareUpper(A, df) };
}

function normalized(t: number, df: number): number {
  const a = df - 0.5;
  const b = 48 * a * a;
  const c = Math.sqrt(a * Math.log1p((t * t) / df));
  const c2 = c * c;
  const c3 = c2 * c;
  const high = c3 * (4 * c2 * c2 + 33 * c2 + 240) + 855 * c;
  return c + (c3 + 3 * c) / b - high / (10 * b * b + 8 * b * c2 * c2 + 1000 * b);
}
