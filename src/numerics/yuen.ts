/** Trimmed means of two independent groups: Yuen's test with separate and with pooled winsorized variances. */
import { largestSize, noSpread, noTTest, type TestOptions, type TTest, tTest } from './inference.ts';
import { requireScores, trimCount } from './scores.ts';
import { trimmedMean } from './trimmed-mean.ts';
import { winsorizedVariance } from './winsorized.ts';

export type YuenOptions = TestOptions & {
  /** Integer percentage left out at EACH end of each group (default 20). */
  readonly trim?: number;
};

export interface YuenTest extends TTest {
  readonly trimmedMeans: readonly [number, number];
  readonly g: readonly [number, number];
  readonly h: readonly [number, number];
}

interface Half {
  readonly center: number;
  readonly n: number;
  readonly g: number;
  readonly h: number;
  /** (n-1) s_w^2; null when fewer than two scores are left. */
  readonly squares: number | null;
}

function half(x: Float64Array, trim: number): Half {
  const n = x.length;
  const g = trimCount(n, trim);
  const h = n - 2 * g;
  return { center: trimmedMean(x, trim), n, g, h, squares: h < 2 ? null : (n - 1) * winsorizedVariance(x, trim) };
}

function twoHalves(x: Float64Array, y: Float64Array, trim: number) {
  requireScores(x);
  requireScores(y, 1, 'y');
  const a = half(x, trim);
  const b = half(y, trim);
  return {
    a,
    b,
    estimate: a.center - b.center,
    counts: { trimmedMeans: [a.center, b.center] as const, g: [a.g, b.g] as const, h: [a.h, b.h] as const },
  };
}

const pooledSd = (first: number, second: number, df: number): number => Math.sqrt((first + second) / df);

const tooFew = 'a condition has fewer than two scores left after trimming';
const noSpreadLeft = 'all scores within each condition are equal after winsorizing';

/**
 * Yuen's test of two independent groups, separate winsorized variances (Welch's test when nothing is trimmed).
 * @param x scores of the first group, finite
 * @param y scores of the second group, finite
 * @param options `trim` integer percentage at each end (default 20), direction, level
 * @returns estimate (first minus second trimmed mean), se, df, t, p, interval, `trimmedMeans`, `g`, `h` per group; null
 *   with a reason when fewer than two scores are left in a group or neither group has any spread
 * @throws RangeError when a group is empty or not finite, or an option is out of range
 * @source Yuen (1974): d_j = (n_j-1) s_wj^2 / (h_j (h_j-1)), se^2 = d1 + d2, df = (d1+d2)^2 / sum d_j^2/(h_j-1)
 * @checked cases `yuen_welch`, rtol 1e-9
 */
export function yuenWelch(x: Float64Array, y: Float64Array, options: YuenOptions = {}): YuenTest {
  const { a, b, estimate, counts } = twoHalves(x, y, options.trim ?? 20);
  if (a.squares === null || b.squares === null) return { ...noTTest(tooFew, estimate), ...counts };
  const d1 = a.squares / (a.h * (a.h - 1));
  const d2 = b.squares / (b.h * (b.h - 1));
  const se = Math.sqrt(d1 + d2);
  if (noSpread(pooledSd(a.squares, b.squares, a.n + b.n - 2), largestSize(x, y)))
    return { ...noTTest(noSpreadLeft, estimate), ...counts };
  // Shares instead of squares of d: very small or very large units neither under- nor overflow.
  const share = d1 / (d1 + d2);
  const df = 1 / ((share * share) / (a.h - 1) + ((1 - share) * (1 - share)) / (b.h - 1));
  return { ...tTest(estimate, 0, se, df, options), ...counts };
}

/**
 * Yuen's test of two independent groups, pooled winsorized variance.
 * @param x scores of the first group, finite
 * @param y scores of the second group, finite
 * @param options `trim` integer percentage at each end (default 20), direction, level
 * @returns as yuenWelch, df = h1 + h2 - 2
 * @throws RangeError when a group is empty or not finite, or an option is out of range
 * @source Yuen & Dixon (1973): se^2 = (q1 + q2)/(h1 + h2 - 2) (1/h1 + 1/h2), q_j = (n_j-1) s_wj^2
 * @checked cases `yuen_pooled`, rtol 1e-9
 */
export function yuenPooled(x: Float64Array, y: Float64Array, options: YuenOptions = {}): YuenTest {
  const { a, b, estimate, counts } = twoHalves(x, y, options.trim ?? 20);
  if (a.squares === null || b.squares === null) return { ...noTTest(tooFew, estimate), ...counts };
  const df = a.h + b.h - 2;
  const se = Math.sqrt(((a.squares + b.squares) / df) * (1 / a.h + 1 / b.h));
  if (noSpread(pooledSd(a.squares, b.squares, a.n + b.n - 2), largestSize(x, y)))
    return { ...noTTest(noSpreadLeft, estimate), ...counts };
  return { ...tTest(estimate, 0, se, df, options), ...counts };
}
