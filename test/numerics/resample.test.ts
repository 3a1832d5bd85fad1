import { describe, expect, it } from 'vitest';
import { blockSize, drawCounts, resample } from '../../src/numerics/resample.ts';
import { startState } from '../../src/numerics/rng.ts';

function started(seed: number): Int32Array {
  const state = new Int32Array(4);
  startState(state, 0, 0, seed);
  return state;
}

describe('resampling by counts', () => {
  it('agrees with a separate transcription in Python: two 16-bit draws a word (exactly)', () => {
    const counts = new Int32Array(5);
    drawCounts(counts, 5, started(42));
    expect([...counts]).toEqual([1, 0, 1, 2, 1]);
  });
  it('theory: counts are multinomial, short and long draws (mean and variance of a count within 4 SE, seed 3)', () => {
    // A count is binomial(n, 1/n): variance 1 - 1/n; over all ranks sum (c - 1)^2 has mean n - 1, SD about sqrt(2 n).
    for (const n of [500, 20_000]) {
      const counts = new Int32Array(n);
      drawCounts(counts, n, started(3));
      expect(counts.reduce((all, c) => all + c, 0)).toBe(n);
      const spread = counts.reduce((all, c) => all + (c - 1) ** 2, 0);
      expect(Math.abs(spread - (n - 1))).toBeLessThan(4 * Math.sqrt(2 * n));
      const firstHalf = counts.subarray(0, n / 2).reduce((all, c) => all + c, 0);
      expect(Math.abs(firstHalf - n / 2)).toBeLessThan(4 * Math.sqrt(n / 4));
    }
  });
  it('invariance: the first resamples do not depend on how many are asked for', () => {
    const drawn = (B: number) => {
      const all: number[][] = [];
      resample([6, 3], B, 11, (counts) => {
        all.push(counts.flatMap((own) => [...own]));
        for (const own of counts) own.fill(0);
      });
      return all;
    };
    expect(drawn(700).slice(0, 20)).toEqual(drawn(20));
    // A new block starts from its own state: resample 512 is the first of block 1.
    const counts = new Int32Array(6);
    const state = new Int32Array(4);
    startState(state, 1, 0, 11);
    drawCounts(counts, 6, state);
    expect(drawn(513)[512]?.slice(0, 6)).toEqual([...counts]);
  });
  it('degenerate: one score', () => {
    const counts = new Int32Array(1);
    drawCounts(counts, 1, started(1));
    expect([...counts]).toEqual([1]);
    expect([blockSize(1), blockSize(40), blockSize(1e6)]).toEqual([512, 512, 8]);
  });
  it('refuses no resamples, no scores, too many scores', () => {
    expect(() => resample([3], 0, 1, () => {})).toThrow('*B* must be a whole number');
    expect(() => drawCounts(new Int32Array(0), 0, started(1))).toThrow('*n* must be an integer');
    expect(() => drawCounts(new Int32Array(2), 3, started(1))).toThrow(RangeError);
  });
});
