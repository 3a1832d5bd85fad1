import { describe, expect, test } from 'vitest';
import {
  signedRankLower,
  signedRankQuantile,
  signedRankTied,
  signedRankUpper,
} from '../../../src/numerics/tails/signed-rank.ts';
import { expectRelative } from './expect-relative.ts';

/** Both tails by walking through all signs. */
function enumerate(ranks: readonly number[], v: number): { lower: number; upper: number } {
  let lower = 0;
  let upper = 0;
  for (let signs = 0; signs < 1 << ranks.length; signs++) {
    const sum = ranks.reduce((total, rank, i) => total + (signs & (1 << i) ? rank : 0), 0);
    if (sum <= v) lower += 1;
    if (sum >= v) upper += 1;
  }
  return { lower: lower / (1 << ranks.length), upper: upper / (1 << ranks.length) };
}

describe('signed-rank tails', () => {
  test('by hand: n = 3 has counts 1 1 1 2 1 1 1 of 8, exactly', () => {
    expect([0, 1, 2, 3, 4, 5, 6].map((v) => 8 * signedRankLower(v, 3))).toEqual([1, 2, 3, 5, 6, 7, 8]);
    expect([0, 2, 5].map((v) => 8 * signedRankUpper(v, 3))).toEqual([7, 5, 1]);
  });

  test('theory: lower + upper = 1 and the distribution mirrors itself', () => {
    for (const v of [0, 10, 104, 105, 106, 200]) {
      expect(Math.abs(signedRankLower(v, 20) + signedRankUpper(v, 20) - 1)).toBeLessThanOrEqual(2.3e-16);
      expect(signedRankLower(v, 20)).toBe(signedRankUpper(209 - v, 20));
    }
    expectRelative(signedRankUpper((1000 * 1001) / 2 - 1, 1000), 2 ** -1000, 1e-15);
  });

  // Source: common practice, table of critical values: n = 10, two-sided 5 %: 8; n = 20: 52.
  test('agrees with printed critical values', () => {
    expect(signedRankQuantile(0.025, 10) - 1).toBe(8);
    expect(signedRankQuantile(0.025, 20) - 1).toBe(52);
  });

  test('by hand: the quantile is the first sum that reaches the probability, exactly', () => {
    expect([0, 1 / 8, 0.13, 3 / 8, 0.4, 0.625, 1].map((p) => signedRankQuantile(p, 3))).toEqual([0, 0, 1, 2, 3, 3, 6]);
  });

  test('degenerate: outside the range', () => {
    expect([signedRankLower(-1, 4), signedRankUpper(-0.5, 4), signedRankLower(10, 4), signedRankUpper(99, 4)]).toEqual([
      0, 1, 1, 0,
    ]);
    expect(signedRankLower(2.7, 4)).toBe(signedRankLower(2, 4));
  });

  test('refuses wrong arguments', () => {
    expect(() => signedRankLower(1, 0)).toThrow('*n* must be a whole number of at least 1 and at most 1000; got 0');
    expect(() => signedRankUpper(Number.NaN, 3)).toThrow('*v* must be a number; got NaN');
    expect(() => signedRankQuantile(2, 3)).toThrow(RangeError);
  });
});

describe('signed-rank tails with ties', () => {
  test('by hand: ranks 1.5 1.5 3, exactly', () => {
    const ranks = Float64Array.of(1.5, 1.5, 3);
    expect(signedRankTied(ranks, 1.5)).toEqual({ lower: 3 / 8, upper: 7 / 8 });
    expect(signedRankTied(ranks, 3)).toEqual({ lower: 5 / 8, upper: 5 / 8 });
    expect(signedRankTied(ranks, 2)).toEqual({ lower: 3 / 8, upper: 5 / 8 });
    expect(Array.from(ranks)).toEqual([1.5, 1.5, 3]);
  });

  test('agrees with the full enumeration of all signs, 1e-15', () => {
    const ranks = [1, 3, 3, 3, 5.5, 5.5, 7, 8.5, 8.5, 10];
    for (let v = 0; v <= 55; v += 0.5) {
      const { lower, upper } = signedRankTied(Float64Array.from(ranks), v);
      const truth = enumerate(ranks, v);
      expectRelative(lower, truth.lower, 1e-15);
      expectRelative(upper, truth.upper, 1e-15);
    }
  });

  test('agrees with the untied distribution where no ranks are tied, 1e-14', () => {
    const ranks = Float64Array.from({ length: 25 }, (_, i) => i + 1);
    for (const v of [0, 50, 162, 163, 300, 325]) {
      const { lower, upper } = signedRankTied(ranks, v);
      expectRelative(lower, signedRankLower(v, 25), 1e-14);
      expectRelative(upper, signedRankUpper(v - 1, 25), 1e-14);
    }
  });

  test('degenerate: beyond the ends', () => {
    expect(signedRankTied(Float64Array.of(1, 2), -1)).toEqual({ lower: 0, upper: 1 });
    expect(signedRankTied(Float64Array.of(1, 2), 0)).toEqual({ lower: 0.25, upper: 1 });
    expect(signedRankTied(Float64Array.of(1, 2), 4)).toEqual({ lower: 1, upper: 0 });
  });

  test('refuses ranks that are not midranks', () => {
    expect(() => signedRankTied(Float64Array.of(1.2), 1)).toThrow('*ranks* must be midranks');
    expect(() => signedRankTied(Float64Array.of(0), 1)).toThrow(RangeError);
    expect(() => signedRankTied(new Float64Array(0), 1)).toThrow('*ranks.length*');
    expect(() => signedRankTied(Float64Array.of(1), Number.NaN)).toThrow(RangeError);
  });
});
