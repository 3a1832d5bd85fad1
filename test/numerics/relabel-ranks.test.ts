import { describe, expect, it } from 'vitest';
import { mannWhitney } from '../../src/numerics/mann-whitney.ts';
import { ranks } from '../../src/numerics/order.ts';
import { rankSumZ, signedRankZ } from '../../src/numerics/relabel-ranks.ts';
import { normalFromP } from '../../src/numerics/relabel-z.ts';
import { rng } from '../../src/numerics/rng.ts';
import { signedRankTest } from '../../src/numerics/wilcoxon.ts';

function drawn(n: number, step: number): Float64Array {
  const random = rng(9, n);
  return Float64Array.from({ length: n }, () => Math.round((random.uniform() * 40) / step) * step);
}

describe('rankSumZ', () => {
  it.each([
    [9, 0.001],
    [14, 4],
    [26, 0.001],
    [31, 5],
    [250, 1],
  ])('agrees with mannWhitney: %d scores in steps of %d, every size of the first group, 1e-9', (n, step) => {
    const scores = drawn(n, step);
    const z = rankSumZ(ranks(scores).ranks);
    const sizes = n > 100 ? [120] : [1, 4, n >> 1, n - 3];
    for (const n1 of sizes) {
      const test = mannWhitney(scores.slice(0, n1), scores.slice(n1));
      const expected = normalFromP(test.p ?? 1, test.U - (n1 * (n - n1)) / 2);
      expect(Math.abs(z(test.U, n1) - expected)).toBeLessThan(1e-9);
    }
  });

  it('degenerate: equal scores and an empty group give 0', () => {
    const z = rankSumZ(ranks(new Float64Array(6).fill(2)).ranks);
    expect([z(4.5, 3), z(0, 0), z(0, 6)]).toEqual([0, 0, 0]);
  });
});

describe('signedRankZ', () => {
  it.each([
    [6, 0.001],
    [13, 4],
    [34, 0.001],
    [320, 0.01],
  ])('agrees with signedRankTest: %d differences in steps of %d, 1e-9', (n, step) => {
    const sizes = drawn(n, step).map((each) => each + step);
    const random = rng(3, n);
    const z = signedRankZ(ranks(sizes).ranks);
    for (let k = 0; k < 20; k++) {
      const d = sizes.map((size) => (random.uniform() < 0.4 ? -size : size));
      const test = signedRankTest(d);
      const expected = normalFromP(test.p ?? 1, test.V - test.wMinus);
      expect(Math.abs(z(test.V) - expected)).toBeLessThan(1e-9);
    }
  });
});
