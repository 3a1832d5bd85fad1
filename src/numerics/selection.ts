/** k-th smallest of all pairwise sums without forming them. */

/** All sums a[i] + b[j], or only those with j >= i when `triangle` (a and b then the same scores). */
interface Sums {
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly triangle: boolean;
}

function countUpTo(sums: Sums, value: number): number {
  const { a, b, triangle } = sums;
  let count = 0;
  let j = b.length;
  for (let i = 0; i < a.length; i++) {
    const own = a[i] as number;
    while (j > 0 && own + (b[j - 1] as number) > value) j--;
    const from = triangle ? i : 0;
    if (j > from) count += j - from;
  }
  return count;
}

function between(sums: Sums, low: number, high: number, size: number): Float64Array {
  const { a, b, triangle } = sums;
  const out = new Float64Array(size);
  let at = 0;
  let j = b.length;
  for (let i = 0; i < a.length; i++) {
    const own = a[i] as number;
    while (j > 0 && own + (b[j - 1] as number) > high) j--;
    for (let m = j - 1; m >= (triangle ? i : 0) && own + (b[m] as number) > low; m--)
      out[at++] = own + (b[m] as number);
  }
  return out.sort();
}

function kth(sums: Sums, k: number): number {
  const { a, b } = sums;
  let low = -Infinity;
  let high = (a[a.length - 1] as number) + (b[b.length - 1] as number);
  let below = 0;
  let upTo = sums.triangle ? (a.length * (a.length + 1)) / 2 : a.length * b.length;
  const few = 4 * (a.length + b.length) + 64;
  let bottom = (a[0] as number) + (b[0] as number);
  // Bisection over the values; the invariant is count(<= low) = below < k <= upTo = count(<= high).
  while (upTo - below > few) {
    const middle = bottom + (high - bottom) / 2;
    if (!(middle < high) || middle <= low) return high;
    const count = countUpTo(sums, middle);
    if (count >= k) {
      high = middle;
      upTo = count;
    } else {
      low = middle;
      bottom = middle;
      below = count;
    }
  }
  return between(sums, low, high, upTo - below)[k - below - 1] as number;
}

function requireRank(k: number, size: number): void {
  if (!(Number.isInteger(k) && k >= 1 && k <= size)) {
    throw new RangeError(`*k* must be an integer from 1 to ${size}; got ${k}`);
  }
}

/**
 * k-th smallest Walsh average.
 * @param s ascending scores, at least one, finite
 * @param k rank, 1 to n(n+1)/2
 * @returns k-th smallest of (s[i] + s[j]) / 2 over i <= j, in the scores' unit
 * @throws RangeError when k is out of range
 * @source Johnson & Mizoguchi (1978): count over a sorted matrix; here bisection on the value, then the few left sorted
 * @checked agrees with sorting all averages, exactly
 */
export function walshAverage(s: Float64Array, k: number): number {
  requireRank(k, (s.length * (s.length + 1)) / 2);
  return kth({ a: s, b: s, triangle: true }, k) / 2;
}

/**
 * k-th smallest difference between two groups.
 * @param s ascending scores of the first group, at least one, finite
 * @param t ascending scores of the second group, at least one, finite
 * @param k rank, 1 to n1 n2
 * @returns k-th smallest of s[i] - t[j], in the scores' unit
 * @throws RangeError when k is out of range
 * @source Johnson & Mizoguchi (1978): count over a sorted matrix; here bisection on the value, then the few left sorted
 * @checked agrees with sorting all differences, exactly
 */
export function pairDifference(s: Float64Array, t: Float64Array, k: number): number {
  requireRank(k, s.length * t.length);
  const negated = Float64Array.from(t, (score) => -score).reverse();
  return kth({ a: s, b: negated, triangle: false }, k);
}
