import { describe, expect, it } from 'vitest';
import type { ComparisonSpec } from '../../src/analysis/compare.ts';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { applyRules } from '../../src/analysis/exclusion.ts';
import { labelsOf, pipelineNumbers, rerunsOf, runPipeline, withPipeline } from '../../src/analysis/pipeline.ts';
import type { Rule } from '../../src/analysis/rules.ts';
import { type Scores, scoreDesign } from '../../src/analysis/score.ts';
import { rng } from '../../src/numerics/rng.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';
import { row } from '../support/samples.ts';
import { tableOf } from '../support/tables.ts';

const rule: Rule = {
  rule: 'extreme',
  on: 'trial',
  column: 's',
  measure: 'MAD',
  cutoff: 3,
  scope: 'condition',
  sides: 'both',
};
const roles: Roles = {
  participant: 'p',
  within: [],
  between: ['g'],
  outcome: 's',
  unit: '',
  direction: 'lower',
  rows: 'one score',
};
const spec: ComparisonSpec = {
  factor: 'g',
  first: 'a',
  second: 'b',
  estimator: 'welch',
  trim: 20,
  alternative: 'two-sided',
  alpha: 0.05,
  resamples: 199,
  seed: 11,
};

/** Two groups of scores, one score each, after rules. */
function twoGroups(a: readonly number[], b: readonly number[], rules: readonly Rule[]): Scores {
  const table = tableOf({
    p: [...a, ...b].map((_, i) => `p${i}`),
    g: [...a.map(() => 'a'), ...b.map(() => 'b')],
    s: [...a, ...b],
  });
  return scoreDesign(applyRules(declareDesign(table, roles), rules), { statistic: 'mean', trim: 0 });
}

function numbersOf(scores: Scores, comparison = spec, B = comparison.resamples) {
  const run = (purpose: 'relabel' | 'resample') => runPipeline({ scores, comparison, purpose, from: 0, to: B });
  return pipelineNumbers(scores, comparison, run('relabel'), run('resample'));
}

/** Lognormal scores of 20 (normal order of a seeded stream). */
function skewed(seed: number, n = 20): number[] {
  const draw = rng(seed);
  return Array.from(
    { length: n },
    () =>
      Math.round(1000 * Math.exp(Math.sqrt(-2 * Math.log(1 - draw.uniform())) * Math.cos(6.283185 * draw.uniform()))) /
      1000,
  );
}

