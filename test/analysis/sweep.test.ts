import { describe, expect, it } from 'vitest';
import type { ClaimSpec } from '../../src/analysis/claim.ts';
import { type ComparisonSpec, compareSamples, type Result } from '../../src/analysis/compare.ts';
import { declareDesign, type Roles } from '../../src/analysis/design.ts';
import { applyRules } from '../../src/analysis/exclusion.ts';
import type { Finding } from '../../src/analysis/finding.ts';
import type { Rule } from '../../src/analysis/rules.ts';
import { takeSamples } from '../../src/analysis/samples.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { gridRules, sweepClaim, withExtreme } from '../../src/analysis/sweep.ts';
import { withholdsTextbook } from '../../src/analysis/withhold.ts';
import { rng } from '../../src/numerics/rng.ts';
import { tableOf } from '../support/tables.ts';

const claim: ClaimSpec = { first: 'voice', relation: 'lower', second: 'tone', margin: 0, title: '' };
const comparison: ComparisonSpec = {
  factor: 'alert',
  first: 'voice',
  second: 'tone',
  estimator: 'trimmed-differences',
  trim: 20,
  alternative: 'two-sided',
  alpha: 0.05,
  resamples: 199,
  seed: 3,
};
const roles: Roles = {
  participant: 'p',
  within: ['alert'],
  between: [],
  outcome: 'ms',
  unit: 'ms',
  direction: 'lower',
  rows: 'several trials',
};

/** 24 participants x 2 alerts x 12 trials with a long right tail. */
function trials(trialsEach = 12) {
  const draw = rng(5);
  const rows = { p: [] as string[], alert: [] as string[], ms: [] as number[] };
  for (let who = 0; who < 24; who++) {
    for (const alert of ['tone', 'voice']) {
      for (let t = 0; t < trialsEach; t++) {
        rows.p.push(`p${who}`);
        rows.alert.push(alert);
        rows.ms.push(
          Math.round(
            500 +
              20 * who -
              (alert === 'voice' ? 60 : 0) -
              180 * Math.log(1 - draw.uniform()) +
              (draw.below(60) === 0 ? 2500 : 0),
          ),
        );
      }
    }
  }
  return tableOf(rows);
}

function resultOf(rules: readonly Rule[], spec: Partial<ComparisonSpec> = {}, table = trials(), own = roles): Result {
  const design = applyRules(declareDesign(table, own), rules);
  const scores = scoreDesign(design, { statistic: 'mean', trim: 0 });
  const settings = { ...comparison, ...spec };
  const samples = takeSamples(scores, settings.factor, settings.first, settings.second);
  const findings = compareSamples({
    samples,
    comparison: settings,
    unit: 'ms',
    direction: 'lower',
    withheld: withholdsTextbook(rules, own.rows),
  });
  return {
    scores,
    comparison: settings,
    scope: samples.scope,
    findings,
    planned: findings.findIndex((each) => each.estimator === settings.estimator),
    left: [],
  };
}

const extreme = gridRules(declareDesign(trials(), roles))[2] as Rule;

