import { describe, expect, it } from 'vitest';
import { medianSorted, sorted } from '../../src/numerics/order.ts';
import {
  blockSize,
  drawCounts,
  resample,
  walkExpand,
  walkMedian,
  walkTrimmedSum,
  walkWinsorized,
  winsorWalk,
} from '../../src/numerics/resample.ts';
import { startState } from '../../src/numerics/rng.ts';
import { close, scores, uneven } from './samples.ts';

function started(seed: number): Int32Array {
  const state = new Int32Array(4);
  startState(state, 0, 0, seed);
  return state;
}

function expanded(s: Float64Array, counts: Int32Array): Float64Array {
  return Float64Array.from([...counts].flatMap((times, i) => Array(times).fill(s[i]) as number[]));
}

describe('resampling by counts', () => {
  it('agrees with a separate transcription in Python: two 16-bit draws a word (exactly)', () => {
    const counts = new Int32Array(5);
    drawCounts(counts, 5, started(42));
    expect([...counts]).toEqual([1, 0, 1, 2, 1]);
  });
  it('by hand: walks over 1, 2, 5, 9 drawn 0, 1, 2, 1 times', () => {
    const s = scores(1, 2, 5, 9);
    const counts = () => Int32Array.from([0, 1, 2, 1]);
    expect(walkTrimmedSum(s, counts(), 0)).toBe(21);
    expect(walkTrimmedSum(s, counts(), 1)).toBe(10);
    expect(walkMedian(s, counts())).toBe(5);
    const walk = winsorWalk();
    walkWinsorized(s, counts(), 1, walk);
    expect(walk).toEqual({ trimmed: 10, sum: 20, squares: 100, low: 5, high: 5 });
    expect(blockSize(40)).toBe(512);
  });
  it('agrees with sorting the resample: trimmed, winsorized, median, expanded (rtol 1e-12)', () => {
    const state = started(7);
    const walk = winsorWalk();
    for (const n of [1, 2, 3, 10, 37]) {
      const s = sorted(uneven(n));
      for (let g = 0; 2 * g < n; g++) {
        const counts = new Int32Array(n);
        drawCounts(counts, n, state);
        const plain = expanded(s, counts);
        const kept = plain.subarray(g, n - g);
        const total = kept.reduce((all, x) => all + x, 0);
        const low = kept[0] as number;
        const high = kept[kept.length - 1] as number;
        expect(close(walkTrimmedSum(s, counts.slice(), g), total, 1e-12)).toBe(true);
        walkWinsorized(s, counts.slice(), g, walk);
        expect(close(walk.sum, total + g * (low + high), 1e-12)).toBe(true);
        const squares = kept.reduce((all, x) => all + x * x, 0) + g * (low * low + high * high);
        expect(close(walk.squares, squares, 1e-12)).toBe(true);
        expect([walk.low, walk.high]).toEqual([low, high]);
        expect(walkMedian(s, counts.slice())).toBe(medianSorted(plain));
        const buffer = new Float64Array(n);
        walkExpand(s, counts, buffer);
        expect(buffer).toEqual(plain);
      }
    }
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
  it('invariance: every walk leaves the counts at 0', () => {
    const s = sorted(uneven(20));
    const walk = winsorWalk();
    const readers = [
      (counts: Int32Array) => walkTrimmedSum(s, counts, 4),
      (counts: Int32Array) => walkWinsorized(s, counts, 4, walk),
      (counts: Int32Array) => walkMedian(s, counts),
      (counts: Int32Array) => walkExpand(s, counts, new Float64Array(20)),
    ];
    for (const read of readers) {
      const counts = new Int32Array(20);
      drawCounts(counts, 20, started(1));
      read(counts);
      expect(counts.every((c) => c === 0)).toBe(true);
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
  it('invariance: a far score costs the trimmed sum no digit', () => {
    const s = scores(1, 2, 3, 4, 1e15);
    expect(walkTrimmedSum(s, Int32Array.from([1, 1, 1, 1, 1]), 1)).toBe(9);
  });
  it('degenerate: one score', () => {
    const counts = new Int32Array(1);
    drawCounts(counts, 1, started(1));
    expect(walkMedian(scores(4), counts)).toBe(4);
    expect([blockSize(1), blockSize(1e6)]).toEqual([512, 8]);
  });
  it('refuses no resamples, no scores, too many scores', () => {
    expect(() => resample([3], 0, 1, () => {})).toThrow('*B* must be a whole number');
    expect(() => drawCounts(new Int32Array(0), 0, started(1))).toThrow('*n* must be an integer');
    expect(() => drawCounts(new Int32Array(2), 3, started(1))).toThrow(RangeError);
  });
});
