/**
 * Seeded random numbers, identical to the bit in every engine.
 *
 * Definition (part of every recorded result): the generator sfc32 (published in the PractRand suite; public domain),
 * started from the four words (block, stream, seed, 1) with 15 rounds discarded. A bounded draw is a multiply and reject
 * (Lemire 2019), so every outcome is exactly equally likely.
 */

/** A stream of random numbers. */
export interface Rng {
  /** Next 32-bit word, 0 to 2^32 - 1. */
  word(): number;
  /** Uniform on [0, 1) with 53 bits. */
  uniform(): number;
  /** Integer from 0 to n - 1, each exactly equally likely; n up to 2^21. */
  below(n: number): number;
  /** Independent stream number i (0 to 2^32 - 2) of the same seed; does not depend on what was drawn before. */
  fork(i: number): Rng;
}

/** Rounds discarded after starting: 8 fail a battery of tests, 12 and 15 pass. */
const DISCARDED = 15;

/** Largest n of a bounded draw: the product with a 32-bit word stays exact. */
export const LARGEST_BOUND = 2 ** 21;

function requireWord(value: number, name: string): void {
  if (!(Number.isInteger(value) && value >= 0 && value < 2 ** 32)) {
    throw new RangeError(`*${name}* must be an integer from 0 to 2^32 - 1; got ${value}`);
  }
}

/**
 * Starts the generator's state for one block.
 * @param state four words, overwritten (the one argument that is)
 * @param block block number, 0 to 2^32 - 1
 * @param stream stream number, 0 to 2^32 - 1
 * @param seed seed, 0 to 2^32 - 1
 * @throws RangeError when a number is not a 32-bit word
 * @source sfc32 (Doty-Humphrey, PractRand), started from (block, stream, seed, 1), 15 rounds discarded
 * @checked by hand: words of a separate transcription
 */
export function startState(state: Int32Array, block: number, stream: number, seed: number): void {
  requireWord(block, 'block');
  requireWord(stream, 'stream');
  requireWord(seed, 'seed');
  state[0] = block | 0;
  state[1] = stream | 0;
  state[2] = seed | 0;
  state[3] = 1;
  for (let i = 0; i < DISCARDED; i++) nextWord(state);
}

/**
 * Next word of a state.
 * @param state four words, advanced
 * @returns 32-bit word, 0 to 2^32 - 1
 * @source sfc32: t = a+b+d; d += 1; a = b ^ b>>>9; b = c + (c<<3); c = rotl(c, 21) + t; output t
 * @checked by hand: words of a separate transcription
 */
export function nextWord(state: Int32Array): number {
  const b = state[1] as number;
  const c = state[2] as number;
  const d = state[3] as number;
  const t = (((state[0] as number) + b) | 0) + d;
  state[3] = (d + 1) | 0;
  state[0] = b ^ (b >>> 9);
  state[1] = (c + (c << 3)) | 0;
  state[2] = (((c << 21) | (c >>> 11)) + t) | 0;
  return t >>> 0;
}

/** Mixes two words into a stream number: murmur3's finalizer (public domain), so that forks of forks do not meet. */
function mix(stream: number, block: number): number {
  let h = (stream ^ Math.imul(block + 1, 0x9e3779b1)) | 0;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}

function stream(seed: number, streamNumber: number, block: number): Rng {
  const state = new Int32Array(4);
  startState(state, block, streamNumber, seed);
  return {
    word: () => nextWord(state),
    uniform: () => ((nextWord(state) >>> 5) * 2 ** 26 + (nextWord(state) >>> 6)) / 2 ** 53,
    below: (n) => drawBelow(state, n),
    fork: (i) => {
      requireWord(i, 'i');
      return block === 0 ? stream(seed, streamNumber, i + 1) : stream(seed, mix(streamNumber, block), i + 1);
    },
  };
}

function drawBelow(state: Int32Array, n: number): number {
  if (!(Number.isInteger(n) && n >= 1 && n <= LARGEST_BOUND)) {
    throw new RangeError(`*n* must be an integer from 1 to ${LARGEST_BOUND}; got ${n}`);
  }
  const reject = 2 ** 32 % n;
  for (;;) {
    const product = nextWord(state) * n;
    const high = Math.floor(product / 2 ** 32);
    if (product - high * 2 ** 32 >= reject) return high;
  }
}

/**
 * A stream of random numbers from a seed.
 * @param seed 0 to 2^32 - 1
 * @param streamNumber separate streams of one seed, 0 to 2^32 - 1 (default 0): one per test, so that one stopping early
 *   does not shift another
 * @returns block 0 of the stream; `fork(i)` gives block i + 1
 * @throws RangeError when a number is not a 32-bit word
 * @source sfc32 (Doty-Humphrey, PractRand); bounded draws of Lemire (2019)
 * @checked by hand: words of a separate transcription; theory: uniform counts within 4 SE
 */
export function rng(seed: number, streamNumber = 0): Rng {
  return stream(seed, streamNumber, 0);
}
