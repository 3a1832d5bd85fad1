import { describe, expect, it } from 'vitest';
import { mannWhitney, pooled } from '../../src/numerics/mann-whitney.ts';
import { close, five, scores, six, soybean, sunflower } from './samples.ts';

describe('Mann-Whitney', () => {
  it('by hand: 2, 4 against 1, 3: three of four pairs, ties count half', () => {
    const test = mannWhitney(scores(2, 4), scores(1, 3));
    expect([test.U, test.uOther, test.superiority, test.rankBiserial]).toEqual([3, 1, 0.75, 0.5]);
    // P(U >= 3) = 2 of 6 splits
    expect(close(mannWhitney(scores(2, 4), scores(1, 3), { alternative: 'greater' }).p, 1 / 3, 1e-14)).toBe(true);
    expect(mannWhitney(scores(2), scores(2, 1)).U).toBe(1.5);
    expect([...pooled(scores(1), scores(2, 3))]).toEqual([1, 2, 3]);
  });
  it('agrees with SciPy 1.10 mannwhitneyu, exact and normal (rtol 1e-12)', () => {
    const exact = mannWhitney(six, five, { method: 'exact' });
    expect(exact.U).toBe(21);
    expect(close(exact.p, 0.32900432900432897, 1e-12)).toBe(true);
    expect(
      close(mannWhitney(six, five, { method: 'exact', alternative: 'greater' }).p, 0.16450216450216448, 1e-12),
    ).toBe(true);
    const normal = mannWhitney(sunflower, soybean, { method: 'asymptotic' });
    expect(normal.U).toBe(146);
    expect(close(normal.p, 0.0015574541902401387, 1e-12)).toBe(true);
  });
  it('agrees with R 4.2 wilcox.test without correction (rtol 1e-12)', () => {
    expect(
      close(mannWhitney(sunflower, soybean, { method: 'asymptotic', correct: false }).p, 0.0014252843091145401, 1e-12),
    ).toBe(true);
  });
  it('theory: without ties the conditional and the exact distribution are one', () => {
    for (const alternative of ['two-sided', 'greater', 'less'] as const) {
      const p = mannWhitney(six, five, { method: 'exact', alternative }).p as number;
      expect(close(mannWhitney(six, five, { alternative }).p, p, 1e-13)).toBe(true);
    }
  });
  it('theory: with ties, all 20 splits of 1, 2, 2 | 2, 3, 3 counted by hand', () => {
    // First group's midrank sum is 1 + 3 + 3 = 7, the smallest possible with 3 of the 20 splits giving it.
    expect(close(mannWhitney(scores(1, 2, 2), scores(2, 3, 3), { alternative: 'less' }).p, 3 / 20, 1e-13)).toBe(true);
  });
  it('invariance: increasing transformations and exchange of the groups', () => {
    const test = mannWhitney(sunflower, soybean);
    expect(mannWhitney(sunflower.map(Math.log), soybean.map(Math.log)).p).toBe(test.p);
    const turned = mannWhitney(soybean, sunflower);
    expect([turned.U, close(turned.p, test.p as number, 1e-12)]).toEqual([test.uOther, true]);
  });
  it('degenerate: all scores equal, ties under the distribution without ties', () => {
    expect(mannWhitney(scores(1, 1), scores(1))).toMatchObject({
      superiority: 0.5,
      p: null,
      reason: 'all scores are equal',
    });
    expect(mannWhitney(scores(1, 2), scores(2, 3), { method: 'exact' }).reason).toBe(
      'the exact distribution needs scores without ties',
    );
    expect(close(mannWhitney(scores(3), scores(1)).p, 1, 1e-14)).toBe(true);
  });
  it('refuses an empty group and NaN', () => {
    expect(() => mannWhitney(scores(), five)).toThrow(RangeError);
    expect(() => mannWhitney(six, scores(Number.NaN))).toThrow('*y* must hold finite');
  });
});
