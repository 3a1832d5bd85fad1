import { median } from '../order.ts';
import { requireScores } from '../scores.ts';

/**
 * Medcouple: the median of (a + b) / (a - b) over all pairs with a at or above and b at or below the median (both
 * measured from the median); between -1 and 1, positive for a longer upper tail.
 * @param x scores (n, any unit)
 * @returns medcouple without unit; 0 when no score differs from the median, null without scores
 * @throws RangeError when *x* holds NaN or an infinity
 * @source Brys, Hubert & Struyf 2004, J. Comput. Graph. Stat. 13, 996-1017: med h(a, b); pairs of scores equal to the
 *   median count -1, 0 or 1 by their order
 * @checked outside check cases adjusted_boxplot, relative 1e-9
 */
export function medcouple(x: Float64Array): number | null {
  requireScores(x, 0);
  if (x.length === 0) return null;
  const center = median(x);
  const z = x
    .map((value) => value - center)
    .sort()
    .reverse();
  const above = z.filter((value) => value >= 0);
  const below = z.filter((value) => value <= 0);
  const pairs = above.length * below.length;
  const upper = kthLargest(above, below, Math.floor((pairs - 1) / 2));
  if (pairs % 2 === 1) return upper;
  return (upper + kthLargest(above, below, pairs / 2)) / 2;
}

function kernel(above: Float64Array, below: Float64Array, i: number, j: number): number {
  const a = above[i]!;
  const b = below[j]!;
  // Scores equal to the median stand last in `above` and first in `below`.
  if (a === 0 && b === 0) return Math.sign(above.length - 1 - i - j);
  return (a + b) / (a - b);
}

/** The k-th largest (from 0) of a table that falls along rows and columns, without writing it out (Johnson & Mizoguchi 1978). */
function kthLargest(above: Float64Array, below: Float64Array, k: number): number {
  const rows = above.length;
  const cols = below.length;
  const left = new Int32Array(rows);
  const right = new Int32Array(rows).fill(cols);
  let skipped = 0;
  let remaining = rows * cols;
  // Each pass removes about a quarter; the bound only matters should rounding upset the order.
  for (let pass = 0; pass < 200 && remaining > rows; pass++) {
    const trial = middleOfRows(above, below, left, right);
    const greater = countsPast(above, below, (value) => value > trial);
    const atLeast = countsPast(above, below, (value) => value >= trial);
    if (k < sum(greater)) right.set(greater);
    else if (k >= sum(atLeast)) {
      left.set(atLeast);
      skipped = sum(atLeast);
    } else return trial;
    remaining = sum(right) - skipped;
  }
  const rest: number[] = [];
  for (let i = 0; i < rows; i++) for (let j = left[i]!; j < right[i]!; j++) rest.push(kernel(above, below, i, j));
  rest.sort((a, b) => b - a);
  return rest[k - skipped]!;
}

function sum(counts: Int32Array): number {
  return counts.reduce((total, count) => total + count, 0);
}

/** How many entries at the start of each row pass the test. */
function countsPast(above: Float64Array, below: Float64Array, passes: (value: number) => boolean): Int32Array {
  const counts = new Int32Array(above.length);
  let j = 0;
  for (let i = above.length - 1; i >= 0; i--) {
    while (j < below.length && passes(kernel(above, below, i, j))) j++;
    counts[i] = j;
  }
  return counts;
}

/** Median of the rows' middle entries, each weighted by what is left of its row. */
function middleOfRows(above: Float64Array, below: Float64Array, left: Int32Array, right: Int32Array): number {
  const middles: { value: number; weight: number }[] = [];
  let total = 0;
  for (let i = 0; i < above.length; i++) {
    const weight = right[i]! - left[i]!;
    if (weight <= 0) continue;
    middles.push({ value: kernel(above, below, i, left[i]! + (weight >> 1)), weight });
    total += weight;
  }
  middles.sort((a, b) => b.value - a.value);
  let seen = 0;
  for (const { value, weight } of middles) {
    seen += weight;
    if (2 * seen >= total) return value;
  }
  return middles[middles.length - 1]!.value;
}
