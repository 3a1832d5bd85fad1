/** What one method came to in one simulated experiment, as marks that add up. */
export const OUTCOME = {
  /** The method gave a decision. */
  judged: 1,
  /** It rejected equality. */
  rejected: 2,
  /** It has an interval. */
  hasInterval: 4,
  /** The interval held the true value. */
  covered: 8,
} as const;

/**
 * The marks of a t test.
 * @param estimate estimate
 * @param se its standard error
 * @param truth true value, same unit
 * @param critical critical value for this |t|
 * @returns marks; 0 where the standard error is not positive
 * @source a test rejects where |estimate| / se exceeds the critical value; its interval covers where |estimate - truth| / se
 *   does not
 * @checked by hand
 */
export function tOutcome(estimate: number, se: number, truth: number, critical: (t: number) => number): number {
  if (!(se > 0)) return 0;
  const t = Math.abs(estimate) / se;
  const off = Math.abs(estimate - truth) / se;
  let marks: number = OUTCOME.judged | OUTCOME.hasInterval;
  if (t > critical(t)) marks |= OUTCOME.rejected;
  if (off <= critical(off)) marks |= OUTCOME.covered;
  return marks;
}

/**
 * Sorts few scores in place, by insertion where that is quicker.
 * @param x scores, overwritten (the one argument that is)
 * @returns the same vector, ascending
 * @source common practice
 * @checked agrees with sort
 */
export function sortInPlace(x: Float64Array): Float64Array {
  if (x.length > 48) return x.sort();
  for (let i = 1; i < x.length; i++) {
    const score = x[i] as number;
    let at = i - 1;
    while (at >= 0 && (x[at] as number) > score) {
      x[at + 1] = x[at] as number;
      at--;
    }
    x[at + 1] = score;
  }
  return x;
}
