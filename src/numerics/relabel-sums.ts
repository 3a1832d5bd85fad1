/** What the relabelling kernels read off a sorted group: trimmed means and winsorized sums of squares for several trims. */
import { winsorizedSorted } from './winsorized.ts';

/** Share of a sum of squares below which too few digits are left after the mean is taken out. */
const FEW_DIGITS = 1e-5;

/** Centre-out sums of one group, refilled for each relabelling. */
export interface CentreOut {
  /** Trims in percent, largest first. */
  readonly trims: Float64Array;
  /** For each trim: scores left out at each end. */
  readonly g: Int32Array;
  /** Mean of the middle n - 2g scores. */
  readonly trimmed: Float64Array;
  /** Mean of the winsorized scores. */
  readonly winsorized: Float64Array;
  /** Sum of squared deviations of the winsorized scores. */
  readonly squares: Float64Array;
}

/**
 * Room for the sums of a group.
 * @param trims integer percentages at each end, any order, repeated ones counted once
 * @returns sums to be filled by `fillCentreOut`
 * @source design of the kernels
 * @checked through fillCentreOut
 */
export function centreOutFor(trims: readonly number[]): CentreOut {
  const each = Float64Array.from(new Set(trims)).sort().reverse();
  const room = () => new Float64Array(each.length);
  return { trims: each, g: new Int32Array(each.length), trimmed: room(), winsorized: room(), squares: room() };
}

/**
 * Sums from the middle outwards: after one walk over the scores every trim costs the same few steps.
 * @param sums refilled (the one argument that is)
 * @param s ascending scores in the first n places, best taken about their middle
 * @param n number of scores, at least 1
 * @source Tukey & McLaughlin (1963); winsorized squares: sum of the middle squares + g (low^2 + high^2) - n mean^2
 * @checked agrees with trimmedMean and winsorizedVariance, rtol 1e-11, also far from zero
 */
export function fillCentreOut(sums: CentreOut, s: Float64Array, n: number): void {
  const { trims, g: counts, trimmed, winsorized, squares } = sums;
  let low = n >> 1;
  let high = low;
  let total = 0;
  let square = 0;
  for (let j = 0; j < trims.length; j++) {
    const g = Math.floor(((trims[j] as number) * n) / 100);
    counts[j] = g;
    while (low > g) {
      const value = s[--low] as number;
      total += value;
      square += value * value;
    }
    while (high < n - g) {
      const value = s[high++] as number;
      total += value;
      square += value * value;
    }
    const least = s[g] as number;
    const most = s[n - 1 - g] as number;
    const all = square + g * (least * least + most * most);
    const mean = (total + g * (least + most)) / n;
    const left = all - n * mean * mean;
    trimmed[j] = total / (n - 2 * g);
    winsorized[j] = mean;
    squares[j] = left > FEW_DIGITS * all ? left : winsorizedSorted(s.subarray(0, n), g).squares;
  }
}
