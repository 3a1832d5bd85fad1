import { describe, expect, it } from 'vitest';
import { compareSamples } from '../../src/analysis/compare.ts';
import { samplesFor } from '../../src/analysis/samples.ts';
import { oneSampleT } from '../../src/numerics/one-sample-t.ts';
import { trimmedMeanTest } from '../../src/numerics/trimmed-mean.ts';
import { expectedOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { args, row } from '../support/samples.ts';

const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
const sidesAt = (value: number) => ({
  factor: '',
  effect: { type: 'value', value } as const,
  first: 'every score',
  second: String(value),
});
const samples = samplesFor(plants, sidesAt(5));
const findings = compareSamples(args(samples));

describe('rows against a value', () => {
  it('agrees with the reference case one_sample_t of rivers, 10 digits: the estimate is the distance from the value', () => {
    const own = expectedOf('rivers', 'one_sample_t', { mu: 500 });
    const rivers = scoresOf('rivers', { outcome: 'length' });
    const found = row(compareSamples(args(samplesFor(rivers, sidesAt(500)))), 'one-sample-t');
    expect(found.statistic?.value).toBeCloseTo(own.t as number, 9);
    expect(found.p).toBeCloseTo(own.p as number, 10);
    expect(found.estimate).toBeCloseTo((own.mean as number) - 500, 9);
    expect(found.se).toBeCloseTo(own.se as number, 9);
  });

  it('theory: mean and trimmed mean are the tests of the scores against the value, 10 digits', () => {
    const t = oneSampleT(samples.x, { mu: 5 });
    expect(row(findings, 'one-sample-t').p).toBeCloseTo(t.p as number, 10);
    expect(row(findings, 'one-sample-t').interval?.[1]).toBeCloseTo((t.interval?.[1] as number) - 5, 10);
    const trimmed = trimmedMeanTest(samples.x, { mu: 5, trim: 20 });
    expect(row(findings, 'trimmed-mean').p).toBeCloseTo(trimmed.p as number, 10);
    expect(row(findings, 'one-sample-t').effects[0]?.value).toBeCloseTo((t.t as number) / Math.sqrt(30), 10);
  });

  it('by hand: everyone counts once, and nobody stands under the value', () => {
    expect(findings[0]).toMatchObject({ n: 30, counts: [{ condition: 'every score', n: 30, h: 30 }] });
    // plant_growth: 17 of 30 weights are above 5.
    expect(row(findings, 'share-beyond').estimate).toBeCloseTo(17 / 30, 10);
  });

  it('invariance: a shift of scores and value changes no row but rounding, 8 digits', () => {
    const moved = { ...plants, values: plants.values.map((value) => value + 4) };
    compareSamples(args(samplesFor(moved, sidesAt(9)))).forEach((other, i) => {
      expect(other.estimate).toBeCloseTo(findings[i]?.estimate as number, 8);
      expect(other.p).toBeCloseTo(findings[i]?.p as number, 8);
    });
  });

  it('degenerate: scores equal to the value give no test, with a reason', () => {
    const flat = { ...samples, x: samples.x.map(() => 5) };
    for (const found of compareSamples(args(flat))) {
      expect(found.p === null || found.p === 1).toBe(true);
    }
    const nobody = { ...samples, x: new Float64Array(0), y: new Float64Array(0) };
    expect(compareSamples(args(nobody))[0]?.reason).toBe('nobody has a score');
  });

  it('refuses to compare with a value that is not given', () => {
    expect(() => samplesFor(plants, { ...sidesAt(5), effect: { type: 'value', value: null } })).toThrow(/which value/);
  });
});
