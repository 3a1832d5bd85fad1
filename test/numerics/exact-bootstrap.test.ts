import { describe, expect, it } from 'vitest';
import { exactBootstrap } from '../../src/numerics/exact-bootstrap.ts';
import { mean } from '../../src/numerics/moments.ts';
import { medianSorted } from '../../src/numerics/order.ts';
import { close, drugOne, scores } from './samples.ts';

const firstFive = drugOne.slice(0, 5);

describe('exact bootstrap', () => {
  it('by hand: two scores have three resamples with chances 1/4, 1/2, 1/4', () => {
    const own = exactBootstrap(scores(0, 2), mean, 0.5);
    expect([own.distinct, close(own.mean, 1, 1e-14), close(own.se, Math.sqrt(0.5), 1e-14)]).toEqual([3, true, true]);
    expect(own.interval).toEqual([0, 1]);
  });
  it('agrees with all 5^5 resamples listed in NumPy: median and mean (rtol 1e-12)', () => {
    const own = exactBootstrap(firstFive, medianSorted);
    expect(close(own.mean, -0.46252799999999994, 1e-12) && close(own.se, 0.5946702020582502, 1e-12)).toBe(true);
    expect(own.interval).toEqual([-1.6, 0.7]);
    expect(close(exactBootstrap(firstFive, mean).se, 0.3681304116749932, 1e-12)).toBe(true);
  });
  it('theory: the mean has SD sqrt(sum of squares) / n and is centred at the sample mean', () => {
    const own = exactBootstrap(drugOne, mean);
    expect(close(own.mean, 0.75, 1e-11) && close(own.se, 0.5367028973277487, 1e-11)).toBe(true);
    expect(own.distinct).toBe(92_378);
  });
  it('invariance: order and sign', () => {
    const own = exactBootstrap(firstFive, medianSorted);
    expect(exactBootstrap(firstFive.toReversed(), medianSorted)).toEqual(own);
    expect(
      close(
        exactBootstrap(
          firstFive.map((x) => -x),
          medianSorted,
        ).se,
        own.se as number,
        1e-12,
      ),
    ).toBe(true);
  });
  it('degenerate: one score; too many resamples', () => {
    expect(exactBootstrap(scores(3), mean)).toEqual({ distinct: 1, mean: 3, se: 0, interval: [3, 3] });
    expect(exactBootstrap(new Float64Array(20), mean)).toMatchObject({
      mean: null,
      reason: 'too many distinct resamples',
    });
  });
  it('refuses no scores and levels outside 0 to 1', () => {
    expect(() => exactBootstrap(scores(), mean)).toThrow(RangeError);
    expect(() => exactBootstrap(firstFive, mean, 1)).toThrow('*level* must be');
  });
});
