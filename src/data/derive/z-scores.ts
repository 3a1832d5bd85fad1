/**
 * Distance of each value from the mean of all, in SDs (n - 1).
 *
 * @param values any numbers, NaN = missing
 * @returns one z a row, NaN where the value is missing; or why there is none, as it stands after "because"
 * @source z = (x - mean) / SD, SD^2 = sum (x - mean)^2 / (n - 1): common practice
 * @checked by hand, 1e-15
 */
export function zScores(values: Float64Array): Float64Array | string {
  let n = 0;
  let largest = 0;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    n++;
    largest = Math.max(largest, Math.abs(value));
  }
  if (n < 2) return 'fewer than two rows have a value';
  // In units of the largest value, so that no square is beyond the largest number.
  const unit = largest || 1;
  let sum = 0;
  for (const value of values) if (!Number.isNaN(value)) sum += value / unit;
  const mean = sum / n;
  let squares = 0;
  for (const value of values) if (!Number.isNaN(value)) squares += (value / unit - mean) ** 2;
  const sd = Math.sqrt(squares / (n - 1));
  if (!(sd > 1e-15)) return 'all its values are the same';
  return values.map((value) => (value / unit - mean) / sd);
}
