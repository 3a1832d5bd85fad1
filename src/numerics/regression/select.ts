/**
 * The k-th smallest number of a working array, without sorting all of it.
 * @param values numbers; REARRANGED in place, so that repeated calls get faster (the one argument that is modified)
 * @param k place, 0 to length - 1
 * @returns the number that would stand at place k after sorting
 * @throws RangeError when *k* is not a place of *values*
 * @source Hoare 1961, Commun. ACM 4, 321-322; middle of three as pivot
 * @checked against sorting, exact
 */
export function select(values: Float64Array, k: number): number {
  if (!Number.isInteger(k) || k < 0 || k >= values.length) {
    throw new RangeError(`*k* must be a whole number from 0 to ${values.length - 1}; got ${k}`);
  }
  let left = 0;
  let right = values.length - 1;
  while (left < right) {
    const pivot = middleOfThree(values[left]!, values[(left + right) >> 1]!, values[right]!);
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

function middleOfThree(a: number, b: number, c: number): number {
  return a < b ? (b < c ? b : Math.max(a, c)) : a < c ? a : Math.max(b, c);
}
