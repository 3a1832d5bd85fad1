/** The statistics that can be resampled, each read off the counts of a resample. */
import { modifiedOneStepSorted, oneStepSorted } from './m-estimator.ts';
import { MAD_CONSTANT, madSorted, medianSorted, sorted } from './order.ts';
import { walkExpand, walkMedian, walkTrimmedSum, walkWinsorized, winsorWalk } from './resample-walks.ts';
import { trimCount } from './scores.ts';
import { medianStandardErrorSorted } from './se-median.ts';

/** Statistics of location offered to the bootstrap. */
export type BootstrapStatistic = 'mean' | 'trimmed-mean' | 'winsorized-mean' | 'median' | 'one-step-m' | 'mom';

/** Bends of the two M-estimates, as their own functions default to. */
const ONE_STEP_BEND = 1.28;
const MOM_CUTOFF = 2.24;

/** One group prepared for resampling: scores sorted and centred near their median, so that sums keep their digits. */
export interface Resampled {
  readonly n: number;
  /** Added back to every value read. */
  readonly center: number;
  /** Ascending, centred. */
  readonly s: Float64Array;
  readonly g: number;
  readonly trim: number;
}

/**
 * Prepares one group.
 * @param x scores, at least one, finite
 * @param trim integer percentage at each end, 0 to 49
 * @returns sorted and centred scores, n and g
 * @throws RangeError when `trim` is not 0 to 49
 * @source design of the kernels: sort once
 * @checked by hand
 */
export function prepare(x: Float64Array, trim: number): Resampled {
  const s = sorted(x);
  const center = medianSorted(s);
  for (let i = 0; i < s.length; i++) s[i] = (s[i] as number) - center;
  return { n: s.length, center, s, g: trimCount(s.length, trim), trim };
}

/**
 * Statistic of scores that are already sorted.
 * @param statistic which
 * @param s ascending scores, at least one
 * @param trim integer percentage at each end, used by the trimmed and winsorized mean
 * @returns its value; the M-estimates with a MAD of 0 give the median, their limit
 * @source each statistic's own function
 * @checked agrees with each statistic's own function, rtol 1e-12
 */
export function valueSorted(statistic: BootstrapStatistic, s: Float64Array, trim: number): number {
  const n = s.length;
  if (statistic === 'median') return medianSorted(s);
  if (statistic === 'one-step-m') return oneStepSorted(s, ONE_STEP_BEND, MAD_CONSTANT * madSorted(s)).estimate;
  if (statistic === 'mom') return modifiedOneStepSorted(s, MOM_CUTOFF * MAD_CONSTANT * madSorted(s)).estimate;
  const g = statistic === 'mean' ? 0 : trimCount(n, trim);
  let total = 0;
  for (let i = g; i < n - g; i++) total += s[i] as number;
  if (statistic !== 'winsorized-mean') return total / (n - 2 * g);
  return (total + g * ((s[g] as number) + (s[n - 1 - g] as number))) / n;
}

/**
 * Reader of one group's resamples.
 * @param statistic which
 * @param group prepared group
 * @returns function from counts (cleared) to the statistic's value, centred
 * @source design of the kernels: one walk over the counts
 * @checked agrees with the statistic of the resample itself, rtol 1e-12
 */
export function reader(statistic: BootstrapStatistic, group: Resampled): (counts: Int32Array) => number {
  const { n, s, trim } = group;
  const g = statistic === 'mean' ? 0 : group.g;
  if (statistic === 'mean' || statistic === 'trimmed-mean') {
    const h = n - 2 * g;
    return (counts) => walkTrimmedSum(s, counts, g) / h;
  }
  if (statistic === 'winsorized-mean') {
    const walk = winsorWalk();
    return (counts) => {
      walkWinsorized(s, counts, g, walk);
      return walk.sum / n;
    };
  }
  if (statistic === 'median') return (counts) => walkMedian(s, counts);
  const buffer = new Float64Array(n);
  return (counts) => {
    walkExpand(s, counts, buffer);
    return valueSorted(statistic, buffer, trim);
  };
}

