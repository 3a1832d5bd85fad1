import { describe, expect, it } from 'vitest';
import { normalFromInverse, normalFromP, normalFromT, replaceByNormal } from '../../src/numerics/relabel-z.ts';
import { tTwoSided } from '../../src/numerics/tails/t.ts';

describe('normalFromT', () => {
  it('agrees with the tails: 1e-10 over df 1 to 1e6 and p from .999 to 1e-12', () => {
    let worst = 0;
    for (const df of [1, 2.5, 4, 4.3, 5.5, 7.99, 8, 12, 20.3, 38, 77.7, 200, 1e4, 1e6]) {
      for (let t = 0.001; t < 12; t *= 1.17) {
        const direct = normalFromP(tTwoSided(t, df), t);
        worst = Math.max(worst, Math.abs(normalFromT(t, df) / direct - 1));
      }
    }
    expect(worst).toBeLessThan(1e-10);
  });

  it('by hand: t = 2.262157 on 9 df and t = 12.7062 on 1 df have the two-sided p .05 of z = 1.959964', () => {
    // Critical values of Student's t, common practice (printed tables).
    expect(Math.abs(normalFromT(2.2621571628, 9) - 1.9599639845)).toBeLessThan(1e-8);
    expect(Math.abs(normalFromT(12.7062047362, 1) - 1.9599639845)).toBeLessThan(1e-8);
  });

  it('invariance: the sign of t is the sign of z, 0 gives 0', () => {
    for (const df of [3, 11, 40]) expect(normalFromT(-1.7, df)).toBe(-normalFromT(1.7, df));
    expect(normalFromT(0, 11)).toBe(0);
  });

  it('theory: with many degrees of freedom z is t to 1e-6', () => {
    expect(Math.abs(normalFromT(2.5, 1e7) - 2.5)).toBeLessThan(1e-6);
  });

  it('degenerate: a t whose p is 0 in double precision gives a finite z', () => {
    const z = normalFromT(1e200, 50);
    expect(z).toBeGreaterThan(36);
    expect(z).toBeLessThan(38);
  });
});

describe('replaceByNormal', () => {
  it('agrees with normalFromT, exactly, one after another; a place without degrees of freedom stays', () => {
    const t = [0, 1e-9, -0.4, 1.9, -2.5, 3.9, 8, -40];
    for (const df of [1, 5, 8, 23, 400]) {
      const z = Float64Array.from([99, ...t, 7]);
      replaceByNormal(z, 1, Float64Array.from([...t.map(() => 1 / df), 0]), t.length + 1);
      expect([...z]).toEqual([99, ...t.map((each) => normalFromT(each, df)), 7]);
      expect(normalFromInverse(1.9, 1 / df)).toBe(normalFromT(1.9, df));
    }
  });
});

describe('normalFromP', () => {
  it('by hand: p = .05 is 1.959964 with the sign asked for, p = 1 and sign 0 are 0', () => {
    expect(Math.abs(normalFromP(0.05, -3) + 1.9599639845)).toBeLessThan(1e-9);
    expect(normalFromP(1, 5)).toBe(0);
    expect(normalFromP(0.05, 0)).toBe(0);
  });

  it('degenerate: p = 0 gives a finite z', () => {
    expect(Number.isFinite(normalFromP(0, 1))).toBe(true);
  });
});
