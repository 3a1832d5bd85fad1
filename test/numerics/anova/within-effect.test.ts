import { describe, expect, it } from 'vitest';
import { noWithinEffect, withinEffect } from '../../../src/numerics/anova/within-effect.ts';
import { identity, matrix } from '../../../src/numerics/matrix.ts';
import { expectAll, expectClose } from './expect-close.ts';

describe('withinEffect', () => {
  // diag(3, 1) on 2 df each: error 4 on 4 df, effect 12 on 2: F = 6, p = (1 + 2 * 6 / 4)^-2;
  // at the lower bound F(1, 2) = 6: p = 1 - sqrt(6 / 8)
  it('by hand: two comparisons (1e-14)', () => {
    const effect = withinEffect(12, 1, { products: matrix(2, 2, [3, 0, 0, 1]), dfError: 2, size: 9 });
    expectAll(effect, { F: 6, df1: 2, df2: 4, p: 1 / 16, ssEffect: 12, ssError: 4, partialEta2: 0.75 }, 1e-14);
    expectAll(effect, { ggEpsilon: 0.8, lbEpsilon: 0.5, pLb: 1 - Math.sqrt(0.75) }, 1e-14);
  });

  // R 4.2.2 pf(6, 1.6, 3.2, lower = FALSE)
  it('agrees with R on the corrected p (1e-12)', () => {
    const effect = withinEffect(12, 1, { products: matrix(2, 2, [3, 0, 0, 1]), dfError: 2, size: 9 });
    expectClose(effect.pGg, 0.0840289237865527, 1e-12);
  });

  it('theory: corrections never make p smaller for F above 1, and vanish under sphericity (1e-14)', () => {
    const round = withinEffect(12, 1, { products: identity(2), dfError: 9, size: 9 });
    expectAll(round, { pGg: round.p!, pHf: round.p!, ggEpsilon: 1 }, 1e-14);
    const other = withinEffect(12, 1, { products: matrix(2, 2, [3, 1, 1, 2]), dfError: 9, size: 9 });
    expect(other.pLb!).toBeGreaterThan(other.pGg!);
    expect(other.pGg!).toBeGreaterThan(other.p!);
  });

  it('invariance: sums of squares in another unit (1e-14)', () => {
    const base = withinEffect(12, 2, { products: matrix(2, 2, [3, 0, 0, 1]), dfError: 5, size: 9 });
    const scaled = withinEffect(12e8, 2, { products: matrix(2, 2, [3e8, 0, 0, 1e8]), dfError: 5, size: 9e4 });
    expectAll(scaled, { F: base.F!, df1: 4, pHf: base.pHf! }, 1e-14);
  });

  it('degenerate: no error left, or none that can be estimated', () => {
    const flat = withinEffect(5, 1, { products: matrix(2, 2), dfError: 3, size: 9 });
    expect([flat.F, flat.ssEffect]).toEqual([null, 5]);
    expect(flat.reason).toBe('differences between levels do not vary between participants');
    expect(withinEffect(5, 1, { products: identity(1), dfError: 0, size: 1 }).reason).toBe(
      'fewer participants than the test needs',
    );
    const few = withinEffect(5, 1, { products: matrix(2, 2, [1, 0, 0, 0]), dfError: 1, size: 1 });
    expect([few.hfEpsilon, few.pHf]).toEqual([null, null]);
    expect(noWithinEffect('why')).toMatchObject({ F: null, pGg: null, reason: 'why' });
  });

  it('refuses a matrix that is not square', () => {
    expect(() => withinEffect(5, 1, { products: matrix(1, 2), dfError: 3, size: 9 })).toThrow(RangeError);
  });
});
