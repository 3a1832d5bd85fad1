import { describe, expect, it } from 'vitest';
import { permutationPaired } from '../../src/numerics/permutation-paired.ts';
import { close, darwin, scores } from './samples.ts';

describe('sign flips', () => {
  it('by hand: 1, 2, 3: only one of eight sums is as large as 6', () => {
    expect(permutationPaired(scores(1, 2, 3))).toEqual({
      estimate: 2,
      flips: 8,
      pTwoSided: 0.25,
      pGreater: 0.125,
      pLess: 1,
    });
  });
  it('agrees with Fisher (1935): Darwin 1,726 of 32,768, and with all flips listed in NumPy (exactly)', () => {
    const own = permutationPaired(darwin);
    expect(own.pTwoSided).toBe(1726 / 32_768);
    expect([close(own.pGreater, 0.026336669921875, 1e-14), close(own.pLess, 0.974517822265625, 1e-14)]).toEqual([
      true,
      true,
    ]);
  });
  it('theory: counting over whole units and enumerating agree', () => {
    // An irrational factor keeps the scores from being decimals, so every flip is tried.
    const own = permutationPaired(darwin.map((x) => x * Math.SQRT2));
    const plain = permutationPaired(darwin);
    expect([own.pTwoSided, own.pGreater, own.pLess]).toEqual([plain.pTwoSided, plain.pGreater, plain.pLess]);
  });
  it('invariance: order and sign', () => {
    expect(permutationPaired(darwin.toReversed())).toEqual(permutationPaired(darwin));
    expect(permutationPaired(darwin.map((x) => -x)).pLess).toBe(permutationPaired(darwin).pGreater);
  });
  it('degenerate: only zeros, one pair, too many pairs that are not decimals', () => {
    expect(permutationPaired(scores(0, 0)).pTwoSided).toBe(1);
    expect(permutationPaired(scores(5)).pTwoSided).toBe(1);
    const many = Float64Array.from({ length: 30 }, (_, i) => Math.sqrt(i + 2));
    expect(permutationPaired(many)).toMatchObject({ pTwoSided: null, reason: 'too many pairs to flip every sign' });
  });
  it('refuses no scores', () => {
    expect(() => permutationPaired(scores())).toThrow(RangeError);
  });
});
