/** Above this length a sample of the range is selected first, so that its pivot falls close to the place wanted. */
const SAMPLED = 600;

/**
 * The k-th smallest number of a working array, without sorting all of it.
 * @param values numbers; REARRANGED in place: nothing before place k is larger, nothing behind it smaller (the one argument
 *   that is modified)
 * @param k place, *left* to *right*
 * @param left first place of the range, default 0
 * @param right last place of the range, default the last
 * @returns the number that would stand at place k after sorting the range
 * @throws RangeError when *k* is not a place of the range
 * @source Floyd & Rivest 1975, Commun. ACM 18, 165-172: partition around a pivot from a sample near the place
 * @checked against sorting, exact
 */
export function select(values: Float64Array, k: number, left = 0, right = values.length - 1): number {
  if (!Number.isInteger(k) || k < left || k > right) {
    throw new RangeError(`*k* must be a whole number from ${left} to ${right}; got ${k}`);
  }
  while (left < right) {
    if (right - left > SAMPLED) selectInSample(values, k, left, right);
    const pivot = right - left > SAMPLED ? values[k]! : middleOfThree(values, left, right);
    let i = left;
    let j = right;
    while (i <= j) {
      while (values[i]! < pivot) i++;
      while (values[j]! > pivot) j--;
      if (i > j) break;
      const kept = values[i]!;
      values[i++] = values[j]!;
      values[j--] = kept;
    }
    if (k <= j) right = j;
    else if (k >= i) left = i;
    else break;
  }
  return values[k]!;
}

function selectInSample(values: Float64Array, k: number, left: number, right: number): void {
  const n = right - left + 1;
  const place = k - left + 1;
  const size = 0.5 * Math.exp((2 * Math.log(n)) / 3);
  const shift = 0.5 * Math.sqrt((Math.log(n) * size * (n - size)) / n) * Math.sign(place - n / 2);
  const from = Math.max(left, Math.floor(k - (place * size) / n + shift));
  const to = Math.min(right, Math.floor(k + ((n - place) * size) / n + shift));
  select(values, k, Math.min(from, k), Math.max(to, k));
}

function middleOfThree(values: Float64Array, left: number, right: number): number {
  const a = values[left]!;
  const b = values[(left + right) >> 1]!;
  const c = values[right]!;
  return a < b ? (b < c ? b : Math.max(a, c)) : a < c ? a : Math.max(b, c);
}
