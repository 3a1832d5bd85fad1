import { describe, expect, it } from 'vitest';
import { pairedT } from '../../src/numerics/one-sample-t.ts';
import { yuenPaired } from '../../src/numerics/yuen-paired.ts';
import { close, drugOne, drugTwo, scores } from './samples.ts';

describe('Yuen for pairs', () => {
  it('by hand: five pairs, one trimmed at each end', () => {
    // Winsorized x: 2 2 3 4 4, y: 1 1 1 3 3 (margins 1 1 1 3 9); q1 = 4, q2 = 4.8, q12 = 4, h = 3
    const test = yuenPaired(scores(1, 2, 3, 4, 5), scores(1, 1, 1, 3, 9));
    expect(test.trimmedMeans[0]).toBe(3);
    expect(close(test.trimmedMeans[1], 5 / 3, 1e-14)).toBe(true);
    expect(close(test.se, Math.sqrt((4 + 4.8 - 2 * 4) / 6), 1e-12)).toBe(true);
    expect([test.df, test.g, test.h]).toEqual([2, 1, 3]);
  });
  it('agrees with the published formulas written out: sleep, 20 % (methods 3.1; rtol 1e-5)', () => {
    const test = yuenPaired(drugTwo, drugOne);
    expect([
      close(test.estimate, 1.66667, 1e-5),
      close(test.se, 0.610901, 1e-5),
      close(test.t, 2.72821, 1e-5),
      close(test.p, 0.041368, 1e-4),
    ]).toEqual([true, true, true, true]);
    expect(test.df).toBe(5);
  });
  it('theory: at 0 % it is the paired t test (rtol 1e-11)', () => {
    expect(close(yuenPaired(drugOne, drugTwo, { trim: 0 }).p, pairedT(drugOne, drugTwo).p as number, 1e-11)).toBe(true);
  });
  it('invariance: exchange of the conditions turns the sign', () => {
    const test = yuenPaired(drugOne, drugTwo);
    expect(close(yuenPaired(drugTwo, drugOne).t, -(test.t as number), 1e-13)).toBe(true);
  });
  it('degenerate: a constant shift, too few pairs', () => {
    const moved = drugOne.map((x) => x + 1);
    expect(yuenPaired(drugOne, moved).reason).toBe('the winsorized differences are all equal');
    expect(yuenPaired(scores(1, 2, 3), scores(3, 1, 2), { trim: 40 }).reason).toBe('1 of 3 pairs left after trimming');
  });
  it('refuses unequal lengths and odd trims', () => {
    expect(() => yuenPaired(drugOne, scores(1))).toThrow('*y* must be as long');
    expect(() => yuenPaired(drugOne, drugTwo, { trim: 50 })).toThrow('*trim* must be');
  });
});
