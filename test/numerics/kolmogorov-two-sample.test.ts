import { describe, expect, it } from 'vitest';
import { kolmogorovTwoSample } from '../../src/numerics/kolmogorov-two-sample.ts';
import { close, five, scores, six, soybean, sunflower } from './samples.ts';

describe('two-sample Kolmogorov-Smirnov', () => {
  it('by hand: two against two apart: D = 1 in 2 of 6 orders', () => {
    const own = kolmogorovTwoSample(scores(1, 2), scores(3, 4));
    expect([own.D, own.ties, close(own.p, 1 / 3, 1e-13)]).toEqual([1, false, true]);
  });
  it('agrees with SciPy 1.10 ks_2samp(exact) (rtol 1e-11)', () => {
    const own = kolmogorovTwoSample(six, five);
    expect(close(own.D, 0.4666666666666667, 1e-14) && close(own.p, 0.474025974025974, 1e-11)).toBe(true);
    const chicks = kolmogorovTwoSample(sunflower, soybean);
    expect(close(chicks.D, 0.7023809523809523, 1e-14) && close(chicks.p, 0.0013647141658987133, 1e-11)).toBe(true);
  });
  it('theory: large groups take the limit, close to the exact p (within 10 %)', () => {
    const x = Float64Array.from({ length: 4000 }, (_, i) => i);
    const own = kolmogorovTwoSample(
      x,
      x.map((v) => v * 1.05 + 0.5),
    );
    expect(own.method).toBe('limit');
    const half = kolmogorovTwoSample(
      x.subarray(0, 3000),
      x.subarray(0, 3000).map((v) => v * 1.05 + 0.5),
    );
    expect(half.method).toBe('exact');
    expect(half.p > own.p && own.p > 0).toBe(true);
  });
  it('invariance: increasing transformations and exchange', () => {
    const own = kolmogorovTwoSample(six, five);
    const turned = kolmogorovTwoSample(five.map(Math.exp), six.map(Math.exp));
    expect([turned.D, close(turned.p, own.p, 1e-14)]).toEqual([own.D, true]);
  });
  it('degenerate: identical groups', () => {
    expect(kolmogorovTwoSample(scores(1, 2), scores(1, 2))).toEqual({ D: 0, p: 1, method: 'exact', ties: true });
    expect(kolmogorovTwoSample(scores(1), scores(2)).p).toBe(1);
  });
  it('refuses an empty group', () => {
    expect(() => kolmogorovTwoSample(scores(), five)).toThrow(RangeError);
  });
});
