/** What is read off the counts of a resample in one walk over the sorted scores; every walk leaves the counts at 0. */

/**
 * Sum of the middle of a resample, and clears the counts.
 * @param s ascending scores
 * @param counts times each score was drawn, n in all; set to 0
 * @param g number left out at EACH end
 * @returns sum of the resample's sorted scores g to n - 1 - g
 * @source design of the kernels: walk the counts once; never the total minus the tails, where a far score cancels digits
 * @checked agrees with sorting the resample, rtol 1e-12
 */
export function walkTrimmedSum(s: Float64Array, counts: Int32Array, g: number): number {
  const n = counts.length;
  const stop = n - g;
  let at = 0;
  let i = -1;
  // Three stretches instead of a test per score: below the cut, the middle, above it.
  while (at <= g) {
    i++;
    at += counts[i] as number;
    counts[i] = 0;
  }
  let total = (Math.min(at, stop) - g) * (s[i] as number);
  while (at < stop) {
    i++;
    const c = counts[i] as number;
    counts[i] = 0;
    const next = at + c;
    if (next > stop) {
      total += (stop - at) * (s[i] as number);
      break;
    }
    total += c * (s[i] as number);
    at = next;
  }
  for (i++; i < n; i++) counts[i] = 0;
  return total;
}

/** What a walk over a resample leaves for a winsorized or studentized statistic. */
export interface WinsorWalk {
  /** Sum of the trimmed scores. */
  trimmed: number;
  /** Sum of the winsorized scores. */
  sum: number;
  /** Sum of squares of the winsorized scores. */
  squares: number;
  /** Smallest and largest winsorized score. */
  low: number;
  high: number;
}

/**
 * An empty walk to be filled.
 * @returns zeros
 * @source design of the kernels
 * @checked by hand
 */
export function winsorWalk(): WinsorWalk {
  return { trimmed: 0, sum: 0, squares: 0, low: 0, high: 0 };
}

/**
 * Trimmed and winsorized sums of a resample, and clears the counts.
 * @param s ascending scores, best centred near 0 (the squares are not corrected for the mean)
 * @param counts times each score was drawn, n in all; set to 0
 * @param g number left out, or drawn in, at EACH end
 * @param out receives the three sums
 * @source design of the kernels: one walk
 * @checked agrees with sorting the resample, rtol 1e-12
 */
export function walkWinsorized(s: Float64Array, counts: Int32Array, g: number, out: WinsorWalk): void {
  const n = counts.length;
  const stop = n - g;
  let trimmed = 0;
  let squares = 0;
  let at = 0;
  let low = 0;
  let high = 0;
  let i = 0;
  for (; i < n && at < stop; i++) {
    const c = counts[i] as number;
    if (c === 0) continue;
    counts[i] = 0;
    const next = at + c;
    if (next > g) {
      const score = s[i] as number;
      if (at <= g) low = score;
      const times = Math.min(next, stop) - Math.max(at, g);
      trimmed += times * score;
      squares += times * score * score;
      high = score;
    }
    at = next;
  }
  if (i < n) counts.fill(0, i);
  out.trimmed = trimmed;
  out.sum = trimmed + g * (low + high);
  out.squares = squares + g * (low * low + high * high);
  out.low = low;
  out.high = high;
}

/**
 * Median of a resample, and clears the counts.
 * @param s ascending scores
 * @param counts times each score was drawn, n in all; set to 0
 * @returns the resample's median
 * @source design of the kernels: walk to the middle
 * @checked agrees with sorting the resample, exactly
 */
export function walkMedian(s: Float64Array, counts: Int32Array): number {
  const n = counts.length;
  const first = (n - 1) >> 1;
  const second = n >> 1;
  let at = 0;
  let i = 0;
  while (at <= first) at += counts[i++] as number;
  const low = s[i - 1] as number;
  while (at <= second) at += counts[i++] as number;
  const high = s[i - 1] as number;
  counts.fill(0);
  return low === high ? low : low + (high - low) / 2;
}

/**
 * The resample itself, ascending, and clears the counts.
 * @param s ascending scores
 * @param counts times each score was drawn, n in all; set to 0
 * @param out receives the n scores of the resample
 * @source design of the kernels: walk the counts once
 * @checked agrees with drawing the scores themselves
 */
export function walkExpand(s: Float64Array, counts: Int32Array, out: Float64Array): void {
  let at = 0;
  for (let i = 0; i < counts.length; i++) {
    const score = s[i] as number;
    for (let c = counts[i] as number; c > 0; c--) out[at++] = score;
    counts[i] = 0;
  }
}
