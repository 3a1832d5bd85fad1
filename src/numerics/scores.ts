/** What every numerics function asks of the scores it is given. */

/** Scores beyond this size would overflow when squared and summed. */
const LARGEST = 1e150;

/**
 * Refuses scores that are not finite numbers, are too large to square, or are too few.
 * @param scores scores, any length
 * @param least smallest length allowed
 * @param name the argument's name in the message
 * @throws RangeError when a score is NaN, infinite or beyond 1e150 in size, or there are fewer than `least`
 * @source common practice
 * @checked by hand
 */
export function requireScores(scores: ArrayLike<number>, least = 1, name = 'x'): void {
  if (scores.length < least) {
    throw new RangeError(`*${name}* must hold at least ${least} score${least === 1 ? '' : 's'}; got ${scores.length}`);
  }
  for (let i = 0; i < scores.length; i++) {
    const score = scores[i] as number;
    if (!(Math.abs(score) <= LARGEST)) {
      throw new RangeError(`*${name}* must hold finite numbers up to 1e150 in size; got ${score} at index ${i}`);
    }
  }
}

/**
 * Refuses two vectors of unequal length.
 * @param x scores
 * @param y scores, paired with `x`
 * @throws RangeError when the lengths differ
 * @source common practice
 * @checked by hand
 */
export function requirePairs(x: ArrayLike<number>, y: ArrayLike<number>): void {
  if (x.length !== y.length) throw new RangeError(`*y* must be as long as *x* (${x.length}); got ${y.length}`);
}

/**
 * Number of scores trimmed at EACH end, from an integer percentage.
 * @param n number of scores, >= 0
 * @param trim integer percentage at each end, 0 to 49
 * @returns g = floor(trim n / 100), exact (no rounding of a fraction such as .29)
 * @throws RangeError when `trim` is not a whole number from 0 to 49
 * @source Tukey & McLaughlin (1963): g = [gamma n], h = n - 2g
 * @checked by hand: 29 % of 100 is 29
 */
export function trimCount(n: number, trim: number): number {
  if (!Number.isInteger(trim) || trim < 0 || trim >= 50) {
    throw new RangeError(`*trim* must be a whole percentage from 0 to 49; got ${trim}`);
  }
  return Math.floor((trim * n) / 100);
}

/**
 * Differences of pairs, first minus second.
 * @param x scores
 * @param y scores, same length
 * @returns x[i] - y[i]
 * @throws RangeError when the lengths differ
 * @source common practice
 * @checked by hand
 */
export function differences(x: Float64Array, y: Float64Array): Float64Array {
  requirePairs(x, y);
  const d = new Float64Array(x.length);
  for (let i = 0; i < d.length; i++) d[i] = (x[i] as number) - (y[i] as number);
  return d;
}
