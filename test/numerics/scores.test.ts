import { describe, expect, it } from 'vitest';
import { differences, requirePairs, requireScores, trimCount } from '../../src/numerics/scores.ts';
import { scores } from './samples.ts';

describe('scores', () => {
  it('by hand: the trim count is a floor of whole percentages', () => {
    // .29 * 100 falls below 29 in floating point; integers do not.
    expect([trimCount(100, 29), trimCount(10, 20), trimCount(9, 20), trimCount(9, 0), trimCount(4, 49)]).toEqual([
      29, 2, 1, 0, 1,
    ]);
  });
  it('by hand: differences are first minus second and leave the scores alone', () => {
    const x = scores(3, 5);
    expect([...differences(x, scores(1, 9))]).toEqual([2, -4]);
    expect([...x]).toEqual([3, 5]);
  });
  it('theory: trimming never leaves fewer than one score', () => {
    for (let n = 1; n <= 200; n++)
      for (const trim of [0, 10, 25, 49]) expect(n - 2 * trimCount(n, trim)).toBeGreaterThan(0);
  });
  it('degenerate: no scores are allowed where none are asked for', () => {
    expect(() => requireScores(scores(), 0)).not.toThrow();
  });
  it('refuses NaN, infinite and huge scores, too few, odd trims, unequal lengths', () => {
    expect(() => requireScores(scores(1, Number.NaN))).toThrow('*x* must hold finite numbers');
    expect(() => requireScores(scores(Infinity), 1, 'y')).toThrow('*y* must hold finite numbers');
    expect(() => requireScores(scores(1e151))).toThrow(RangeError);
    expect(() => requireScores(scores(), 1)).toThrow('at least 1 score; got 0');
    for (const trim of [-1, 50, 12.5, Number.NaN]) expect(() => trimCount(10, trim)).toThrow('*trim* must be');
    expect(() => requirePairs(scores(1), scores(1, 2))).toThrow('*y* must be as long');
  });
});
