/** Robust measures of spread. */
import { madSorted, medianSorted, sorted } from './order.ts';
import { requireScores } from './scores.ts';
import { pairDistance } from './selection.ts';

const SN_FACTOR = 1.1926;
const QN_FACTOR = 2.21914;
const SN_SMALL = [0.743, 1.851, 0.954, 1.351, 0.993, 1.198, 1.005, 1.131];
const QN_SMALL = [0.399356, 0.99365, 0.51321, 0.84401, 0.6122, 0.85877, 0.66993, 0.87344, 0.72014, 0.88906, 0.75743];

/** A scale with its value before factors. */
export interface RobustScale {
  readonly value: number;
  readonly raw: number;
}

/** Factor for small samples of the scale Sn, n >= 2. */
function snCorrection(n: number): number {
  if (n < 10) return SN_SMALL[n - 2] as number;
  return n % 2 === 1 ? n / (n - 0.9) : 1;
}

/** Factor for small samples of the scale Qn, n >= 2. */
function qnCorrection(n: number): number {
  if (n <= 12) return QN_SMALL[n - 2] as number;
  if (n % 2 === 1) return 1 / (1 + (1.60188 + (-2.1284 - 5.172 / n) / n) / n);
  return 1 / (1 + (3.67561 + (1.9654 + (6.987 - 77 / n) / n) / n) / n);
}

/** High median of |s[i] - s[j]| over all j (the score's own distance of 0 counted), for sorted scores. */
function highMedianDistance(s: Float64Array, i: number): number {
  const n = s.length;
  const own = s[i] as number;
  let left = i - 1;
  let right = i + 1;
  let distance = 0;
  for (let taken = 0; taken < n >> 1; taken++) {
    const below = left >= 0 ? own - (s[left] as number) : Infinity;
    const above = right < n ? (s[right] as number) - own : Infinity;
    distance = Math.min(below, above);
    if (below <= above) left--;
    else right++;
  }
  return distance;
}

/**
 * Sn: low median of the high medians of the distances.
 * @param x scores, at least two, finite
 * @param finiteCorrection whether small samples are corrected (default true)
 * @returns value (times 1.1926 and the correction) and raw, in the scores' unit; 0 when half the scores are identical
 * @throws RangeError when fewer than two or not finite
 * @source Rousseeuw & Croux (1993): lomed_i himed_j |xi - xj|; correction: Croux & Rousseeuw (1992)
 * @checked cases `sn_scale`, rtol 1e-9
 */
export function snScale(x: Float64Array, finiteCorrection = true): RobustScale {
  requireScores(x, 2);
  const n = x.length;
  const s = sorted(x);
  const raw = s.map((_, i) => highMedianDistance(s, i)).sort()[((n + 1) >> 1) - 1] as number;
  return { value: SN_FACTOR * raw * (finiteCorrection ? snCorrection(n) : 1), raw };
}

/**
 * Qn: an order statistic of the distances between scores, at about their lower quarter.
 * @param x scores, at least two, finite
 * @param finiteCorrection whether small samples are corrected (default true)
 * @returns value (times 2.21914 and the correction) and raw, in the scores' unit
 * @throws RangeError when fewer than two or not finite
 * @source Rousseeuw & Croux (1993): the k-th smallest |xi - xj|, i < j, k = C(floor(n/2) + 1, 2)
 * @checked cases `qn_scale`, rtol 1e-9
 */
export function qnScale(x: Float64Array, finiteCorrection = true): RobustScale {
  requireScores(x, 2);
  const n = x.length;
  const half = (n >> 1) + 1;
  const raw = pairDistance(sorted(x), (half * (half - 1)) / 2);
  return { value: QN_FACTOR * raw * (finiteCorrection ? qnCorrection(n) : 1), raw };
}

/** A variance; null with a reason where its denominator is 0. */
export interface RobustVariance {
  readonly variance: number | null;
  readonly reason?: string;
}

/**
 * Percentage bend midvariance.
 * @param x scores, at least one, finite
 * @param beta share bent, 0 to .5 (default .1)
 * @returns variance (squared units) and omega, the bend (scores' unit); null with a reason when omega is 0
 * @throws RangeError when empty, not finite, or beta outside 0 to .5
 * @source Wilcox (2012), section 3.12: omega = m-th smallest |x - M|, m = floor((1-beta) n + .5);
 *   n omega^2 sum clip(y, -1, 1)^2 / (number with |y| < 1)^2, y = (x - M)/omega
 * @checked cases `percentage_bend_midvariance`, rtol 1e-9
 */
export function percentageBendMidvariance(x: Float64Array, beta = 0.1): RobustVariance & { readonly omega: number } {
  requireScores(x);
  if (!(beta >= 0 && beta <= 0.5)) throw new RangeError(`*beta* must be between 0 and .5; got ${beta}`);
  const n = x.length;
  const center = medianSorted(sorted(x));
  const distances = x.map((score) => Math.abs(score - center)).sort();
  const m = Math.floor((1 - beta) * n + 0.5 + 1e-9);
  const omega = distances[Math.max(1, m) - 1] as number;
  if (omega === 0) return { variance: null, omega, reason: 'most scores are identical' };
  let squares = 0;
  let inside = 0;
  for (const distance of distances) {
    const bent = Math.min(distance / omega, 1);
    squares += bent * bent;
    if (distance < omega) inside++;
  }
  if (inside === 0) return { variance: null, omega, reason: 'no score lies within the bend' };
  return { variance: (n * omega * omega * squares) / (inside * inside), omega };
}

/**
 * Biweight midvariance.
 * @param x scores, at least one, finite
 * @param c cut, in raw MADs (default 9)
 * @returns variance (squared units); null with a reason when the MAD is 0
 * @throws RangeError when empty, not finite, or c is not positive
 * @source Mosteller & Tukey (1977): u = (x - M)/(c MAD);
 *   n sum (x-M)^2 (1-u^2)^4 / (sum (1-u^2)(1-5u^2))^2 over |u| < 1, n counting all scores
 * @checked cases `biweight_midvariance`, rtol 1e-9
 */
export function biweightMidvariance(x: Float64Array, c = 9): RobustVariance {
  requireScores(x);
  if (!(c > 0 && c < Infinity)) throw new RangeError(`*c* must be a positive number; got ${c}`);
  const s = sorted(x);
  const center = medianSorted(s);
  const cut = c * madSorted(s);
  if (cut === 0) return { variance: null, reason: 'the MAD is 0: more than half the scores are identical' };
  let top = 0;
  let bottom = 0;
  for (const score of s) {
    const u = (score - center) / cut;
    const rest = 1 - u * u;
    if (rest <= 0) continue;
    top += u * u * rest * rest * rest * rest;
    bottom += rest * (1 - 5 * u * u);
  }
  if (bottom === 0) return { variance: null, reason: 'the weights cancel' };
  return { variance: (s.length * cut * cut * top) / (bottom * bottom) };
}
