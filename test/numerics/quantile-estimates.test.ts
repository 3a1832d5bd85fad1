import { describe, expect, it } from 'vitest';
import { exactBootstrap } from '../../src/numerics/exact-bootstrap.ts';
import { harrellDavis, quantileStandardError } from '../../src/numerics/quantile-estimates.ts';
import { close, darwin, drugOne, scores } from './samples.ts';

describe('quantiles from all order statistics', () => {
  it('by hand: the median of two scores weighs both alike', () => {
    expect(close(harrellDavis(scores(1, 4), 0.5), 2.5, 1e-13)).toBe(true);
    // One score: m = 1, weights Beta(1, 2) over halves: 3/4 and 1/4 for two scores at p = .25
    const own = quantileStandardError(scores(0, 4), 0.25);
    expect([own.m, close(own.se, 4 * Math.sqrt(3 / 16), 1e-12)]).toEqual([1, true]);
  });
  it('agrees with SciPy 1.10 mstats.hdquantiles of Darwin (rtol 1e-10)', () => {
    const want = [3.5794640782604015, 24.85145806513926, 46.227840994789304];
    [0.25, 0.5, 0.75].forEach((p, i) => {
      expect(close(harrellDavis(darwin, p), want[i] as number, 1e-10)).toBe(true);
    });
  });
  it('theory: the standard error is the exact bootstrap SD of the order statistic (rtol 1e-9)', () => {
    const x = drugOne.slice(0, 7);
    for (const [p, k] of [
      [0.5, 4],
      [0.2, 1],
      [0.8, 6],
    ] as const) {
      const own = quantileStandardError(x, p);
      expect(own.m).toBe(k);
      expect(close(own.se, exactBootstrap(x, (s) => s[k - 1] as number).se as number, 1e-9)).toBe(true);
    }
  });
  it('invariance: offset, unit and sign', () => {
    expect(
      close(
        harrellDavis(
          darwin.map((x) => 4 * x + 64),
          0.3,
        ),
        4 * harrellDavis(darwin, 0.3) + 64,
        1e-12,
      ),
    ).toBe(true);
    expect(
      close(
        harrellDavis(
          darwin.map((x) => -x),
          0.3,
        ),
        -harrellDavis(darwin, 0.7),
        1e-12,
      ),
    ).toBe(true);
    expect(
      close(
        quantileStandardError(
          darwin.map((x) => 4 * x),
          0.5,
        ).se,
        4 * (quantileStandardError(darwin, 0.5).se as number),
        1e-12,
      ),
    ).toBe(true);
  });
  it('degenerate: one score; weights that do not exist', () => {
    expect(harrellDavis(scores(7), 0.9)).toBe(7);
    expect(quantileStandardError(scores(1, 2), 0.01)).toEqual({
      se: null,
      m: 0,
      reason: 'too few scores for this quantile',
    });
    expect(quantileStandardError(scores(1, 2), 0.25, 'm-minus-1').se).toBe(null);
    expect(quantileStandardError(scores(3, 3, 3), 0.5).se).toBe(0);
  });
  it('refuses probabilities of 0 and 1 and too few scores', () => {
    for (const p of [0, 1, Number.NaN]) {
      expect(() => harrellDavis(darwin, p)).toThrow('*p* must be');
      expect(() => quantileStandardError(darwin, p)).toThrow('*p* must be');
    }
    expect(() => quantileStandardError(scores(1), 0.5)).toThrow(RangeError);
  });
});
