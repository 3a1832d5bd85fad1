import { describe, expect, it } from 'vitest';
import { sphericityFactors } from '../../../src/numerics/anova/sphericity.ts';
import { identity, matrix } from '../../../src/numerics/matrix.ts';
import { contrastScores, helmertContrasts, squaresAndProducts } from '../../../src/numerics/repeated.ts';
import { expectAll } from './expect-close.ts';
import { orangeTrees } from './published-scores.ts';

describe('sphericityFactors', () => {
  // diag(3, 1): 16 / (2 * 10) = .8; 10 error df: (11 * 1.6 - 2) / (2 (10 - 1.6)) = 15.6 / 16.8
  it('by hand: two comparisons of unequal variance (1e-15)', () => {
    expectAll(sphericityFactors(matrix(2, 2, [3, 0, 0, 1]), 10), { gg: 0.8, hf: 15.6 / 16.8, lowerBound: 0.5 }, 1e-15);
  });

  // R 4.2.2 anova.mlm(test = 'Spherical')
  it('agrees with R on four ages of the orange trees (1e-12)', () => {
    const { products } = squaresAndProducts(contrastScores(orangeTrees, helmertContrasts(4)));
    const want = { gg: 0.37688163324116686, hf: 0.42439553731841084, lowerBound: 1 / 3 };
    expectAll(sphericityFactors(products, 4), want, 1e-12);
  });

  it('theory: 1 when variances are equal and uncorrelated, the lower bound when one comparison carries all (1e-15)', () => {
    expectAll(sphericityFactors(identity(4), 30), { gg: 1 }, 1e-15);
    expectAll(sphericityFactors(matrix(3, 3, [1, 1, 1, 1, 1, 1, 1, 1, 1]), 30), { gg: 1 / 3 }, 1e-15);
  });

  it('invariance: any unit, even an extreme one (1e-15)', () => {
    expectAll(sphericityFactors(matrix(2, 2, [3e200, 0, 0, 1e200]), 10), { gg: 0.8, hf: 15.6 / 16.8 }, 1e-15);
  });

  it('degenerate: one comparison is always spherical; too few participants leave no second factor', () => {
    expect(sphericityFactors(matrix(1, 1, [7]), 1)).toEqual({ gg: 1, hf: 1, lowerBound: 1 });
    expect(sphericityFactors(matrix(2, 2, [1, 0, 0, 0]), 1).hf).toBeNull();
  });

  it('refuses no variance and no error degrees of freedom', () => {
    expect(() => sphericityFactors(matrix(2, 2), 3)).toThrow('*products* must have a positive trace; got 0');
    expect(() => sphericityFactors(identity(2), 0)).toThrow('*dfError* must be at least 1; got 0');
  });
});
