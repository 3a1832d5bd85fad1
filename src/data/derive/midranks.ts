/**
 * Ranks from 1, ties given their mean rank, missing values left out.
 *
 * @param values any numbers, NaN = missing
 * @returns one rank a row, NaN where the value is missing
 * @source common practice: midrank = (first + last place of a run of equal values) / 2
 * @checked by hand, exactly
 */
export function midranks(values: Float64Array): Float64Array {
  const order = Array.from(values.keys()).filter((row) => !Number.isNaN(values[row]));
  order.sort((a, b) => (values[a] as number) - (values[b] as number));
  const ranks = new Float64Array(values.length).fill(Number.NaN);
  for (let first = 0; first < order.length; ) {
    let last = first;
    while (last + 1 < order.length && values[order[last + 1] as number] === values[order[first] as number]) last++;
    for (let place = first; place <= last; place++) ranks[order[place] as number] = (first + last) / 2 + 1;
    first = last + 1;
  }
  return ranks;
}
