import { describe, expect, it } from 'vitest';
import { type ComparisonSpec, compareSamples } from '../../src/analysis/compare.ts';
import { contrastWeights } from '../../src/analysis/rows-contrast.ts';
import { samplesFor } from '../../src/analysis/samples.ts';
import { casesOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { args, row } from '../support/samples.ts';

const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
const effect = { type: 'contrast', factor: 'group', first: ['ctrl'], second: ['trt1', 'trt2'] } as const;
const sides: Pick<ComparisonSpec, 'factor' | 'effect' | 'first' | 'second'> = {
  factor: 'group',
  effect,
  first: 'ctrl',
  second: 'the mean of trt1 and trt2',
};
const samples = samplesFor(plants, sides);
const findings = compareSamples(args(samples));

describe('rows of a planned contrast', () => {
  it('agrees with the reference cases linear_contrast of plant_growth, weights 1, -.5, -.5, 9 digits', () => {
    for (const [id, variance, trim] of [
      ['contrast-pooled', 'pooled', 0],
      ['contrast-welch', 'welch', 0],
      ['contrast-trimmed', 'welch', 0.2],
    ] as const) {
      const own =
        casesOf('plant_growth', 'linear_contrast', { weights: [1, -0.5, -0.5], trim, variance })[0]?.expect ?? {};
      const found = row(findings, id);
      expect(found.estimate).toBeCloseTo(own.estimate as number, 10);
      expect(found.se).toBeCloseTo(own.se as number, 10);
      expect(found.df).toBeCloseTo(own.df as number, 8);
      expect(found.p).toBeCloseTo(own.p as number, 10);
      expect(found.interval?.[0]).toBeCloseTo((own.ci as number[])[0] as number, 9);
    }
  });

  it('by hand: a side weighs its groups alike, and the row says the weights', () => {
    expect(contrastWeights(samples.parts ?? [])).toEqual([1, -0.5, -0.5]);
    expect(row(findings, 'contrast-welch').method).toMatch(/ctrl 1, trt1 \u22120\.5, trt2 \u22120\.5/);
    expect(row(findings, 'contrast-pooled').counts).toEqual([
      { condition: 'ctrl', n: 10, h: 10 },
      { condition: 'the mean of trt1 and trt2', n: 20, h: 20 },
    ]);
  });

  it('invariance: exchanging the sides turns every estimate and limit, 10 digits', () => {
    const turned = { ...sides, effect: { ...effect, first: effect.second, second: effect.first } };
    for (const other of compareSamples(args(samplesFor(plants, turned)))) {
      const own = row(findings, other.estimator);
      expect(other.estimate).toBeCloseTo(-(own.estimate as number), 10);
      expect(other.interval?.[0]).toBeCloseTo(-(own.interval?.[1] as number), 10);
      expect(other.p).toBeCloseTo(own.p as number, 10);
    }
  });

  it('theory: with one group a side the contrast is the comparison of two groups', () => {
    const pair = { ...sides, effect: { ...effect, second: ['trt2'] } };
    const contrast = compareSamples(args(samplesFor(plants, pair)));
    const two = compareSamples(args(samplesFor(plants, { factor: 'group', first: 'ctrl', second: 'trt2' })));
    for (const [one, other] of [
      ['contrast-welch', 'welch'],
      ['contrast-trimmed', 'yuen-welch'],
      ['contrast-pooled', 'student'],
    ] as const) {
      expect(row(contrast, one).p).toBeCloseTo(row(two, other).p as number, 10);
    }
  });

  it('theory: each row has an effect size with an interval around it', () => {
    for (const found of findings) {
      const [effectSize] = found.effects;
      expect(effectSize?.interval?.[0]).toBeLessThan(effectSize?.value as number);
      expect(effectSize?.interval?.[1]).toBeGreaterThan(effectSize?.value as number);
    }
  });

  it('degenerate: groups that do not vary give no t and no effect size', () => {
    const flat = {
      ...samples,
      parts: (samples.parts ?? []).map((part) => ({ ...part, scores: part.scores.map(() => 3) })),
    };
    for (const found of compareSamples(args(flat))) {
      expect([found.p, found.interval, found.effects[0]?.value]).toEqual([null, null, null]);
    }
  });

  it('refuses p where a group keeps fewer than four scores', () => {
    const few = {
      ...samples,
      parts: (samples.parts ?? []).map((part) => ({ ...part, scores: part.scores.slice(0, 3) })),
    };
    expect(row(compareSamples(args(few)), 'contrast-welch').p).toBeNull();
    expect(row(compareSamples(args(few)), 'contrast-welch').cautions).toContain('R22');
  });
});
