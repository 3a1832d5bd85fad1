import { describe, expect, test } from 'vitest';
import { fLower, fUpper } from '../../../src/numerics/tails/f.ts';
import { noncentralFLower, noncentralFParameter, noncentralFUpper } from '../../../src/numerics/tails/noncentral-f.ts';
import { noncentralTLower, noncentralTUpper } from '../../../src/numerics/tails/noncentral-t.ts';
import { normalUpper } from '../../../src/numerics/tails/normal.ts';
import { expectRelative } from './expect-relative.ts';

describe('noncentral F tails', () => {
  test('theory: 1 numerator degree of freedom is a squared noncentral t, far into the tail, 1e-11', () => {
    for (const [t, df, ncp] of [
      [0.2, 9, 1],
      [3, 12.5, 2],
      [40, 30, 2],
      [9, 200, 1.5],
    ] as const) {
      expectRelative(
        noncentralFUpper(t * t, 1, df, ncp * ncp),
        noncentralTUpper(t, df, ncp) + noncentralTLower(-t, df, ncp),
        1e-11,
      );
    }
    expectRelative(noncentralFLower(4, 1, 10, 25), noncentralTLower(2, 10, 5) - noncentralTLower(-2, 10, 5), 1e-11);
  });

  test('theory: infinite denominator degrees of freedom are a squared shifted normal value, 1e-12', () => {
    for (const t of [0.3, 2, 8])
      expectRelative(noncentralFUpper(t * t, 1, Infinity, 9), normalUpper(t - 3) + normalUpper(t + 3), 1e-12);
    expectRelative(noncentralFUpper(2, 3, 1e11, 4), noncentralFUpper(2, 3, Infinity, 4), 1e-9);
  });

  test('theory: no noncentrality is the central distribution, as are infinite numerator degrees of freedom', () => {
    expect(noncentralFLower(2, 3, 20, 0)).toBe(fLower(2, 3, 20));
    expectRelative(noncentralFUpper(2, 3, 20, 1e-14), fUpper(2, 3, 20), 1e-12);
    expect(noncentralFUpper(2, Infinity, 20, 5)).toBe(fUpper(2, Infinity, 20));
  });

  test('theory: lower + upper = 1 on both sides of the middle, continuous across it, 1e-11', () => {
    const middle = 1 + 12 / 4;
    for (const x of [0.1, middle, 30])
      expect(Math.abs(noncentralFLower(x, 4, 25, 12) + noncentralFUpper(x, 4, 25, 12) - 1)).toBeLessThanOrEqual(
        2.3e-16,
      );
    expectRelative(noncentralFLower(middle * (1 + 1e-14), 4, 25, 12), noncentralFLower(middle, 4, 25, 12), 1e-12);
    expectRelative(
      noncentralFLower(1e5 / 2 + 1.0001, 2, 50, 1e5),
      noncentralFLower(1e5 / 2 + 0.9999, 2, 50, 1e5),
      1e-4,
    );
  });

  test('invariance: the noncentrality found gives back the probability, 1e-12', () => {
    for (const p of [0.025, 0.5, 0.95])
      expectRelative(noncentralFLower(6.5, 3, 40, noncentralFParameter(6.5, 3, 40, p)), p, 1e-12);
    expectRelative(noncentralFLower(500, 3, Infinity, noncentralFParameter(500, 3, Infinity, 0.05)), 0.05, 1e-11);
  });

  test('degenerate: no noncentrality is small enough, and ends', () => {
    expect(noncentralFParameter(0.5, 3, 40, 0.975)).toBe(0);
    expect([noncentralFLower(0, 2, 3, 4), noncentralFUpper(-1, 2, 3, 4), noncentralFLower(Infinity, 2, 3, 4)]).toEqual([
      0, 1, 1,
    ]);
  });

  test('refuses wrong arguments', () => {
    expect(() => noncentralFLower(1, 0, 2, 1)).toThrow('*df1* must be above 0; got 0');
    expect(() => noncentralFUpper(1, 2, 2, -1)).toThrow('*ncp* must be at least 0 and finite; got -1');
    expect(() => noncentralFUpper(Number.NaN, 2, 2, 1)).toThrow(RangeError);
    expect(() => noncentralFParameter(0, 2, 2, 0.5)).toThrow('*x* must be above 0 and finite; got 0');
    expect(() => noncentralFParameter(1, 2, 2, 1)).toThrow('*p* must be strictly between 0 and 1; got 1');
    expect(() => noncentralFParameter(1, Infinity, 2, 0.5)).toThrow('*df1* must be finite');
  });
});