describe('runPipeline', () => {
  it('agrees with methods 6, PlantGrowth: 1.5 IQR within groups, type 7: p .0028 by relabelling where the textbook gives .0002', () => {
    const fences: Rule = { ...rule, column: 'weight', measure: 'fences', cutoff: 1.5 };
    const plants = scoresOf('plant_growth', { between: ['group'], outcome: 'weight' });
    const scores = scoreDesign(applyRules(plants.design, [fences]), plants.score);
    expect(row(compareAll(scores, everyLevel('group')).findings, 'anova').p).toBeCloseTo(0.0002, 4);
    const comparison = { ...spec, effect: everyLevel('group'), factor: 'group', estimator: 'anova', resamples: 999 };
    const { p } = numbersOf(scores, comparison);
    // Monte Carlo error of .0028 with 999 relabellings is .0017; 3.5 of them.
    expect(p).toBeGreaterThan(0.0009);
    expect(p).toBeLessThan(0.0088);
  });

  it('theory: without a rule the relabelling p of Welch is near the exact permutation p, and the interval near Welch', () => {
    const [a, b] = [
      [12, 15, 11, 18, 14, 16, 13, 19],
      [17, 20, 15, 22, 19, 21, 16, 18],
    ];
    const scores = twoGroups(a, b, []);
    const { p, interval, se } = numbersOf(scores, { ...spec, resamples: 999 });
    // Welch p .0123; Monte Carlo error .0035.
    expect(Math.abs((p as number) - 0.0123)).toBeLessThan(0.0125);
    expect(interval?.[0]).toBeLessThan(-3.75);
    expect(interval?.[1]).toBeGreaterThan(-3.75);
    expect(se).toBeCloseTo(1.2, 0);
  });

  it('theory: equal populations, 3 MAD within groups of 20 skewed scores: relabelling holds its level (methods 5.4)', () => {
    let rejected = 0;
    for (let run = 0; run < 60; run++) {
      const scores = twoGroups(skewed(2 * run + 1), skewed(2 * run + 2), [rule]);
      const comparison = { ...spec, seed: run, resamples: 39 };
      const relabelled = runPipeline({ scores, comparison, purpose: 'relabel', from: 0, to: 39 });
      if ((pipelineNumbers(scores, comparison, relabelled, new Float64Array(0)).p as number) <= 0.1) rejected++;
    }
    // Level .1: 6 of 60 expected, SD 2.3; the textbook test has about .27 here (16 of 60).
    expect(rejected).toBeLessThan(14);
  });

  it('invariance: any cut into parts gives the same numbers', () => {
    const scores = twoGroups(skewed(1), skewed(2), [rule]);
    for (const purpose of ['relabel', 'resample'] as const) {
      const whole = runPipeline({ scores, comparison: spec, purpose, from: 0, to: 20 });
      const parts = [
        [0, 7],
        [7, 8],
        [8, 20],
      ].flatMap(([from = 0, to = 0]) => [...runPipeline({ scores, comparison: spec, purpose, from, to })]);
      expect([...whole]).toEqual(parts);
    }
  });

  it('degenerate: one-sided tests have one limit; a row that cannot be computed is counted against the finding', () => {
    const scores = twoGroups(skewed(1), skewed(2), [rule]);
    const less = numbersOf(scores, { ...spec, alternative: 'less' });
    expect(less.interval?.[0]).toBeNull();
    const relabelled = new Float64Array(19).fill(NaN);
    expect(pipelineNumbers(scores, spec, relabelled, new Float64Array(99).fill(NaN))).toMatchObject({
      p: 1,
      interval: null,
      lost: 118,
    });
  });

  it('refuses a comparison whose labels cannot be exchanged', () => {
    const scores = twoGroups(skewed(1), skewed(2), [rule]);
    const value = { ...spec, effect: { type: 'value', value: 1 } } as const;
    expect(labelsOf(scores.design, value)).toBeNull();
    expect(() => runPipeline({ scores, comparison: value, purpose: 'relabel', from: 0, to: 1 })).toThrow(/labels/);
  });

  it('by hand: which labels change places, and how often', () => {
    const { design } = twoGroups(skewed(1), skewed(2), []);
    expect(labelsOf(design, spec)).toEqual({ factor: 'g', levels: ['a', 'b'] });
    expect(labelsOf(design, { ...spec, effect: everyLevel('g') })?.levels).toEqual(['a', 'b']);
    expect([rerunsOf({ resamples: 999 }), rerunsOf({ resamples: 9999 })]).toEqual([999, 1999]);
  });

  it('by hand: the row says where its numbers come from, and keeps its estimate', () => {
    const [own] = compareAll(
      scoresOf('plant_growth', { between: ['group'], outcome: 'weight' }),
      everyLevel('group'),
    ).findings;
    if (own === undefined) throw new Error('no row');
    const made = withPipeline(
      { ...own, reason: 'withheld' },
      { p: 0.02, se: null, interval: [0.1, 0.5], lost: 3 },
      999,
      0.95,
    );
    expect(made).toMatchObject({ estimate: own.estimate, p: 0.02, interval: [0.1, 0.5], level: 0.95 });
    expect(made.reason).toBeUndefined();
    expect(made.pHow).toMatch(/the rule sees the condition/);
    expect(made.method).toMatch(/3 could not be computed/);
    expect(made.cautions).toContain('R2P');
  });
});
