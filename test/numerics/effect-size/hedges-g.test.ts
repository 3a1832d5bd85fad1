import { describe, expect, it } from 'vitest';
import { cohensD } from '../../../src/numerics/effect-size/cohens-d.ts';
import { hedgesG, smallSampleApproximation, smallSampleFactor } from '../../../src/numerics/effect-size/hedges-g.ts';
import { close, scores, soybean, sunflower } from '../samples.ts';

describe("Hedges' g", () => {
  it('by hand: J at 2 df is 1 / sqrt(pi), at 3 df sqrt(pi / 6)', () => {
    expect(close(smallSampleFactor(2), 1 / Math.sqrt(Math.PI), 1e-13)).toBe(true);
    expect(close(smallSampleFactor(3), Math.sqrt(Math.PI / 6), 1e-13)).toBe(true);
    expect(smallSampleApproximation(4)).toBe(0.8);
  });
  it('agrees with R 4.2 lgamma: J at 24 df (rtol 1e-13)', () => {
    expect(close(smallSampleFactor(24), 0.96836523344771774, 1e-13)).toBe(true);
  });
  it('theory: both branches meet at 40 df; J(df) J(df + 1) = sqrt(df / (df + 1)) (df - 1) / df', () => {
    // gamma(a + 1) = a gamma(a), written for half-integer steps
    for (const df of [5, 38, 39, 40, 41, 100, 1e4, 1e6]) {
      const want = (Math.sqrt(df / (df + 1)) * (df - 1)) / df;
      expect(close(smallSampleFactor(df) * smallSampleFactor(df + 1), want, 1e-13)).toBe(true);
    }
    expect(Math.abs(smallSampleFactor(50) - smallSampleApproximation(50))).toBeLessThan(1e-4);
  });
  it('theory: g and its limits are J times those of d', () => {
    const d = cohensD(sunflower, soybean);
    const g = hedgesG(sunflower, soybean);
    const factor = g.factor as number;
    expect(
      close(g.value, factor * (d.value as number), 1e-14) &&
        close(g.interval?.[0], factor * (d.interval?.[0] as number), 1e-14),
    ).toBe(true);
    expect(close(g.approximate, (1 - 3 / 95) * (d.value as number), 1e-14)).toBe(true);
  });
  it('invariance: unit', () => {
    const own = hedgesG(sunflower, soybean);
    expect(
      close(
        hedgesG(
          sunflower.map((x) => 8 * x),
          soybean.map((x) => 8 * x),
        ).value,
        own.value as number,
        1e-13,
      ),
    ).toBe(true);
  });
  it('degenerate: no spread', () => {
    expect(hedgesG(scores(1, 1), scores(1, 1))).toMatchObject({ value: null, factor: null, approximate: null });
  });
  it('refuses one degree of freedom', () => {
    for (const df of [1, 0, Number.NaN]) {
      expect(() => smallSampleFactor(df)).toThrow('*df* must be above 1');
      expect(() => smallSampleApproximation(df)).toThrow('*df* must be above 1');
    }
  });
});
