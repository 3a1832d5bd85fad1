import { describe, expect, test } from 'vitest';
import {
  digamma,
  erf,
  erfc,
  erfcInverse,
  lgamma,
  lgammaOnePlus,
  logBeta,
  stirlingError,
  stirlingSeries,
} from '../../../src/numerics/tails/special.ts';
import { expectRelative } from './expect-relative.ts';

const EULER = 0.5772156649015329;

describe('lgamma', () => {
  test('by hand: factorials and the half-integer values, 1e-15', () => {
    expect(lgamma(1)).toBe(0);
    expect(lgamma(2)).toBe(0);
    expectRelative(lgamma(5), Math.log(24), 1e-15);
    expectRelative(lgamma(0.5), 0.5 * Math.log(Math.PI), 1e-15);
    expectRelative(lgamma(-0.5), Math.log(2 * Math.sqrt(Math.PI)), 1e-15);
    expectRelative(lgamma(21), Math.log(2432902008176640000), 1e-15);
  });

  test('theory: lgamma(x + 1) = lgamma(x) + log x across all ranges, 1e-14', () => {
    for (const x of [1e-8, 0.3, 0.7, 1.2, 1.9, 2.6, 7.5, 9.5, 30, 1e6]) {
      expect(Math.abs(lgamma(x + 1) - lgamma(x) - Math.log(x))).toBeLessThanOrEqual(1e-14 * Math.max(1, lgamma(x + 1)));
    }
  });

  test('by hand: log gamma(1 + z) is -0.5772 z for a tiny z, 1e-15', () => {
    expectRelative(lgammaOnePlus(1e-20), -EULER * 1e-20, 1e-15);
    expectRelative(lgammaOnePlus(3), Math.log(6), 1e-15);
    expectRelative(lgammaOnePlus(-0.5), 0.5 * Math.log(Math.PI), 1e-15);
  });

  test('degenerate: tiny arguments of both signs and overflow', () => {
    expectRelative(lgamma(1e-300), 300 * Math.log(10), 1e-15);
    expectRelative(lgamma(-1e-300), 300 * Math.log(10), 1e-15);
    expect(lgamma(Infinity)).toBe(Infinity);
  });

  test('refuses poles and NaN', () => {
    expect(() => lgamma(0)).toThrow('*x* must not be a pole of gamma; got 0');
    expect(() => lgamma(-3)).toThrow(RangeError);
    expect(() => lgamma(Number.NaN)).toThrow(RangeError);
  });
});

describe('digamma', () => {
  test('by hand: psi(1), psi(2), psi(1/2), 1e-15', () => {
    expectRelative(digamma(1), -EULER, 1e-15);
    expectRelative(digamma(2), 1 - EULER, 1e-15);
    expectRelative(digamma(0.5), -EULER - 2 * Math.LN2, 1e-15);
  });

  test('theory: psi(x + 1) = psi(x) + 1 / x, 1e-13; sign changes at its root', () => {
    for (const x of [0.1, 0.46, 1.3, 1.5, 4, 12, -0.3, -7.4]) {
      expect(Math.abs(digamma(x + 1) - digamma(x) - 1 / x)).toBeLessThanOrEqual(1e-13 * (1 + Math.abs(1 / x)));
    }
    // Source: slope of psi at its root is 0.9676722454476212 (zeta(2, root), from memory).
    expectRelative(digamma(1.4616321449683622 + 2 ** -40) / 2 ** -40, 0.9676722454476212, 1e-3);
  });

  test('refuses poles and NaN', () => {
    expect(() => digamma(-1)).toThrow('*x* must not be a pole of digamma; got -1');
    expect(() => digamma(Number.NaN)).toThrow(RangeError);
    expect(digamma(Infinity)).toBe(Infinity);
  });
});

describe('Stirling error', () => {
  test('theory: series and definition agree where they meet, 1e-14', () => {
    expect(Math.abs(stirlingError(9.999999999) - stirlingSeries(9.999999999))).toBeLessThanOrEqual(1e-14);
  });

  test('by hand: a = 1 gives 1 - log(2 pi) / 2, 1e-14', () => {
    expectRelative(stirlingError(1), 1 - 0.5 * Math.log(2 * Math.PI), 1e-14);
  });
});

describe('logBeta', () => {
  test('by hand: B(1, n) = 1 / n, B(1/2, 1/2) = pi, B(2, 3) = 1/12, 1e-13', () => {
    for (const n of [1e-6, 0.5, 3, 9.99, 10, 1e3, 1e9])
      expect(Math.abs(logBeta(1, n) + Math.log(n))).toBeLessThanOrEqual(1e-13 * Math.max(1, Math.abs(Math.log(n))));
    expectRelative(logBeta(0.5, 0.5), Math.log(Math.PI), 1e-14);
    expectRelative(logBeta(2, 3), -Math.log(12), 1e-14);
  });

  test('theory: B(a + 1, b) = B(a, b) a / (a + b), 1e-13; symmetric', () => {
    for (const [a, b] of [
      [12, 15],
      [200, 0.3],
      [9.5, 30],
      [1e6, 1e6],
    ] as const) {
      expectRelative(logBeta(a + 1, b), logBeta(a, b) + Math.log(a / (a + b)), 1e-13);
      expect(logBeta(a, b)).toBe(logBeta(b, a));
    }
  });

  test('refuses a shape that is not positive', () => {
    expect(() => logBeta(0, 1)).toThrow('*a* must be above 0; got 0');
  });
});

describe('erfcInverse', () => {
  test('theory: erfc of the result is p, 1e-12', () => {
    for (const p of [1e-300, 1e-20, 0.01, 0.5, 1, 1.7]) expectRelative(erfc(erfcInverse(p)), p, 1e-12);
    expectRelative(erf(erfcInverse(0.1)), 0.9, 1e-14);
  });

  test('degenerate: ends', () => {
    expect([erfcInverse(0), erfcInverse(1), erfcInverse(2)]).toEqual([Infinity, 0, -Infinity]);
  });

  test('refuses values outside 0..2', () => {
    expect(() => erfcInverse(2.1)).toThrow(RangeError);
  });
});
