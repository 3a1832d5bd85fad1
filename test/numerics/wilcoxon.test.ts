import { describe, expect, it } from 'vitest';
import { signedRankTest } from '../../src/numerics/wilcoxon.ts';
import { close, darwin, drugOne, drugTwo, scores } from './samples.ts';

const change = drugTwo.map((hours, i) => hours - (drugOne[i] as number));
const seven = scores(1.1, 2.3, 3.7, 4.1, 5.9, 7.2, 8.8);

describe('signed-rank test', () => {
  it('by hand: 1, 2, -3: V = 3 of 6, both tails 5/8', () => {
    const test = signedRankTest(scores(1, 2, -3));
    expect([test.V, test.wMinus, test.nUsed, test.rankBiserial]).toEqual([3, 3, 3, 0]);
    expect(close(signedRankTest(scores(1, 2, -3), { alternative: 'greater' }).p, 5 / 8, 1e-14)).toBe(true);
    expect(test.p).toBe(1);
  });
  it('by hand: given the midranks 1.5, 1.5, 3 of 1, 1, 2 only one of 8 sign patterns is as large', () => {
    expect(close(signedRankTest(scores(1, 1, 2), { alternative: 'greater' }).p, 1 / 8, 1e-14)).toBe(true);
    expect(close(signedRankTest(scores(1, 1, 2)).p, 1 / 4, 1e-14)).toBe(true);
  });
  it('agrees with R 4.2 wilcox.test, exact and normal (rtol 1e-12)', () => {
    const test = signedRankTest(seven, { mu: 3.05, method: 'exact' });
    expect(test.V).toBe(22);
    expect(close(test.p, 0.21875, 1e-12)).toBe(true);
    expect(close(signedRankTest(seven, { mu: 3.05, method: 'exact', alternative: 'greater' }).p, 0.109375, 1e-12)).toBe(
      true,
    );
    const normal = signedRankTest(darwin, { method: 'asymptotic' });
    expect([normal.V, normal.wMinus]).toEqual([96, 24]);
    expect(close(normal.p, 0.0437723237630412, 1e-12)).toBe(true);
  });
  it('agrees with R 4.2 psignrank: Darwin .041260 (methods 6; rtol 1e-12)', () => {
    expect(close(signedRankTest(darwin).p, 0.041259765625, 1e-12)).toBe(true);
  });
  it('theory: without ties and zeros the conditional and the exact distribution are one', () => {
    for (const alternative of ['two-sided', 'greater', 'less'] as const) {
      const p = signedRankTest(seven, { mu: 3.05, alternative }).p as number;
      expect(close(signedRankTest(seven, { mu: 3.05, alternative, method: 'exact' }).p, p, 1e-13)).toBe(true);
    }
  });
  it('theory: beyond 300 scores the normal approximation is used and said', () => {
    const many = Float64Array.from({ length: 301 }, (_, i) => i - 140.5);
    const test = signedRankTest(many);
    expect([test.method, test.p]).toEqual(['asymptotic', signedRankTest(many, { method: 'asymptotic' }).p]);
  });
  it('invariance: increasing odd transformations, sign, order', () => {
    const p = signedRankTest(darwin).p;
    expect(signedRankTest(darwin.map((x) => x ** 3)).p).toBe(p);
    expect(signedRankTest(darwin.map((x) => -x)).p).toBe(p);
    expect(signedRankTest(darwin.toReversed()).p).toBe(p);
  });
  it('degenerate: zeros are dropped, or ranked and left out', () => {
    const dropped = signedRankTest(scores(0, 1, 2, -3));
    expect([dropped.nZero, dropped.nUsed, dropped.V, dropped.wMinus]).toEqual([1, 3, 3, 3]);
    const pratt = signedRankTest(scores(0, 1, 2, -3), { zeroMethod: 'pratt' });
    expect([pratt.nZero, pratt.nUsed, pratt.V, pratt.wMinus]).toEqual([1, 3, 5, 4]);
    expect(signedRankTest(scores(0, 0))).toMatchObject({
      V: 0,
      rankBiserial: null,
      p: null,
      reason: 'all differences are zero',
    });
  });
  it('degenerate: the distribution without ties is not used with ties; decimal ties are ties', () => {
    const reason = 'the exact distribution needs differences without ties and zeros';
    expect(signedRankTest(scores(1, 1, 2), { method: 'exact' }).reason).toBe(reason);
    expect(signedRankTest(scores(0, 1, 2), { method: 'exact' }).reason).toBe(reason);
    expect(signedRankTest(scores(0.3 - 0.2, 0.2 - 0.1, 5), { method: 'exact' }).reason).toBe(reason);
    // Sleep: one zero and one tie (1.3 twice), decimal differences.
    expect(signedRankTest(change).nZero).toBe(1);
  });
  it('refuses no scores and NaN', () => {
    expect(() => signedRankTest(scores())).toThrow(RangeError);
    expect(() => signedRankTest(scores(1, Number.NaN))).toThrow(RangeError);
  });
});
