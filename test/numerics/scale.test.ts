import { describe, expect, it } from 'vitest';
import { biweightMidvariance, percentageBendMidvariance, qnScale, snScale } from '../../src/numerics/scale.ts';
import { normalQuantile } from '../../src/numerics/tails/normal.ts';
import { close, darwin, scores, uneven } from './samples.ts';

/** Order statistic k (from 1) of a list. */
const kth = (list: number[], k: number): number => list.toSorted((a, b) => a - b)[k - 1] as number;

describe('robust scales', () => {
  it('by hand: Sn and Qn of 1, 2, 4, 8', () => {
    // High medians (3rd of 4 distances, own 0 counted): 3, 2, 3, 6; their low median (2nd) is 3.
    expect(snScale(scores(1, 2, 4, 8), false)).toEqual({ value: 1.1926 * 3, raw: 3 });
    // Distances 1 2 3 4 6 7, k = C(3, 2) = 3.
    expect(qnScale(scores(1, 2, 4, 8), false)).toEqual({ value: 2.21914 * 3, raw: 3 });
    expect(close(snScale(scores(1, 2, 4, 8)).value, 1.1926 * 3 * 0.954, 1e-13)).toBe(true);
    expect(close(qnScale(scores(1, 2, 4, 8)).value, 2.21914 * 3 * 0.51321, 1e-13)).toBe(true);
  });
  it('agrees with the definitions written out over all pairs (exactly)', () => {
    for (const n of [2, 3, 7, 8, 15, 40, 41]) {
      const x = [...uneven(n)];
      const high = x.map((a) =>
        kth(
          x.map((b) => Math.abs(a - b)),
          Math.floor(n / 2) + 1,
        ),
      );
      expect(snScale(Float64Array.from(x)).raw).toBe(kth(high, Math.floor((n + 1) / 2)));
      const distances = x.flatMap((a, i) => x.slice(i + 1).map((b) => Math.abs(a - b)));
      const half = Math.floor(n / 2) + 1;
      expect(qnScale(Float64Array.from(x)).raw).toBe(kth(distances, (half * (half - 1)) / 2));
    }
  });
  it('by hand: percentage bend midvariance of 0, 1, 2, 3, 10 with beta .2: omega is the 4th of 0 1 1 2 8', () => {
    // y = -1 -.5 0 .5 1 (clipped), three inside: 5 * 4 * 2.5 / 9
    const own = percentageBendMidvariance(scores(0, 1, 2, 3, 10), 0.2);
    expect([own.omega, close(own.variance, 50 / 9, 1e-13)]).toEqual([2, true]);
  });
  it('by hand: biweight midvariance of 1, 2, 3 with c = 2: u = -.5, 0, .5', () => {
    // n cut^2 sum u^2 (1-u^2)^4 / (sum (1-u^2)(1-5u^2))^2, cut 2
    const top = 2 * 0.25 * 0.75 ** 4;
    const bottom = 2 * 0.75 * (1 - 1.25) + 1;
    expect(close(biweightMidvariance(scores(1, 2, 3), 2).variance, (3 * 4 * top) / bottom ** 2, 1e-13)).toBe(true);
  });
  it('theory: all estimate the SD of normal quantiles (n 999, within 4 %)', () => {
    const x = Float64Array.from({ length: 999 }, (_, i) => normalQuantile((i + 1) / 1000));
    for (const sd of [snScale(x).value, qnScale(x).value, Math.sqrt(biweightMidvariance(x).variance as number)]) {
      expect(Math.abs(sd - 1)).toBeLessThan(0.04);
    }
  });
  it('invariance: offset, sign and unit', () => {
    const moved = darwin.map((x) => -4 * x + 64);
    expect(snScale(moved).raw).toBe(4 * snScale(darwin).raw);
    expect(qnScale(moved).raw).toBe(4 * qnScale(darwin).raw);
    for (const of of [percentageBendMidvariance, biweightMidvariance]) {
      expect(close(of(moved).variance, 16 * (of(darwin).variance as number), 1e-12)).toBe(true);
    }
  });
  it('degenerate: identical scores', () => {
    expect([snScale(scores(2, 2, 2)).value, qnScale(scores(2, 2, 2)).value]).toEqual([0, 0]);
    expect(percentageBendMidvariance(scores(2, 2, 2))).toEqual({
      variance: null,
      omega: 0,
      reason: 'most scores are identical',
    });
    expect(percentageBendMidvariance(scores(0, 1))).toMatchObject({
      variance: null,
      reason: 'no score lies within the bend',
    });
    expect(biweightMidvariance(scores(2, 2, 2, 9)).reason).toBe(
      'the MAD is 0: more than half the scores are identical',
    );
  });
  it('refuses too few scores and odd settings', () => {
    expect(() => snScale(scores(1))).toThrow(RangeError);
    expect(() => qnScale(scores(1))).toThrow(RangeError);
    expect(() => percentageBendMidvariance(darwin, 0.6)).toThrow('*beta* must be');
    expect(() => biweightMidvariance(darwin, 0)).toThrow('*c* must be');
  });
});
