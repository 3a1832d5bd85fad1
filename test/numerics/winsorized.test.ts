import { describe, expect, it } from 'vitest';
import { oneSampleT } from '../../src/numerics/one-sample-t.ts';
import { sorted } from '../../src/numerics/order.ts';
import { trimCount } from '../../src/numerics/scores.ts';
import {
  winsorized,
  winsorizedCovariance,
  winsorizedMean,
  winsorizedMeanTest,
  winsorizedSd,
  winsorizedSorted,
  winsorizedVariance,
} from '../../src/numerics/winsorized.ts';
import { close, darwin, drugOne, drugTwo, scores } from './samples.ts';

describe('winsorized', () => {
  it('by hand: the extreme scores are drawn in, in place', () => {
    expect([...winsorized(scores(9, 1, 5, 3, 7), 20)]).toEqual([7, 3, 5, 3, 7]);
    expect(winsorizedMean(scores(9, 1, 5, 3, 7), 20)).toBe(5);
    expect(winsorizedVariance(scores(9, 1, 5, 3, 7), 20)).toBe(4);
  });
  it('by hand: se = s_w (n-1) / ((h-1) sqrt n), df = h - 1', () => {
    const test = winsorizedMeanTest(scores(9, 1, 5, 3, 7), { trim: 20 });
    expect([test.g, test.h, test.df]).toEqual([1, 3, 2]);
    expect(close(test.se, (2 * 4) / (2 * Math.sqrt(5)), 1e-14)).toBe(true);
  });
  it('agrees with SciPy 1.10 mstats.winsorize of Darwin, 20 % (rtol 1e-12)', () => {
    expect(close(winsorizedMean(darwin, 20), 26.866666666666667, 1e-12)).toBe(true);
    expect(close(winsorizedVariance(darwin, 20), 278.2666666666666, 1e-12)).toBe(true);
  });
  it('agrees with the plain functions: scores already sorted (rtol 1e-13)', () => {
    for (const [x, trim] of [
      [darwin, 20],
      [drugOne, 0],
      [drugTwo, 30],
    ] as const) {
      const own = winsorizedSorted(sorted(x), trimCount(x.length, trim));
      expect(close(own.mean, winsorizedMean(x, trim), 1e-13)).toBe(true);
      expect(close(own.squares / (x.length - 1), winsorizedVariance(x, trim), 1e-13)).toBe(true);
    }
    expect(() => winsorizedSorted(scores(1, 2), 1)).toThrow('*g* must leave');
  });
  it('theory: at 0 % the test is the one-sample t test', () => {
    const { g: _g, h: _h, ...own } = winsorizedMeanTest(darwin, { trim: 0, mu: 5, level: 0.9 });
    const { sd: _sd, ...plain } = oneSampleT(darwin, { mu: 5, level: 0.9 });
    expect(close(own.t, plain.t as number, 1e-13) && close(own.p, plain.p as number, 1e-12)).toBe(true);
    expect(own.df).toBe(plain.df);
  });
  it('theory: the covariance of a variable with itself is its variance', () => {
    expect(close(winsorizedCovariance(drugOne, drugOne, 20), winsorizedVariance(drugOne, 20), 1e-13)).toBe(true);
    expect(close(winsorizedSd(drugTwo, 20) ** 2, winsorizedVariance(drugTwo, 20), 1e-13)).toBe(true);
  });
  it('invariance: a score beyond the trim may be any far value', () => {
    const far = darwin.map((x) => (x === -67 ? -1e9 : x));
    expect(winsorizedMeanTest(far)).toEqual(winsorizedMeanTest(darwin));
  });
  it('degenerate: equal middle scores, too few left', () => {
    expect(winsorizedMeanTest(scores(1, 5, 5, 5, 9)).reason).toBe('all winsorized scores are equal');
    expect(winsorizedMeanTest(scores(1, 5, 9), { trim: 40 })).toMatchObject({
      estimate: 5,
      p: null,
      h: 1,
      reason: '1 of 3 scores left after winsorizing',
    });
  });
  it('refuses no scores and trims of half or more', () => {
    expect(() => winsorizedMean(scores(), 20)).toThrow(RangeError);
    expect(() => winsorized(darwin, 50)).toThrow('*trim* must be');
    expect(() => winsorizedVariance(scores(1), 0)).toThrow(RangeError);
  });
});
