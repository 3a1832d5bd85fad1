import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import type { Samples } from '../../src/analysis/samples.ts';
import { args, row, sleepSamples } from '../support/samples.ts';

describe('rows within participants', () => {
  const findings = compareSamples(args(sleepSamples));

  it('agrees with methods 3.1, sleep: paired t(9) = 4.06213, p = .002833', () => {
    const found = row(findings, 'paired-t');
    expect(found.statistic?.value).toBeCloseTo(4.06213, 5);
    expect(found.p).toBeCloseTo(0.002833, 6);
    expect(found.df).toBe(9);
  });

  it('agrees with methods 3.1, sleep: trimmed differences 1.33333, SE .176033, t(5) = 7.57433, p = .000636', () => {
    const found = row(findings, 'trimmed-differences');
    expect(found.estimate).toBeCloseTo(1.33333, 5);
    expect(found.se).toBeCloseTo(0.176033, 6);
    expect(found.statistic?.value).toBeCloseTo(7.57433, 5);
    expect(found.p).toBeCloseTo(0.000636, 6);
  });

  it('agrees with methods 3.1, sleep: marginal trimmed means 1.66667, SE .610901, t(5) = 2.72821, p = .041368', () => {
    const found = row(findings, 'marginal-trimmed');
    expect(found.estimate).toBeCloseTo(1.66667, 5);
    expect(found.se).toBeCloseTo(0.610901, 6);
    expect(found.p).toBeCloseTo(0.041368, 6);
  });

  it('theory: at trim 0 all closed-form mean rows are the paired t', () => {
    const zero = compareSamples(args(sleepSamples, { trim: 0 }));
    for (const id of ['trimmed-differences', 'marginal-trimmed', 'winsorized-differences']) {
      expect(row(zero, id).estimate).toBeCloseTo(row(zero, 'paired-t').estimate as number, 12);
      expect(row(zero, id).p).toBeCloseTo(row(zero, 'paired-t').p as number, 10);
    }
  });

  it('invariance: turning the pair round turns estimates and limits and keeps p', () => {
    const swapped: Samples = { ...sleepSamples, first: 'drug1', second: 'drug2', x: sleepSamples.y, y: sleepSamples.x };
    const turned = compareSamples(args(swapped));
    for (const found of findings.filter((each) => each.sameUnit && each.interval !== null)) {
      const other = row(turned, found.estimator);
      // The bootstrap-t draws other resamples of the turned differences: its limits move by their Monte Carlo error.
      const places = found.estimator === 'trimmed-differences-boot-t' ? 1 : 10;
      expect(other.estimate).toBeCloseTo(-(found.estimate as number), 10);
      expect(other.interval?.[0]).toBeCloseTo(-(found.interval?.[1] as number), places);
      expect(other.p).toBeCloseTo(found.p as number, places);
    }
  });

  it('invariance: a shift of both conditions changes nothing, a change of unit scales estimate, SE and limits', () => {
    const moved = compareSamples(
      args({ ...sleepSamples, x: sleepSamples.x.map((v) => 60 * v + 3), y: sleepSamples.y.map((v) => 60 * v + 3) }),
    );
    for (const found of findings.filter((each) => each.sameUnit && each.interval !== null)) {
      const other = row(moved, found.estimator);
      expect(other.estimate).toBeCloseTo(60 * (found.estimate as number), 8);
      expect(other.interval?.[0]).toBeCloseTo(60 * (found.interval?.[0] as number), 8);
      expect(other.p).toBeCloseTo(found.p as number, 8);
    }
  });

  it('theory: same seed, same digits; another seed moves only the bootstrap', () => {
    expect(compareSamples(args(sleepSamples))).toEqual(findings);
    const other = compareSamples(args(sleepSamples, { seed: 8 }));
    expect(row(other, 'paired-t').interval).toEqual(row(findings, 'paired-t').interval);
    expect(row(other, 'paired-t').effects[0]?.interval).not.toEqual(row(findings, 'paired-t').effects[0]?.interval);
  });

  it('theory: a one-sided interval has one limit, on the side of the alternative', () => {
    const greater = row(compareSamples(args(sleepSamples, { alternative: 'greater' })), 'trimmed-differences');
    expect(greater.interval?.[1]).toBeNull();
    expect(greater.p).toBeCloseTo((row(findings, 'trimmed-differences').p as number) / 2, 12);
  });

  it('by hand: paired effect sizes of sleep, d_z = mean / SD of the differences = 1.2846 (sleep/001 of the cases)', () => {
    const [average, dz] = row(findings, 'paired-t').effects;
    expect(dz?.value).toBeCloseTo(1.58 / 1.2299954832798732, 10);
    expect(average?.interval?.[0]).toBeLessThan(average?.value as number);
    expect(average?.interval?.[1]).toBeGreaterThan(average?.value as number);
  });
});
