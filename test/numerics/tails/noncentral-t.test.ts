import { describe, expect, test } from 'vitest';
import { chiMixture } from '../../../src/numerics/tails/chi-mixture.ts';
import { noncentralTLower, noncentralTParameter, noncentralTUpper } from '../../../src/numerics/tails/noncentral-t.ts';
import { normalLower } from '../../../src/numerics/tails/normal.ts';
import { tLower, tUpper } from '../../../src/numerics/tails/t.ts';
import { expectRelative } from './expect-relative.ts';

describe('noncentral t tails', () => {
  test('theory: at t = 0 only the normal part counts, 1e-13', () => {
    for (const df of [1, 20, Infinity])
      for (const ncp of [-7, 0.4, 12]) expectRelative(noncentralTLower(0, df, ncp), normalLower(-ncp), 1e-12);
  });

  test('theory: no noncentrality is the central distribution; infinite df is the normal one', () => {
    expect(noncentralTLower(1.3, 8, 0)).toBe(tLower(1.3, 8));
    expect(noncentralTUpper(1.3, 8, 0)).toBe(tUpper(1.3, 8));
    expectRelative(noncentralTUpper(9, 8, 1e-14), tUpper(9, 8), 1e-12);
    expect(noncentralTLower(1.3, Infinity, 2)).toBe(normalLower(1.3 - 2));
    expectRelative(noncentralTLower(1.3, 1e19, 2), normalLower(1.3 - 2), 1e-12);
  });

  test('theory: lower + upper = 1 and the mirror image changes both signs', () => {
    for (const df of [0.8, 5, 60.5]) {
      for (const ncp of [-9, 0.7, 30, 700]) {
        for (const t of [-20, -0.5, 3, 35, 650]) {
          expect(Math.abs(noncentralTLower(t, df, ncp) + noncentralTUpper(t, df, ncp) - 1)).toBeLessThanOrEqual(1e-12);
          expect(noncentralTLower(t, df, ncp)).toBe(noncentralTUpper(-t, df, -ncp));
        }
      }
    }
  });

  test('theory: both quadratures agree where they meet, also far out, 1e-12', () => {
    for (const df of [0.7, 29.5, 80]) {
      for (const share of [0.3, 0.8, 1.3, 3]) {
        expectRelative(noncentralTLower(60 * share, df, 60), chiMixture(60 * share, 60, df), 1e-12);
        expectRelative(noncentralTUpper(60 * share, df, 60), chiMixture(-60 * share, -60, df), 1e-12);
      }
    }
  });

  test('invariance: the noncentrality found gives back the probability, 1e-12', () => {
    for (const t of [-3, 0, 0.4, 12, 1e6]) {
      for (const p of [0.025, 0.5, 0.975])
        expectRelative(noncentralTLower(t, 14.2, noncentralTParameter(t, 14.2, p)), p, 1e-12);
    }
    expectRelative(noncentralTParameter(2, Infinity, 0.975), 2 - 1.959963984540054, 1e-12);
  });

  test('degenerate: infinite t and noncentralities of the other sign beyond any double', () => {
    expect([
      noncentralTLower(Infinity, 4, 1),
      noncentralTUpper(Infinity, 4, 1),
      noncentralTUpper(-Infinity, 4, 1),
    ]).toEqual([1, 0, 1]);
    expect([noncentralTLower(-5, 4, 90), noncentralTLower(5, 4, -90)]).toEqual([0, 1]);
  });

  test('refuses wrong arguments', () => {
    expect(() => noncentralTLower(1, -1, 0)).toThrow('*df* must be above 0; got -1');
    expect(() => noncentralTUpper(1, 5, Infinity)).toThrow('*ncp* must be finite; got Infinity');
    expect(() => noncentralTLower(Number.NaN, 5, 1)).toThrow(RangeError);
    expect(() => noncentralTParameter(1, 5, 0)).toThrow('*p* must be strictly between 0 and 1; got 0');
    expect(() => noncentralTParameter(Infinity, 5, 0.5)).toThrow('*t* must be finite');
  });
});
