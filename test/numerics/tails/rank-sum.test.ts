import { describe, expect, test } from 'vitest';
import {
  feasible,
  rankSumLower,
  rankSumQuantile,
  rankSumTied,
  rankSumUpper,
} from '../../../src/numerics/tails/rank-sum.ts';
import { expectRelative } from './expect-relative.ts';

describe('Mann-Whitney tails', () => {
  test('by hand: 2 + 2 has counts 1 1 2 1 1 of 6, 1e-15', () => {
    [1, 2, 4, 5, 6].forEach((count, u) => {
      expectRelative(rankSumLower(u, 2, 2), count / 6, 1e-15);
    });
    [5, 4, 2, 1, 0].forEach((count, u) => {
      expectRelative(rankSumUpper(u, 2, 2), count / 6, 1e-15);
    });
  });

  // Source: common practice, table of critical values, two-sided 5 %: 10 + 10: 23; 5 + 8: 6; 20 + 20: 127.
  test('agrees with printed critical values', () => {
    expect(rankSumQuantile(0.025, 10, 10) - 1).toBe(23);
    expect(rankSumQuantile(0.025, 5, 8) - 1).toBe(6);
    expect(rankSumQuantile(0.025, 20, 20) - 1).toBe(127);
  });

  test('theory: lower + upper = 1, mirror image, samples interchangeable', () => {
    for (const u of [0, 7, 59, 60, 61, 119]) {
      expect(Math.abs(rankSumLower(u, 8, 15) + rankSumUpper(u, 8, 15) - 1)).toBeLessThanOrEqual(2.3e-16);
      expect(rankSumLower(u, 8, 15)).toBe(rankSumUpper(119 - u, 8, 15));
      expect(rankSumLower(u, 8, 15)).toBe(rankSumLower(u, 15, 8));
    }
  });

  test('theory: the most extreme of all splits has probability 1 / (100 choose 50), 1e-13', () => {
    let splits = 1;
    for (let i = 1; i <= 50; i++) splits *= (50 + i) / i;
    expectRelative(rankSumLower(0, 50, 50), 1 / splits, 1e-13);
  });

  test('theory: both ways of counting agree where they meet, 1e-12', () => {
    // 100 + 101 goes by Gaussian binomials, 101 + 101 by positive terms; P(U <= middle) of both is just above one half.
    expectRelative(
      rankSumLower(5050, 100, 101),
      0.5 + 0.5 * (rankSumLower(5050, 100, 101) - rankSumLower(5049, 100, 101)),
      1e-12,
    );
    expectRelative(rankSumLower(5100, 101, 101), 0.5, 1e-12);
  });

  test('by hand: the quantile is the first value that reaches the probability, exactly', () => {
    expect([0, 1 / 6, 0.17, 4 / 6, 1].map((p) => rankSumQuantile(p, 2, 2))).toEqual([0, 0, 1, 2, 4]);
  });

  test('degenerate: outside the range, and 1 + 1', () => {
    expect([rankSumLower(-1, 2, 2), rankSumUpper(-1, 2, 2), rankSumLower(4, 2, 2), rankSumUpper(4, 2, 2)]).toEqual([
      0, 1, 1, 0,
    ]);
    expect([rankSumLower(0, 1, 1), rankSumUpper(0, 1, 1)]).toEqual([0.5, 0.5]);
    expect([feasible(100, 100), feasible(101, 100)]).toEqual([true, false]);
  });

  test('refuses wrong arguments', () => {
    expect(() => rankSumLower(1, 0, 2)).toThrow('*n1* must be a whole number of at least 1; got 0');
    expect(() => rankSumUpper(Number.NaN, 2, 2)).toThrow(RangeError);
    expect(() => rankSumLower(1, 300, 300)).toThrow('*n1 n2* must be at most 40000 here; got 90000');
    expect(() => rankSumQuantile(1.1, 2, 2)).toThrow(RangeError);
    expect(() => rankSumTied(new Float64Array(300), 150, 1)).toThrow('*n1 n2* must be at most 10000; got 22500');
    expect(() => rankSumTied(Float64Array.of(1, 2), 2, 1)).toThrow('*n1*');
    expect(() => rankSumTied(Float64Array.of(1, Number.NaN), 1, 1)).toThrow('*midranks*');
  });

  test('by hand: ranks 1.5 1.5 3 4 in two samples of two, 1e-15', () => {
    const ranks = Float64Array.of(4, 1.5, 3, 1.5);
    expectRelative(rankSumTied(ranks, 2, 1.5).lower, 3 / 6, 1e-15);
    expectRelative(rankSumTied(ranks, 2, 1.5).upper, 5 / 6, 1e-15);
    expectRelative(rankSumTied(ranks, 2, 2.5).lower, 5 / 6, 1e-15);
    expectRelative(rankSumTied(ranks, 2, 4).upper, 1 / 6, 1e-15);
    expect(Array.from(ranks)).toEqual([4, 1.5, 3, 1.5]);
  });

  test('agrees with the untied distribution where no ranks are tied, exactly', () => {
    const ranks = Float64Array.from({ length: 23 }, (_, i) => 23 - i);
    expect(rankSumTied(ranks, 8, 40)).toEqual({ lower: rankSumLower(40, 8, 15), upper: rankSumUpper(39, 8, 15) });
    expect(rankSumTied(ranks, 8, 40.5)).toEqual({ lower: rankSumLower(40, 8, 15), upper: rankSumUpper(40, 8, 15) });
  });
});
