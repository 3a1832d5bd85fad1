import { describe, expect, it } from 'vitest';
import { LARGEST_BOUND, nextWord, rng, startState } from '../../src/numerics/rng.ts';

describe('random numbers', () => {
  it('agrees with a separate transcription of sfc32 in Python integers (exactly)', () => {
    const words = (block: number, stream: number, seed: number) => {
      const state = new Int32Array(4);
      startState(state, block, stream, seed);
      return [0, 1, 2, 3].map(() => nextWord(state));
    };
    expect(words(0, 0, 42)).toEqual([2686069954, 3236264550, 1186848219, 4079569716]);
    expect(words(3, 7, 123456789)).toEqual([2688552083, 2089509958, 2622626828, 2731093917]);
    const random = rng(42);
    expect(Array.from({ length: 8 }, () => random.below(10))).toEqual([6, 7, 2, 9, 3, 4, 3, 9]);
  });
  it('by hand: a stream is block 0, its fork i is block i + 1 of the same seed', () => {
    const state = new Int32Array(4);
    startState(state, 6, 3, 9);
    expect(rng(9, 3).fork(5).word()).toBe(nextWord(state));
  });
  it('theory: bounded draws are uniform (chi-square of 7 cells below its .9999 point, seed 1)', () => {
    const random = rng(1);
    const counts = new Float64Array(7);
    for (let i = 0; i < 70_000; i++) counts[random.below(7)]! += 1;
    let chiSquare = 0;
    for (const count of counts) chiSquare += (count - 10_000) ** 2 / 10_000;
    // .9999 point of chi-square on 6 df: 27.86 (common practice)
    expect(chiSquare).toBeLessThan(27.86);
  });
  it('theory: uniform draws have mean 1/2 and variance 1/12 within 4 SE (seed 2)', () => {
    const random = rng(2);
    let total = 0;
    let squares = 0;
    const n = 50_000;
    for (let i = 0; i < n; i++) {
      const u = random.uniform();
      expect(u >= 0 && u < 1).toBe(true);
      total += u;
      squares += (u - 0.5) ** 2;
    }
    expect(Math.abs(total / n - 0.5)).toBeLessThan(4 * Math.sqrt(1 / 12 / n));
    expect(Math.abs(squares / n - 1 / 12)).toBeLessThan(4 * Math.sqrt(1 / 180 / n));
  });
  it('invariance: a fork does not depend on what was drawn before', () => {
    const fresh = rng(5).fork(2);
    const used = rng(5);
    for (let i = 0; i < 100; i++) used.word();
    expect(used.fork(2).word()).toBe(fresh.word());
  });
  it('theory: forks of forks, streams and seeds all differ in their first word', () => {
    const words = new Set<number>();
    for (let i = 0; i < 20; i++) {
      words
        .add(rng(i).word())
        .add(rng(0, i + 1).word())
        .add(rng(0).fork(i).word());
      for (let j = 0; j < 20; j++) words.add(rng(0).fork(i).fork(j).word());
    }
    expect(words.size).toBe(460);
  });
  it('degenerate: one outcome takes a draw and gives 0', () => {
    expect(rng(0).below(1)).toBe(0);
  });
  it('refuses seeds, forks and bounds that are not words', () => {
    for (const seed of [-1, 2 ** 32, 1.5, Number.NaN]) expect(() => rng(seed)).toThrow('*seed* must be an integer');
    expect(() => rng(1).fork(-1)).toThrow('*i* must be an integer');
    for (const n of [0, 1.5, LARGEST_BOUND + 1]) expect(() => rng(1).below(n)).toThrow('*n* must be an integer');
  });
});
