import { describe, expect, test } from 'vitest';
import { rankCriticals } from '../../../src/numerics/simulation/rank-critical.ts';
import { rankSumLower } from '../../../src/numerics/tails/rank-sum.ts';
import { signedRankLower } from '../../../src/numerics/tails/signed-rank.ts';

describe('critical values of the rank tests', () => {
  test('by hand: printed tables at .05, two-sided (common practice)', () => {
    const { rankSum, signedRank } = rankCriticals(0.05);
    expect([rankSum(7, 8), rankSum(10, 10), rankSum(20, 20), rankSum(3, 3)]).toEqual([10, 23, 127, -1]);
    expect([signedRank(6), signedRank(10), signedRank(20), signedRank(5)]).toEqual([0, 8, 52, -1]);
  });

  test('theory: the next value would exceed the level', () => {
    const { rankSum, signedRank } = rankCriticals(0.01);
    for (const n of [8, 15, 31]) {
      const [c, v] = [rankSum(n, n + 2), signedRank(n)];
      expect(2 * rankSumLower(c, n, n + 2)).toBeLessThanOrEqual(0.01);
      expect(2 * rankSumLower(c + 1, n, n + 2)).toBeGreaterThan(0.01);
      expect(2 * signedRankLower(v, n)).toBeLessThanOrEqual(0.01);
      expect(2 * signedRankLower(v + 1, n)).toBeGreaterThan(0.01);
    }
  });

  test('theory: beyond 300 differences the normal value lies within 6 of the exact one, of 48,205', () => {
    const { signedRank } = rankCriticals(0.05);
    const exact = (n: number) => {
      let v = signedRank(n) - 30;
      while (2 * signedRankLower(v + 1, n) <= 0.05) v++;
      return v;
    };
    expect(Math.abs(signedRank(310) - exact(310))).toBeLessThanOrEqual(6);
  });
});