/** A value with the square of its standard error. */
export interface Studentized {
  value: number;
  squaredError: number;
}

/** Factor from the sum of squares of the winsorized scores to the squared standard error. */
function errorFactor(statistic: BootstrapStatistic, group: Resampled, form: 'one-sample' | 'yuen'): number {
  const { n, trim } = group;
  const g = statistic === 'mean' ? 0 : group.g;
  const h = n - 2 * g;
  if (statistic === 'winsorized-mean') return (n - 1) / ((h - 1) * (h - 1) * n);
  if (form === 'yuen' || statistic === 'mean') return 1 / (h * (h - 1));
  const kept = (100 - 2 * trim) / 100;
  return 1 / (kept * kept * n * (n - 1));
}

/**
 * Reader of one group's resamples with standard errors, for the bootstrap-t.
 * @param statistic which; the M-estimates have no standard error of their own
 * @param group prepared group with at least two scores left after trimming
 * @param form 'one-sample' (Tukey & McLaughlin for the trimmed mean) or 'yuen' (its share in a two-group difference)
 * @returns function from counts (cleared) that fills `out`; null for the M-estimates
 * @source Tukey & McLaughlin (1963); Yuen (1974); Dixon & Tukey (1968); median: McKean & Schrader (1984)
 * @checked agrees with the tests' own standard errors on the resample, rtol 1e-10
 */
export function studentizedReader(
  statistic: BootstrapStatistic,
  group: Resampled,
  form: 'one-sample' | 'yuen',
): ((counts: Int32Array, out: Studentized) => void) | null {
  const { n, s } = group;
  if (statistic === 'one-step-m' || statistic === 'mom') return null;
  if (statistic === 'median') {
    const buffer = new Float64Array(n);
    return (counts, out) => {
      walkExpand(s, counts, buffer);
      out.value = medianSorted(buffer);
      const se = medianStandardErrorSorted(buffer).se;
      out.squaredError = se * se;
    };
  }
  const g = statistic === 'mean' ? 0 : group.g;
  const h = n - 2 * g;
  const factor = errorFactor(statistic, group, form);
  const walk = winsorWalk();
  return (counts, out) => {
    walkWinsorized(s, counts, g, walk);
    out.value = statistic === 'winsorized-mean' ? walk.sum / n : walk.trimmed / h;
    const squares = walk.squares - (walk.sum * walk.sum) / n;
    // What is left of identical scores after subtraction is rounding, not spread.
    out.squaredError = squares > 1e-14 * walk.squares ? squares * factor : 0;
  };
}

/**
 * Statistic with each score left out in turn.
 * @param statistic which
 * @param group prepared group of at least two scores
 * @returns n centred values
 * @source Quenouille (1956), Tukey (1958): the jackknife
 * @checked agrees with removing each score, rtol 1e-10
 */
export function leaveOneOut(statistic: BootstrapStatistic, group: Resampled): Float64Array {
  const { n, s, trim } = group;
  if (statistic === 'median' || statistic === 'one-step-m' || statistic === 'mom') {
    const rest = s.slice(1);
    return s.map((_, i) => {
      // Score i - 1 returns and score i goes: the rest stays sorted.
      if (i > 0) rest[i - 1] = s[i - 1] as number;
      return valueSorted(statistic, rest, trim);
    });
  }
  const g = statistic === 'mean' ? 0 : trimCount(n - 1, trim);
  const h = n - 1 - 2 * g;
  let middle = 0;
  for (let i = g; i < n - g; i++) middle += s[i] as number;
  return s.map((score, i) => {
    const low = s[i <= g ? g + 1 : g] as number;
    const high = s[i >= n - 1 - g ? n - 2 - g : n - 1 - g] as number;
    const gone = i < g ? (s[g] as number) : i > n - 1 - g ? (s[n - 1 - g] as number) : score;
    const total = middle - gone;
    return statistic === 'winsorized-mean' ? (total + g * (low + high)) / (n - 1) : total / h;
  });
}
