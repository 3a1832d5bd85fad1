/** A comparison of two conditions among several, by their places in the given order; first minus second. */
export interface Pair {
  readonly first: number;
  readonly second: number;
}

/**
 * All pairs of k conditions in their order.
 * @param k number of conditions, at least 2
 * @returns k (k - 1) / 2 pairs: 0-1, 0-2, ..., 1-2, ...
 * @throws RangeError when k is not a whole number of at least 2
 * @source common practice
 * @checked by hand
 */
export function allPairs(k: number): Pair[] {
  if (!Number.isInteger(k) || k < 2) throw new RangeError(`*k* must be a whole number of at least 2; got ${k}`);
  const pairs: Pair[] = [];
  for (let first = 0; first < k; first++) {
    for (let second = first + 1; second < k; second++) pairs.push({ first, second });
  }
  return pairs;
}
