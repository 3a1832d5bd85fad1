import { describe, expect, test } from 'vitest';
import {
  gammaFraction,
  gammaLogPrefactor,
  gammaLower,
  gammaSeries,
  gammaUpper,
} from '../../../src/numerics/tails/gamma.ts';
import { poissonLower, poissonUpper, type StepFamily } from '../../../src/numerics/tails/poisson-mixture.ts';
import { lgamma } from '../../../src/numerics/tails/special.ts';
import { expectRelative } from './expect-relative.ts';

const family = (z: number, a: number): StepFamily => ({
  logTerm: (j) => gammaLogPrefactor(z, a + j),
  ratio: (j) => z / (a + j + 1),
  lowerOverTerm: (j) => gammaSeries(z, a + j),
  upperOverTerm: (j) => gammaFraction(z, a + j),
});

/** The sum as it is defined, term by term. */
function direct(mean: number, tail: (j: number) => number): number {
  let sum = 0;
  for (let j = 0; j < 400; j++) sum += Math.exp(j * Math.log(mean) - mean - lgamma(j + 1)) * tail(j);
  return sum;
}

describe('Poisson mixture of tails', () => {
  test('agrees with the direct sum, both tails, 1e-12', () => {
    for (const [mean, z, a] of [
      [0.05, 1, 1.5],
      [6, 2, 0.5],
      [40, 9, 3],
    ] as const) {
      expectRelative(
        poissonLower(family(z, a), mean),
        direct(mean, (j) => gammaLower(z, a + j)),
        1e-12,
      );
    }
    for (const [mean, z, a] of [
      [0.05, 4, 1.5],
      [6, 30, 0.5],
      [40, 160, 3],
    ] as const) {
      expectRelative(
        poissonUpper(family(z, a), mean),
        direct(mean, (j) => gammaUpper(z, a + j)),
        1e-12,
      );
    }
  });

  test('degenerate: terms beyond the range of a double are carried as logarithms, 1e-12', () => {
    // Only j = 0 counts: exp(-mean) times the tail of shape 1/2, sqrt(z) 2 / sqrt(pi) for a small z.
    expectRelative(poissonLower(family(1e-60, 0.5), 30), (Math.exp(-30) * 2e-30) / Math.sqrt(Math.PI), 1e-12);
    expect(poissonLower(family(1e-300, 20), 30)).toBe(0);
  });
});
