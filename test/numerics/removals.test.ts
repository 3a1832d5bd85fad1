import { describe, expect, test } from 'vitest';
import { choices, nextChoice, type Remainder, remainder, sortedSums } from '../../src/numerics/removals.ts';
import { rng } from '../../src/numerics/rng.ts';
import { trimmedMean } from '../../src/numerics/trimmed-mean.ts';
import { winsorizedVariance } from '../../src/numerics/winsorized.ts';

const out = (): Remainder => ({ center: 0, squares: 0, n: 0, h: 0 });

describe('what is left of a sample', () => {
  test('by hand: 1, 2, 4, 8, 16 without the 4', () => {
    const left = out();
    remainder(sortedSums(Float64Array.of(8, 1, 16, 4, 2)), Int32Array.of(2), 0, 1, 0, 25, left);
    // Four are left, g = 1: (2 + 8) / 2; winsorized 2, 2, 8, 8 about 5.
    expect(left.center).toBeCloseTo(5, 12);
    expect(left.squares).toBeCloseTo(36, 12);
    expect([left.n, left.h]).toEqual([4, 2]);
  });

  test('agrees with trimming the scores left, any trim and any set (seed 11)', () => {
    const draw = rng(11);
    for (let round = 0; round < 200; round++) {
      const n = 5 + draw.below(12);
      const x = Float64Array.from({ length: n }, () => Math.round(100 * draw.uniform()) / 4 + 1000);
      const s = x.slice().sort();
      const k = draw.below(3);
      const removed = Int32Array.from({ length: k }, (_, i) => i * 2 + draw.below(2));
      const trim = [0, 10, 20, 25][draw.below(4)] as number;
      const kept = s.filter((_, i) => !removed.includes(i));
      const left = out();
      remainder(
        sortedSums(x),
        removed.map((place) => place + 7),
        0,
        k,
        7,
        trim,
        left,
      );
      expect(left.center).toBeCloseTo(trimmedMean(kept, trim), 9);
      expect(left.squares).toBeCloseTo((kept.length - 1) * winsorizedVariance(kept, trim), 8);
    }
  });

  test('degenerate: nobody left, and one left', () => {
    const left = out();
    const sums = sortedSums(Float64Array.of(1, 2));
    remainder(sums, Int32Array.of(0, 1), 0, 2, 0, 20, left);
    expect(left).toEqual({ center: NaN, squares: NaN, n: 0, h: 0 });
    remainder(sums, Int32Array.of(0), 0, 1, 0, 20, left);
    expect(left).toEqual({ center: 2, squares: NaN, n: 1, h: 1 });
  });

  test('refuses: no scores, a trim of a half', () => {
    expect(() => sortedSums(new Float64Array(0))).toThrow(RangeError);
    expect(() => remainder(sortedSums(Float64Array.of(1, 2)), new Int32Array(0), 0, 0, 0, 50, out())).toThrow(
      RangeError,
    );
  });
});

describe('choices', () => {
  test('by hand: C(26, 6) and C(10, 4)', () => {
    expect([choices(26, 6), choices(10, 4), choices(5, 0)]).toEqual([230_230, 210, 1]);
  });

  test('theory: every choice once, in order', () => {
    const chosen = Int32Array.of(0, 1, 2);
    const seen = [chosen.join()];
    while (nextChoice(chosen, 6)) seen.push(chosen.join());
    expect(new Set(seen).size).toBe(20);
    expect(seen).toHaveLength(20);
    expect(seen.at(-1)).toBe('3,4,5');
  });
});
