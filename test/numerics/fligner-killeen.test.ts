import { describe, expect, it } from 'vitest';
import { flignerKilleen } from '../../src/numerics/fligner-killeen.ts';
import { normalQuantile } from '../../src/numerics/tails/normal.ts';
import { expectAll, expectClose } from './anova/expect-close.ts';
import { plantGrowth } from './anova/published-scores.ts';

const three = [Float64Array.of(2, 9, 4, 4), Float64Array.of(7, 1, 8), Float64Array.of(3, 5, 12, 6, 10)];

describe('flignerKilleen', () => {
  // distances 1 0 1 | 2 0 2: ranks 3.5 1.5 3.5 | 5.5 1.5 5.5; a = normal quantile of .5 + rank / 14
  it('by hand: two conditions of three (1e-13)', () => {
    const a = [3.5, 1.5, 3.5, 5.5, 1.5, 5.5].map((rank) => normalQuantile(0.5 + rank / 14));
    const mean = a.reduce((sum, value) => sum + value, 0) / 6;
    const variance = a.reduce((sum, value) => sum + (value - mean) ** 2, 0) / 5;
    const first = (a[0]! + a[1]! + a[2]!) / 3;
    const want = (6 * (first - mean) ** 2) / variance;
    expectAll(flignerKilleen([Float64Array.of(1, 2, 3), Float64Array.of(2, 4, 6)]), { chi2: want, df: 1 }, 1e-13);
  });

  // R 4.2.2 fligner.test
  it('agrees with R on PlantGrowth and on scores with ties (1e-12)', () => {
    expectAll(flignerKilleen(plantGrowth), { chi2: 2.3499371311581996, p: 0.30882868738638647 }, 1e-12);
    expectAll(flignerKilleen(three), { chi2: 0.5672408804048665, p: 0.7530524188922412 }, 1e-12);
  });

  it('theory: the same distances in every condition give 0 (1e-14)', () => {
    expectClose(flignerKilleen([Float64Array.of(1, 2, 5), Float64Array.of(11, 12, 15)]).chi2, 0, 1e-14);
  });

  it('invariance: shift of one condition, reflection and unit (1e-13)', () => {
    const moved = three.map((scores, j) => scores.map((score) => 8 * j - 4 * score));
    expectClose(flignerKilleen(moved).chi2, flignerKilleen(three).chi2!, 1e-13);
  });

  it('degenerate: distances that are all equal, an empty condition', () => {
    const reason = 'all distances from the medians are equal';
    expect(flignerKilleen([Float64Array.of(1, 3), Float64Array.of(5, 7)]).reason).toBe(reason);
    expect(flignerKilleen([Float64Array.of(1, 3), new Float64Array(0)]).chi2).toBeNull();
  });

  it('refuses one condition', () => {
    expect(() => flignerKilleen(three.slice(0, 1))).toThrow(RangeError);
  });
});
