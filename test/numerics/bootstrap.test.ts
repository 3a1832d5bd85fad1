import { describe, expect, it } from 'vitest';
import { type BootstrapStatistic, bootstrapOneSample, bootstrapTwoGroups } from '../../src/numerics/bootstrap.ts';
import { fillNormal } from '../../src/numerics/draws.ts';
import { exactBootstrap } from '../../src/numerics/exact-bootstrap.ts';
import { mean } from '../../src/numerics/moments.ts';
import { medianSorted } from '../../src/numerics/order.ts';
import { rng } from '../../src/numerics/rng.ts';
import { trimmedMeanSorted } from '../../src/numerics/trimmed-mean.ts';
import { close, darwin, drugOne, drugTwo, scores, soybean, sunflower } from './samples.ts';

const change = drugTwo.map((hours, i) => hours - (drugOne[i] as number));
const statistics: BootstrapStatistic[] = ['mean', 'trimmed-mean', 'winsorized-mean', 'median', 'one-step-m', 'mom'];

describe('bootstrap', () => {
  it('agrees with exact enumeration of all 10^10 resamples: SD within 3.5 SE (seed 1, B 20,000)', () => {
    for (const [name, value] of [
      ['mean', (s: Float64Array) => trimmedMeanSorted(s, 0)],
      ['trimmed-mean', (s: Float64Array) => trimmedMeanSorted(s, 2)],
      ['median', medianSorted],
    ] as const) {
      const exact = exactBootstrap(change, value);
      const drawn = bootstrapOneSample(change, name, { seed: 1, B: 20_000 });
      // SE of an SD from B draws, kurtosis up to 6 allowed: sd sqrt(5 / (4 B))
      const tolerance = 3.5 * (exact.se as number) * Math.sqrt(5 / 80_000);
      expect(Math.abs((drawn.se as number) - (exact.se as number))).toBeLessThan(tolerance);
      expect(Math.abs((drawn.interval?.[0] as number) - (exact.interval?.[0] as number))).toBeLessThan(0.06);
    }
  });
  it('by hand: estimates are those of the scores', () => {
    expect(close(bootstrapOneSample(change, 'trimmed-mean', { seed: 1, B: 99 }).estimate, 4 / 3, 1e-13)).toBe(true);
    expect(
      close(
        bootstrapTwoGroups(sunflower, soybean, 'mean', { seed: 1, B: 99 }).estimate,
        mean(sunflower) - mean(soybean),
        1e-13,
      ),
    ).toBe(true);
  });
  it('theory: the SD of bootstrap means is sqrt((n-1)/n) s / sqrt n, for two groups their root sum (within 3.5 SE, seed 2)', () => {
    const part = (x: Float64Array) => x.reduce((all, v) => all + (v - mean(x)) ** 2, 0) / x.length ** 2;
    const want = Math.sqrt(part(sunflower) + part(soybean));
    const { se } = bootstrapTwoGroups(sunflower, soybean, 'mean', { seed: 2, B: 20_000 });
    expect(Math.abs((se as number) - want)).toBeLessThan((3.5 * want) / Math.sqrt(2 * 20_000));
  });
  it('theory: p <= alpha exactly when the null lies outside the percentile limits', () => {
    for (const mu of [0.5, 0.9, 1, 1.4, 2, 2.4, 2.6, 3]) {
      const { p, interval } = bootstrapOneSample(change, 'mean', { seed: 3, B: 999, mu });
      const [low, high] = interval as [number, number];
      expect(mu < low - 1e-12 || mu > high + 1e-12).toBe((p as number) <= 0.05);
    }
  });
  it('theory: coverage of three intervals, 20 % trimmed mean, 20 normal scores (methods 3.2, within 3.5 SE, seed 10)', () => {
    // Published: 4,000 samples, SE .0038; ours: 400 samples, SE sqrt(.056 * .944 / 400) = .0115
    const published = { percentile: 0.938, 't-equal-tailed': 0.944, 't-symmetric': 0.944 };
    const random = rng(10);
    const x = new Float64Array(20);
    const covered = { percentile: 0, 't-equal-tailed': 0, 't-symmetric': 0 };
    const methods = Object.keys(published) as (keyof typeof published)[];
    for (let run = 0; run < 400; run++) {
      fillNormal(x, random);
      for (const method of methods) {
        const { interval } = bootstrapOneSample(x, 'trimmed-mean', { seed: run, B: 599, method });
        const [low, high] = interval as [number, number];
        if (low <= 0 && 0 <= high) covered[method]++;
      }
    }
    for (const method of methods) {
      expect(Math.abs(covered[method] / 400 - published[method])).toBeLessThan(3.5 * Math.hypot(0.0115, 0.0038));
    }
  });
  it('invariance: offset moves estimate and limits, the seed fixes everything', () => {
    for (const name of statistics) {
      const plain = bootstrapOneSample(darwin, name, { seed: 9, B: 299 });
      const far = bootstrapOneSample(
        darwin.map((x) => x + 1024),
        name,
        { seed: 9, B: 299, mu: 1024 },
      );
      expect(bootstrapOneSample(darwin, name, { seed: 9, B: 299 })).toEqual(plain);
      expect([close(far.se, plain.se as number, 1e-10), far.p]).toEqual([true, plain.p]);
      expect(close(far.interval?.[0], (plain.interval?.[0] as number) + 1024, 1e-12)).toBe(true);
      const reversed = bootstrapOneSample(darwin.toReversed(), name, { seed: 9, B: 299 });
      expect(reversed).toEqual(plain);
    }
  });
  it('invariance: turning the sign of both groups turns estimate and limits (BCa, seed 4, B 999, within 15 %)', () => {
    const one = bootstrapTwoGroups(sunflower, soybean, 'trimmed-mean', { seed: 4, B: 4999, method: 'bca' });
    const turned = bootstrapTwoGroups(soybean, sunflower, 'trimmed-mean', { seed: 4, B: 4999, method: 'bca' });
    expect(close(turned.estimate, -one.estimate, 1e-12)).toBe(true);
    expect(close(turned.interval?.[0], -(one.interval?.[1] as number), 0.15)).toBe(true);
  });
  it('degenerate: no spread, one score, statistics without a standard error or a jackknife', () => {
    expect(bootstrapOneSample(scores(2, 2, 2), 'mean', { seed: 1, B: 99 })).toMatchObject({
      estimate: 2,
      p: null,
      reason: 'all resamples give the same value',
    });
    expect(bootstrapOneSample(scores(2), 'mean', { seed: 1 }).reason).toBe('a condition has only one score');
    expect(bootstrapTwoGroups(scores(2), darwin, 'median', { seed: 1 }).reason).toBe('a condition has only one score');
    expect(bootstrapOneSample(scores(2, 2, 2), 'mean', { seed: 1, B: 99, method: 't-symmetric' }).reason).toBe(
      'the scores have no spread left',
    );
    expect(bootstrapOneSample(darwin, 'mom', { seed: 1, method: 't-symmetric' }).reason).toBe(
      'the bootstrap-t needs a standard error of the estimate',
    );
    expect(bootstrapOneSample(darwin, 'median', { seed: 1, method: 'bca' }).reason).toBe(
      'the BCa interval does not exist for a median',
    );
    expect(
      bootstrapOneSample(scores(1, 2, 3), 'trimmed-mean', { seed: 1, trim: 40, method: 't-symmetric' }).reason,
    ).toBe('the bootstrap-t needs a standard error of the estimate');
  });
  it('refuses empty groups, NaN, seeds that are not words', () => {
    expect(() => bootstrapOneSample(scores(), 'mean', { seed: 1 })).toThrow(RangeError);
    expect(() => bootstrapTwoGroups(darwin, scores(Number.NaN), 'mean', { seed: 1 })).toThrow('*y* must hold finite');
    expect(() => bootstrapOneSample(darwin, 'mean', { seed: 0.5 })).toThrow('*seed* must be');
  });
});
