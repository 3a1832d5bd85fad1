import { describe, expect, it } from 'vitest';
import { type Adjustment, adjustP } from '../../src/numerics/multiplicity.ts';
import { expectClose } from './anova/expect-close.ts';

const all: Adjustment[] = ['bonferroni', 'holm', 'hochberg', 'hommel', 'bh', 'by', 'sidak'];

function expectList(got: Float64Array, want: readonly number[], tolerance: number): void {
  expect(got.length).toBe(want.length);
  want.forEach((value, i) => {
    expectClose(got[i], value, tolerance);
  });
}

describe('adjustP', () => {
  // worked on paper from the definitions: three p values in no order
  it('by hand: .01, .04, .03 (1e-14)', () => {
    const p = [0.01, 0.04, 0.03];
    expectList(adjustP(p, 'bonferroni'), [0.03, 0.12, 0.09], 1e-14);
    expectList(adjustP(p, 'holm'), [0.03, 0.06, 0.06], 1e-14);
    expectList(adjustP(p, 'hochberg'), [0.03, 0.04, 0.04], 1e-14);
    expectList(adjustP(p, 'hommel'), [0.03, 0.04, 0.04], 1e-14);
    expectList(adjustP(p, 'bh'), [0.03, 0.04, 0.04], 1e-14);
    expectList(adjustP(p, 'by'), [0.055, 0.22 / 3, 0.22 / 3], 1e-14);
    expectList(adjustP(p, 'sidak'), [0.029701, 1 - 0.96 ** 3, 1 - 0.97 ** 3], 1e-13);
  });

  // R 4.2.2 p.adjust(c(.0001, .04, .04, .2, .9, .012), 'hommel')
  it('agrees with R on Hommel (1e-12)', () => {
    expectList(adjustP([0.0001, 0.04, 0.04, 0.2, 0.9, 0.012], 'hommel'), [0.0006, 0.12, 0.12, 0.4, 0.9, 0.06], 1e-12);
  });

  // Hommel (1988): closed testing with the test of Simes; worked out over all subsets
  it('theory: Hommel is the closed Simes procedure (1e-14)', () => {
    const p = [0.011, 0.06, 0.022, 0.3, 0.045];
    const simes = (set: readonly number[]) => {
      const sorted = set.map((i) => p[i]!).sort((a, b) => a - b);
      return Math.min(...sorted.map((value, i) => (set.length * value) / (i + 1)));
    };
    const sets = Array.from({ length: 31 }, (_, s) => [0, 1, 2, 3, 4].filter((i) => ((s + 1) >> i) & 1));
    const want = p.map((_, i) => Math.max(...sets.filter((set) => set.includes(i)).map(simes)));
    expectList(adjustP(p, 'hommel'), want, 1e-14);
  });

  it('theory: adjusted values keep the order and the sharper procedures never give larger ones', () => {
    const p = [0.2, 0.001, 0.03, 0.03, 0.012, 0.7];
    const of = (method: Adjustment) => adjustP(p, method);
    for (let i = 0; i < p.length; i++) {
      expect(of('holm')[i]).toBeLessThanOrEqual(of('bonferroni')[i]!);
      expect(of('hochberg')[i]).toBeLessThanOrEqual(of('holm')[i]!);
      expect(of('hommel')[i]).toBeLessThanOrEqual(of('hochberg')[i]!);
      expect(of('bh')[i]).toBeLessThanOrEqual(of('hommel')[i]!);
      for (const method of all) expect(of(method)[i]).toBeGreaterThanOrEqual(p[i]!);
    }
  });

  it('invariance: reordering reorders, and the argument is not modified', () => {
    const p = Float64Array.of(0.2, 0.001, 0.03, 0.012);
    for (const method of all) {
      expect([...adjustP([...p].reverse(), method)].reverse()).toEqual([...adjustP(p, method)]);
    }
    expect([...p]).toEqual([0.2, 0.001, 0.03, 0.012]);
  });

  it('degenerate: none, one, zeros and ones', () => {
    for (const method of all) {
      expect([...adjustP([], method)]).toEqual([]);
      expectClose(adjustP([0.03], method)[0], 0.03, 1e-14);
      expect([...adjustP([0, 1], method)][0]).toBe(0);
      expect([...adjustP([1, 1], method)]).toEqual([1, 1]);
    }
  });

  it('degenerate: very small p values keep their digits (1e-14)', () => {
    expectClose(adjustP([1e-300, 0.5], 'sidak')[0], 2e-300, 1e-14);
  });

  it('refuses what is no probability and an unknown method', () => {
    expect(() => adjustP([0.1, Number.NaN], 'holm')).toThrow('*p* must be between 0 and 1; got NaN at index 1');
    expect(() => adjustP([1.1], 'bh')).toThrow(RangeError);
    expect(() => adjustP([0.1], 'other' as Adjustment)).toThrow('*method* must be one of the adjustments; got other');
  });
});
