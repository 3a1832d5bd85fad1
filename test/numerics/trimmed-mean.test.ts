import { describe, expect, it } from 'vitest';
import { oneSampleT } from '../../src/numerics/one-sample-t.ts';
import { sorted } from '../../src/numerics/order.ts';
import { trimmedMean, trimmedMeanErrors, trimmedMeanSorted, trimmedMeanTest } from '../../src/numerics/trimmed-mean.ts';
import { winsorizedSd } from '../../src/numerics/winsorized.ts';
import { close, darwin, drugOne, drugTwo, scores } from './samples.ts';

const change = drugTwo.map((hours, i) => hours - (drugOne[i] as number));

describe('trimmed mean', () => {
  it('by hand: one score goes at each end of five', () => {
    expect(trimmedMean(scores(100, 1, 2, 3, 4), 20)).toBe(3);
    expect(trimmedMeanSorted(scores(1, 2, 3, 4, 100), 2)).toBe(3);
  });
  it('agrees with SciPy 1.10 trim_mean of Darwin (rtol 1e-13)', () => {
    expect(close(trimmedMean(darwin, 20), 25.77777777777778, 1e-13)).toBe(true);
    expect(close(trimmedMean(darwin, 10), 23.53846153846154, 1e-13)).toBe(true);
  });
  it('agrees with the published formulas written out: Darwin and sleep at 20 % (methods 3.1; rtol 1e-5)', () => {
    const maize = trimmedMeanTest(darwin);
    expect([close(maize.se, 7.1785, 1e-5), close(maize.t, 3.59097, 1e-5), close(maize.p, 0.007075, 1e-4)]).toEqual([
      true,
      true,
      true,
    ]);
    expect(maize.df).toBe(8);
    const sleep = trimmedMeanTest(change);
    expect([
      close(sleep.estimate, 1.33333, 1e-5),
      close(sleep.se, 0.176033, 1e-5),
      close(sleep.t, 7.57433, 1e-5),
    ]).toEqual([true, true, true]);
    expect([sleep.df, close(sleep.p, 0.000636, 1e-3)]).toEqual([5, true]);
  });
  it('theory: at 0 % it is the mean and the one-sample t test', () => {
    const { g: _g, h: _h, ...own } = trimmedMeanTest(darwin, { trim: 0, alternative: 'less', mu: 30 });
    const { sd: _sd, ...plain } = oneSampleT(darwin, { alternative: 'less', mu: 30 });
    expect(close(own.p, plain.p as number, 1e-12)).toBe(true);
    expect(own.interval?.[0]).toBe(null);
    expect(close(own.interval?.[1], plain.interval?.[1] as number, 1e-12)).toBe(true);
  });
  it('theory: the three standard errors differ only by their divisor', () => {
    const { tukeyMcLaughlin, actualFraction, yuen } = trimmedMeanErrors(darwin, 10);
    const sd = winsorizedSd(darwin, 10);
    expect(close(tukeyMcLaughlin, sd / (0.8 * Math.sqrt(15)), 1e-13)).toBe(true);
    expect(close(actualFraction, (sd * Math.sqrt(15)) / 13, 1e-13)).toBe(true);
    expect(close(yuen, sd * Math.sqrt(14 / (13 * 12)), 1e-13)).toBe(true);
  });
  it('invariance: order, sign, offset, and how far the trimmed scores lie', () => {
    const test = trimmedMeanTest(darwin);
    expect(trimmedMeanTest(sorted(darwin))).toEqual(test);
    expect(trimmedMeanTest(darwin.map((x) => -x)).t).toBe(-(test.t as number));
    const far = trimmedMeanTest(
      darwin.map((x) => x + 1024),
      { mu: 1024 },
    );
    expect(close(far.p, test.p as number, 1e-12)).toBe(true);
    expect(trimmedMeanTest(darwin.map((x) => (x === -67 ? -1e12 : x))).p).toBe(test.p);
  });
  it('degenerate: no spread left, too few left, one score', () => {
    expect(trimmedMeanTest(scores(1, 5, 5, 5, 9))).toMatchObject({
      estimate: 5,
      se: null,
      p: null,
      reason: 'all winsorized scores are equal',
    });
    expect(trimmedMeanTest(scores(3, 3, 3), { trim: 0 }).reason).toBe('all scores are equal');
    expect(trimmedMeanTest(scores(1, 2, 3), { trim: 40 }).reason).toBe('1 of 3 scores left after trimming');
    expect(trimmedMeanErrors(scores(4), 20)).toEqual({ tukeyMcLaughlin: null, actualFraction: null, yuen: null });
  });
  it('refuses no scores, odd trims and levels', () => {
    expect(() => trimmedMean(scores(), 20)).toThrow(RangeError);
    expect(() => trimmedMean(darwin, 12.5)).toThrow('*trim* must be');
    expect(() => trimmedMeanSorted(scores(1, 2), 1)).toThrow('*g* must leave');
    expect(() => trimmedMeanTest(darwin, { level: 95 })).toThrow('*level* must be');
  });
});
