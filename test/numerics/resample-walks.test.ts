import { describe, expect, it } from 'vitest';
import { medianSorted, sorted } from '../../src/numerics/order.ts';
import { drawCounts } from '../../src/numerics/resample.ts';
import {
  walkExpand,
  walkMedian,
  walkTrimmedSum,
  walkWinsorized,
  winsorWalk,
} from '../../src/numerics/resample-walks.ts';
import { startState } from '../../src/numerics/rng.ts';
import { trimmedMeanSorted } from '../../src/numerics/trimmed-mean.ts';
import { close, scores, uneven } from './samples.ts';

function started(seed: number): Int32Array {
  const state = new Int32Array(4);
  startState(state, 0, 0, seed);
  return state;
}

function expanded(s: Float64Array, counts: Int32Array): Float64Array {
  return Float64Array.from([...counts].flatMap((times, i) => Array(times).fill(s[i]) as number[]));
}

describe('walks over a resample', () => {
  it('by hand: walks over 1, 2, 5, 9 drawn 0, 1, 2, 1 times', () => {
    const s = scores(1, 2, 5, 9);
    const counts = () => Int32Array.from([0, 1, 2, 1]);
    expect(walkTrimmedSum(s, counts(), 0)).toBe(21);
    expect(walkTrimmedSum(s, counts(), 1)).toBe(10);
    expect(walkMedian(s, counts())).toBe(5);
    const walk = winsorWalk();
    walkWinsorized(s, counts(), 1, walk);
    expect(walk).toEqual({ trimmed: 10, sum: 20, squares: 100, low: 5, high: 5 });
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
  it('invariance: a far score costs the trimmed sum no digit', () => {
    const s = scores(1, 2, 3, 4, 1e15);
    expect(walkTrimmedSum(s, Int32Array.from([1, 1, 1, 1, 1]), 1)).toBe(9);
  });
  it('theory: a walk over every score drawn once gives the sample itself', () => {
    const s = sorted(uneven(11));
    const once = () => new Int32Array(11).fill(1);
    expect(walkMedian(s, once())).toBe(medianSorted(s));
    const out = new Float64Array(11);
    walkExpand(s, once(), out);
    expect(out).toEqual(s);
    expect(close(walkTrimmedSum(s, once(), 2) / 7, trimmedMeanSorted(s, 2), 1e-13)).toBe(true);
  });
  it('degenerate: one score, one score drawn throughout', () => {
    expect(walkMedian(scores(4), Int32Array.from([1]))).toBe(4);
    expect(walkTrimmedSum(scores(1, 2, 3), Int32Array.from([0, 0, 3]), 1)).toBe(3);
    expect(walkTrimmedSum(scores(1, 2, 3), Int32Array.from([3, 0, 0]), 1)).toBe(1);
  });
});