describe('sweepClaim', () => {
  const sweep = sweepClaim(resultOf([]), claim);

  it('by hand: 7 rules x (mean, 3 trims of 3 quantities, Hodges-Lehmann) is at most 77, once each', () => {
    expect(sweep.specifications.length).toBeLessThanOrEqual(77);
    expect(sweep.specifications.length).toBeGreaterThan(40);
    expect(sweep.supported + sweep.undecided + sweep.contradicted + sweep.refused).toBe(sweep.specifications.length);
  });

  it('theory: the planned specification equals the comparison row digit for digit', () => {
    for (const rules of [[], [extreme]]) {
      const result = resultOf(rules);
      const swept = sweepClaim(result, claim);
      expect(swept.specifications[swept.planned]?.finding).toEqual(result.findings[result.planned]);
    }
  });

  it('theory: a planned row that is not in the grid is in all the same', () => {
    const medians = resultOf([], { estimator: 'median-differences' });
    const swept = sweepClaim(medians, claim);
    expect(swept.specifications[swept.planned]?.finding.estimator).toBe('median-differences');
    const odd = resultOf([{ ...extreme, cutoff: 1.7 } as Rule]);
    expect(sweepClaim(odd, claim).specifications.length).toBe(sweep.specifications.length + 1);
  });

  it('theory: exactly one is planned, and those with nobody set aside are marked', () => {
    expect(sweep.specifications.filter((each) => each.planned)).toHaveLength(1);
    expect(sweep.specifications.filter((each) => each.everyoneIn).length).toBeGreaterThanOrEqual(11);
  });

  it('by hand: without a far score the rules keep the same rows and are counted once', () => {
    const rows = { p: [] as string[], alert: [] as string[], ms: [] as number[] };
    for (let who = 0; who < 10; who++) {
      for (const [alert, shift] of [
        ['tone', 0],
        ['voice', -5],
      ] as const) {
        for (const t of [-1, 0, 1]) {
          rows.p.push(`p${who}`);
          rows.alert.push(alert);
          rows.ms.push(100 + who + shift + t);
        }
      }
    }
    const swept = sweepClaim(resultOf([], {}, tableOf(rows)), claim);
    // Nothing is beyond 2 MAD or 2 SD here; 10, 20 and 25 % of 10 trim 1, 2 and 2: mean, 3 x 2 trims, Hodges-Lehmann.
    expect(swept.specifications).toHaveLength(8);
    expect(swept.specifications.every((each) => each.also.length > 0)).toBe(true);
  });

  it('theory: groups hold one quantity each and are sorted by estimate', () => {
    for (const { group, order } of sweep.groups) {
      const members = order.map((index) => sweep.specifications[index]);
      expect(new Set(members.map((each) => each?.finding.group))).toEqual(new Set([group]));
      const estimates = members.map((each) => each?.finding.estimate ?? 0);
      expect(estimates).toEqual([...estimates].sort((a, b) => a - b));
    }
  });

  it('invariance: the same worksheet, the same sweep', () => {
    expect(sweepClaim(resultOf([]), claim)).toEqual(sweep);
  });

  it('by hand: a rule of the grid stands where the extremity rule stood, faults and limits stay', () => {
    const named: Rule = { rule: 'named', participants: ['p1'], reason: 'r' };
    const share: Rule = { rule: 'kept-share', least: 70 };
    const grid = gridRules(declareDesign(trials(), roles))[1] ?? null;
    expect(withExtreme([named, extreme, share], grid)).toEqual([named, grid, share]);
    expect(withExtreme([named, share], grid)).toEqual([named, grid, share]);
    expect(withExtreme([named, extreme, share], null)).toEqual([named, share]);
  });

  it('by hand: with one score each the grid pools, and between rows are Student, Welch, trimmed and the shift', () => {
    const table = tableOf({
      p: Array.from({ length: 40 }, (_, i) => `p${i}`),
      alert: Array.from({ length: 40 }, (_, i) => (i % 2 ? 'voice' : 'tone')),
      ms: Array.from({ length: 40 }, (_, i) => ((i * 37) % 101) + (i === 5 ? 900 : 0)),
    });
    const own: Roles = { ...roles, within: [], between: ['alert'], rows: 'one score' };
    const swept = sweepClaim(resultOf([], { estimator: 'yuen-welch' }, table, own), claim);
    expect(new Set(swept.specifications.map((each) => each.finding.estimator))).toEqual(
      new Set(['yuen-welch', 'student', 'welch', 'rank-sum']),
    );
    expect(swept.specifications.some((each) => each.ruleLabel.includes('all scores pooled'))).toBe(true);
  });

  it('degenerate: too few participants: specifications without an interval are counted as refused', () => {
    const few = tableOf({
      p: ['a', 'a', 'b', 'b'],
      alert: ['tone', 'voice', 'tone', 'voice'],
      ms: [500, 450, 520, 440],
    });
    const swept = sweepClaim(resultOf([], {}, few), claim);
    expect(swept.refused).toBe(swept.specifications.length);
    expect(swept.supported + swept.undecided + swept.contradicted).toBe(0);
  });

  it('theory: where a rule reads the condition the planned line has the p and interval of the comparison itself', () => {
    const result = resultOf([{ ...extreme, scope: 'condition' } as Rule]);
    const planned = { ...(result.findings[result.planned] as Finding), p: 0.03, interval: [-90, -5] as const };
    const rerun = { ...result, findings: result.findings.map((each, i) => (i === result.planned ? planned : each)) };
    const swept = sweepClaim(rerun, claim);
    expect(swept.specifications[swept.planned]?.finding).toEqual(planned);
    expect(swept.specifications[swept.planned]?.verdict).toBe('supported');
  });
});
