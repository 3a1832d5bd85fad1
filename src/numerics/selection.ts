/** k-th smallest of a list without sorting it, and of all pairwise sums without forming them. */

/** Sums a[i] + b[j], both ascending, over all j or only over j >= from(i). */
interface Sums {
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly from: (i: number) => number;
  /** Number of sums. */
  readonly size: number;
}

const everyOne = () => 0;

function countUpTo(sums: Sums, value: number): number {
  const { a, b, from } = sums;
  let count = 0;
  let j = b.length;
  for (let i = 0; i < a.length; i++) {
    const own = a[i] as number;
    while (j > 0 && own + (b[j - 1] as number) > value) j--;
    count += Math.max(0, j - from(i));
  }
  return count;
}

function between(sums: Sums, low: number, high: number, size: number): Float64Array {
  const { a, b, from } = sums;
  const out = new Float64Array(size);
  let at = 0;
  let j = b.length;
  for (let i = 0; i < a.length; i++) {
    const own = a[i] as number;
    while (j > 0 && own + (b[j - 1] as number) > high) j--;
    for (let m = j - 1; m >= from(i) && own + (b[m] as number) > low; m--) out[at++] = own + (b[m] as number);
  }
  return out.sort();
}

function kth(sums: Sums, k: number): number {
  const { a, b } = sums;
  let low = -Infinity;
  let high = (a[a.length - 1] as number) + (b[b.length - 1] as number);
  let below = 0;
  let upTo = sums.size;
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
  const size = (s.length * (s.length + 1)) / 2;
  requireRank(k, size);
  return kth({ a: s, b: s, from: (i) => i, size }, k) / 2;
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
  const size = s.length * t.length;
  requireRank(k, size);
  return kth({ a: s, b: t.map((score) => -score).reverse(), from: everyOne, size }, k);
}

/**
 * k-th smallest distance between two scores of one sample.
 * @param s ascending scores, at least two, finite
 * @param k rank, 1 to n(n-1)/2
 * @returns k-th smallest of s[j] - s[i] over i < j, in the scores' unit
 * @throws RangeError when k is out of range
 * @source Johnson & Mizoguchi (1978): count over a sorted matrix; here bisection on the value, then the few left sorted
 * @checked agrees with sorting all distances, exactly
 */
export function pairDistance(s: Float64Array, k: number): number {
  const n = s.length;
  const size = (n * (n - 1)) / 2;
  requireRank(k, size);
  // Over all ordered pairs the distances s[i] - s[j] with i <= j come first (none positive): n(n+1)/2 of them.
  const all = { a: s, b: s.map((score) => -score).reverse(), from: everyOne, size: n * n };
  return kth(all, size + n + k);
}

/**
 * k-th smallest of a list, which is reordered on the way (pass a copy).
 * @param list numbers, at least one, no NaN; afterwards nothing before place k - 1 is larger and nothing after it smaller
 * @param k rank, 1 to the length
 * @returns the k-th smallest
 * @throws RangeError when k is out of range
 * @source Hoare (1961), partition about the middle of three
 * @checked agrees with sorting, exactly
 */
export function selectKth(list: Float64Array, k: number): number {
  requireRank(k, list.length);
  const target = k - 1;
  let low = 0;
  let high = list.length - 1;
  while (low < high) {
    const pivot = middleOfThree(list[low] as number, list[(low + high) >> 1] as number, list[high] as number);
    let i = low;
    let j = high;
    while (i <= j) {
      while ((list[i] as number) < pivot) i++;
      while ((list[j] as number) > pivot) j--;
      if (i > j) break;
      const swap = list[i] as number;
      list[i++] = list[j] as number;
      list[j--] = swap;
    }
    if (target <= j) high = j;
    else if (target >= i) low = i;
    else break;
  }
  return list[target] as number;
}

function middleOfThree(a: number, b: number, c: number): number {
  return Math.max(Math.min(a, b), Math.min(Math.max(a, b), c));
}
