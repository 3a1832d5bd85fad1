/**
 * Resamples as counts of ranks: with the scores sorted once, a resample is a count per rank, and every statistic of order
 * is read off in one walk. Resamples are drawn in blocks with a stream of their own, so that the result depends neither
 * on how many are drawn together nor by whom.
 */
import { LARGEST_BOUND, startState } from './rng.ts';

/** Above this many scores one 32-bit word gives one draw instead of two. */
const LARGEST_SHORT = 16_000;

/**
 * Resamples in one block, a function of the number of scores only.
 * @param n number of scores in all groups together, >= 1
 * @returns between 8 and 512 resamples
 * @source design of the kernels: blocks of about 100,000 draws
 * @checked by hand
 */
export function blockSize(n: number): number {
  return Math.max(8, Math.min(512, Math.floor(131_072 / n)));
}

/**
 * Draws a resample of n ranks into counts.
 * @param counts n counts, added to (all zero before the call for a plain resample)
 * @param n number of scores, 1 to 2^21
 * @param state four words of the generator, advanced
 * @throws RangeError when n is out of range or `counts` is shorter than n
 * @source Lemire (2019), two exact bounded 16-bit draws a word for n <= 16,000, one 32-bit draw beyond
 * @checked theory: counts are multinomial; agrees with exact enumeration of the bootstrap mean and SD
 */
export function drawCounts(counts: Int32Array, n: number, state: Int32Array): void {
  requireSize(n, counts);
  if (n <= LARGEST_SHORT) drawShort(counts, n, state);
  else drawLong(counts, n, state);
}

function requireSize(n: number, counts: Int32Array): void {
  if (!(Number.isInteger(n) && n >= 1 && n <= LARGEST_BOUND && counts.length >= n)) {
    throw new RangeError(`*n* must be an integer from 1 to ${LARGEST_BOUND} with as many counts; got ${n}`);
  }
}

// The generator's four words live in local variables here: in an array they cost three times as much. Four draws a turn
// also make this function long enough for the engine to leave it alone: merged into its callers it takes twice the time.
function drawShort(counts: Int32Array, n: number, state: Int32Array): void {
  let a = state[0] as number;
  let b = state[1] as number;
  let c = state[2] as number;
  let d = state[3] as number;
  const reject = 65_536 % n;
  let left = n;
  while (left >= 4) {
    let t = (((a + b) | 0) + d) | 0;
    d = (d + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + t) | 0;
    let m = (t & 0xffff) * n;
    if ((m & 0xffff) >= reject) {
      counts[m >>> 16]!++;
      left--;
    }
    m = (t >>> 16) * n;
    if ((m & 0xffff) >= reject) {
      counts[m >>> 16]!++;
      left--;
    }
    t = (((a + b) | 0) + d) | 0;
    d = (d + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + t) | 0;
    m = (t & 0xffff) * n;
    if ((m & 0xffff) >= reject) {
      counts[m >>> 16]!++;
      left--;
    }
    m = (t >>> 16) * n;
    if ((m & 0xffff) >= reject) {
      counts[m >>> 16]!++;
      left--;
    }
  }
  while (left > 0) {
    const t = (((a + b) | 0) + d) | 0;
    d = (d + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + t) | 0;
    const low = (t & 0xffff) * n;
    if ((low & 0xffff) >= reject) {
      counts[low >>> 16]!++;
      left--;
    }
    const high = (t >>> 16) * n;
    if ((high & 0xffff) >= reject && left > 0) {
      counts[high >>> 16]!++;
      left--;
    }
  }
  state[0] = a;
  state[1] = b;
  state[2] = c;
  state[3] = d;
}

function drawLong(counts: Int32Array, n: number, state: Int32Array): void {
  let a = state[0] as number;
  let b = state[1] as number;
  let c = state[2] as number;
  let d = state[3] as number;
  const reject = 2 ** 32 % n;
  let left = n;
  while (left > 0) {
    const t = (((a + b) | 0) + d) | 0;
    d = (d + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + t) | 0;
    const product = (t >>> 0) * n;
    const high = Math.floor(product * 2 ** -32);
    if (product - high * 2 ** 32 >= reject) {
      counts[high]!++;
      left--;
    }
  }
  state[0] = a;
  state[1] = b;
  state[2] = c;
  state[3] = d;
}

/**
 * Runs B resamples of one or more groups, block by block.
 * @param sizes number of scores per group, each 1 to 2^21
 * @param B number of resamples, >= 1
 * @param seed 0 to 2^32 - 1
 * @param read called with each resample's counts per group and its index; must leave every count at 0
 * @param streamNumber stream of the seed (default 0)
 * @throws RangeError when a size, B or the seed is out of range
 * @source design of the kernels: block i draws from (i, stream, seed)
 * @checked invariance: any way of cutting B into runs of whole blocks gives the same resamples
 */
export function resample(
  sizes: readonly number[],
  B: number,
  seed: number,
  read: (counts: readonly Int32Array[], index: number) => void,
  streamNumber = 0,
): void {
  if (!(Number.isInteger(B) && B >= 1)) throw new RangeError(`*B* must be a whole number of at least 1; got ${B}`);
  const counts = sizes.map((n) => new Int32Array(n));
  const perBlock = blockSize(sizes.reduce((total, n) => total + n, 0));
  const state = new Int32Array(4);
  for (const own of counts) requireSize(own.length, own);
  const groups = counts.length;
  for (let index = 0; index < B; index++) {
    if (index % perBlock === 0) startState(state, index / perBlock, streamNumber, seed);
    for (let i = 0; i < groups; i++) {
      const own = counts[i] as Int32Array;
      if (own.length <= LARGEST_SHORT) drawShort(own, own.length, state);
      else drawLong(own, own.length, state);
    }
    read(counts, index);
  }
}
