import { describe, expect, it } from 'vitest';
import { kruskalWallis, pooledRanks } from '../../src/numerics/kruskal-wallis.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { plantGrowth } from './anova/published-scores.ts';

const apart = [Float64Array.of(1, 2, 3), Float64Array.of(4, 5, 6), Float64Array.of(7, 8, 9)];

describe('kruskalWallis', () => {
  // mean ranks 2 5 8 about 5: 3 (9 + 9) / (90 / 12) = 7.2; chi-square on 2 df: p = exp(-3.6)
  it('by hand: three separate conditions (1e-14)', () => {
    expectAll(kruskalWallis(apart), { H: 7.2, df: 2, p: Math.exp(-3.6), epsilon2: 0.9, eta2H: 5.2 / 6 }, 1e-13);
  });

  // 1 1 | 1 2: midranks 2 2 | 2 4; variance 20/12 - 24/36 = 1; H = 2 (.25 + .25) = 1
  it('by hand: ties (1e-15)', () => {
    const tied = [Float64Array.of(1, 1), Float64Array.of(1, 2)];
    expect(pooledRanks(tied)).toEqual({ n: 4, meanRanks: [2, 3], sizes: [2, 2], variance: 1 });
    expectClose(kruskalWallis(tied).H, 1, 1e-15);
  });

  // R 4.2.2 kruskal.test
  it('agrees with R on PlantGrowth (1e-12)', () => {
    expectAll(kruskalWallis(plantGrowth), { H: 7.988228749443715, p: 0.01842375573147197 }, 1e-12);
  });

  it('theory: H is never above N - 1, reached when each condition has one value of its own (1e-14)', () => {
    expectClose(kruskalWallis([Float64Array.of(1, 1), Float64Array.of(5, 5)]).H, 3, 1e-14);
  });

  it('invariance: any increasing change of the scores and any order of conditions, exactly', () => {
    const { H } = kruskalWallis(plantGrowth);
    expectClose(kruskalWallis([...plantGrowth].reverse()).H, H!, 1e-14);
    expect(kruskalWallis(plantGrowth.map((scores) => scores.map((score) => score ** 3))).H).toBe(H);
  });

  it('degenerate: all equal, an empty condition, as many conditions as scores', () => {
    expect(kruskalWallis([Float64Array.of(2, 2), Float64Array.of(2)]).reason).toBe('all scores are equal');
    expect(kruskalWallis([Float64Array.of(2), new Float64Array(0)]).H).toBeNull();
    expect(kruskalWallis([Float64Array.of(1), Float64Array.of(2)]).eta2H).toBeNull();
  });

  it('refuses one condition', () => {
    expect(() => kruskalWallis(apart.slice(0, 1))).toThrow(RangeError);
  });
});
