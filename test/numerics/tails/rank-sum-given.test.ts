import { describe, expect, test } from 'vitest';
import { rankSumLower, rankSumUpper } from '../../../src/numerics/tails/rank-sum.ts';
import { latticeMass, rankSumGiven } from '../../../src/numerics/tails/rank-sum-given.ts';
import { expectRelative } from './expect-relative.ts';

/** Both tails by walking through all choices of the first sample. */
function enumerate(ranks: readonly number[], n1: number, u: number): { lower: number; upper: number } {
  let [lower, upper, all] = [0, 0, 0];
  for (let set = 0; set < 1 << ranks.length; set++) {
    const chosen = ranks.filter((_, i) => set & (1 << i));
    if (chosen.length !== n1) continue;
    const value = chosen.reduce((sum, rank) => sum + rank, 0) - (n1 * (n1 + 1)) / 2;
    all += 1;
    if (value <= u) lower += 1;
    if (value >= u) upper += 1;
  }
  return { lower: lower / all, upper: upper / all };
}

describe('Mann-Whitney tails given the ranks', () => {
  test('agrees with the full enumeration of all splits, 1e-14', () => {
    const patterns = [
      [1.5, 1.5, 3, 4, 6, 6, 6, 8, 9.5, 9.5],
      [2.5, 2.5, 2.5, 2.5, 7.5, 7.5, 7.5, 7.5, 7.5, 7.5],
      [1, 2, 3, 4, 5, 6, 7, 8, 9.5, 9.5],
    ];
    for (const ranks of patterns) {
      for (const n1 of [1, 3, 6, 9]) {
        for (let u = 0; u <= n1 * (10 - n1); u += 0.5) {
          const { lower, upper } = rankSumGiven(Float64Array.from(ranks), n1, 10 - n1, u);
          const truth = enumerate(ranks, n1, u);
          expectRelative(lower, truth.lower, 1e-14);
          expectRelative(upper, truth.upper, 1e-14);
        }
      }
    }
  });

  test('agrees with the untied distribution, 1e-13', () => {
    const ranks = Float64Array.from({ length: 30 }, (_, i) => i + 1);
    for (const u of [0, 40, 112, 113, 200]) {
      const { lower, upper } = rankSumGiven(ranks, 15, 15, u);
      expectRelative(lower, rankSumLower(u, 15, 15), 1e-13);
      expectRelative(upper, rankSumUpper(u - 1, 15, 15), 1e-13);
    }
  });

  test('degenerate: all scores tied, and values beyond the ends', () => {
    const ranks = new Float64Array(6).fill(3.5);
    expect(rankSumGiven(ranks, 3, 3, 4.5)).toEqual({ lower: 1, upper: 1 });
    expect(rankSumGiven(ranks, 3, 3, 4)).toEqual({ lower: 0, upper: 1 });
    expect(rankSumGiven(ranks, 3, 3, -1)).toEqual({ lower: 0, upper: 1 });
    expect(rankSumGiven(ranks, 3, 3, 10)).toEqual({ lower: 1, upper: 0 });
  });

  test('by hand: 2 + 2 without ties has masses 1 1 2 1 1 of 6, 1e-15', () => {
    [1, 1, 2, 1, 1].forEach((count, u) => {
      expectRelative(latticeMass(2, 2, 4)[u]!, count / 6, 1e-15);
    });
  });

  test('invariance: a lower limit only cuts the table off', () => {
    expect(Array.from(latticeMass(6, 9, 20))).toEqual(Array.from(latticeMass(6, 9, 54).slice(0, 21)));
  });
});
