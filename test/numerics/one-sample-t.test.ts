import { describe, expect, it } from 'vitest';
import { oneSampleT, pairedT } from '../../src/numerics/one-sample-t.ts';
import { close, darwin, drugOne, drugTwo, scores } from './samples.ts';

describe('one-sample and paired t', () => {
  it('by hand: 1, 2, 3 against 1: t = sqrt 3 on 2 df', () => {
    const test = oneSampleT(scores(1, 2, 3), { mu: 1 });
    expect([test.estimate, test.sd, test.df]).toEqual([2, 1, 2]);
    expect(close(test.t, Math.sqrt(3), 1e-14)).toBe(true);
    // P(|T| > t) on 2 df = 1 - t / sqrt(2 + t^2)
    expect(close(test.p, 1 - Math.sqrt(3 / 5), 1e-12)).toBe(true);
  });
  it('agrees with SciPy 1.10 ttest_1samp and ttest_rel (rtol 1e-11)', () => {
    const test = oneSampleT(darwin);
    expect(close(test.t, 2.1479874613311205, 1e-13) && close(test.p, 0.0497029440218009, 1e-11)).toBe(true);
    expect(
      close(test.interval?.[0], 0.03119331840152384, 1e-9) && close(test.interval?.[1], 41.83547334826514, 1e-11),
    ).toBe(true);
    expect(close(oneSampleT(darwin, { mu: 10, alternative: 'greater' }).p, 0.14039383308120357, 1e-11)).toBe(true);
    expect(close(oneSampleT(darwin, { mu: 10, alternative: 'less' }).p, 0.8596061669187964, 1e-11)).toBe(true);
    expect(close(pairedT(drugOne, drugTwo).p, 0.00283289019738427, 1e-11)).toBe(true);
  });
  it('agrees with R 4.2 t.test, 90 % interval (rtol 1e-11)', () => {
    const { interval } = oneSampleT(darwin, { level: 0.9 });
    expect(close(interval?.[0], 3.768385753655287, 1e-11) && close(interval?.[1], 38.09828091301138, 1e-11)).toBe(true);
  });
  it('theory: the two one-sided p add to 1, the two-sided is twice the smaller', () => {
    const [both, more, less] = (['two-sided', 'greater', 'less'] as const).map(
      (alternative) => oneSampleT(darwin, { alternative }).p as number,
    );
    expect(close((more as number) + (less as number), 1, 1e-13) && close(both, 2 * (more as number), 1e-12)).toBe(true);
  });
  it('invariance: order of pairs, exchange of conditions, offset', () => {
    const test = pairedT(drugOne, drugTwo);
    expect(pairedT(drugOne.toReversed(), drugTwo.toReversed()).p).toBe(test.p);
    expect(pairedT(drugTwo, drugOne).t).toBe(-(test.t as number));
    const far = oneSampleT(
      darwin.map((x) => x + 1024),
      { mu: 1024 },
    );
    expect(close(far.t, oneSampleT(darwin).t as number, 1e-12)).toBe(true);
  });
  it('degenerate: equal scores, differences equal but for rounding, one score', () => {
    expect(oneSampleT(scores(2, 2, 2), { mu: 1 })).toMatchObject({
      estimate: 2,
      t: null,
      p: null,
      interval: null,
      reason: 'all scores are equal',
    });
    expect(pairedT(scores(0.3, 0.2, 0.7), scores(0.2, 0.1, 0.6)).reason).toBe('all differences are equal');
    expect(oneSampleT(scores(5))).toMatchObject({ estimate: 5, sd: null, p: null, reason: 'only one score' });
  });
  it('refuses no scores, NaN, unequal lengths', () => {
    expect(() => oneSampleT(scores())).toThrow(RangeError);
    expect(() => oneSampleT(scores(1, Number.NaN))).toThrow(RangeError);
    expect(() => pairedT(scores(1, 2), scores(1))).toThrow('*y* must be as long');
  });
});
