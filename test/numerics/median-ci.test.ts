import { describe, expect, it } from 'vitest';
import { medianInterval } from '../../src/numerics/median-ci.ts';
import { close, darwin, scores } from './samples.ts';

describe('median interval', () => {
  it('by hand: the range of six scores covers 1 - 2 / 64', () => {
    const own = medianInterval(scores(6, 1, 5, 2, 4, 3));
    expect([own.estimate, own.interval, own.ranks]).toEqual([3.5, [1, 6], [1, 6]]);
    expect(close(own.coverage, 62 / 64, 1e-13)).toBe(true);
  });
  it('agrees with R 4.2 qbinom and pbinom: Darwin, ranks 4 and 12', () => {
    const own = medianInterval(darwin);
    expect([own.interval, own.ranks]).toEqual([
      [8, 49],
      [4, 12],
    ]);
    expect(close(own.coverage, 0.96484375, 1e-13)).toBe(true);
  });
  it('by hand: the interpolated interval of Darwin lies between ranks 4 and 5', () => {
    // Coverage .96484375 at k = 4, .88153076 at k = 5; I = .17817..., lambda = 11 I / (4 + 7 I)
    const share = (0.96484375 - 0.95) / (0.96484375 - 0.88153076171875);
    const weight = (11 * share) / (4 + 7 * share);
    const own = medianInterval(darwin, { variant: 'interpolated' });
    expect(close(own.interval?.[0], weight * 14 + (1 - weight) * 8, 1e-10)).toBe(true);
    expect(close(own.interval?.[1], weight * 41 + (1 - weight) * 49, 1e-10)).toBe(true);
  });
  it('theory: one-sided at level 1 - a is one end of the two-sided at 1 - 2a; coverage never below the level', () => {
    expect(medianInterval(darwin, { alternative: 'greater' }).interval).toEqual([
      medianInterval(darwin, { level: 0.9 }).interval?.[0],
      null,
    ]);
    expect(medianInterval(darwin, { alternative: 'less' }).interval?.[0]).toBe(null);
    for (const level of [0.5, 0.8, 0.9, 0.95, 0.99])
      expect((medianInterval(darwin, { level }).coverage as number) >= level).toBe(true);
  });
  it('invariance: increasing transformations carry the limits along', () => {
    const own = medianInterval(darwin.map((x) => x ** 3)).interval;
    expect(own).toEqual([8 ** 3, 49 ** 3]);
  });
  it('degenerate: too few scores for the level', () => {
    expect(medianInterval(scores(1, 2, 3, 4, 5))).toMatchObject({
      estimate: 3,
      interval: null,
      reason: 'too few scores for this level',
    });
    expect(medianInterval(scores(4)).interval).toBe(null);
  });
  it('refuses no scores and levels outside 0 to 1', () => {
    expect(() => medianInterval(scores())).toThrow(RangeError);
    expect(() => medianInterval(darwin, { level: 1 })).toThrow('*level* must be');
  });
});
