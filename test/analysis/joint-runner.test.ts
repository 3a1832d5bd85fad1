import { describe, expect, it } from 'vitest';
import type { Result } from '../../src/analysis/compare.ts';
import { applyRules, withoutRules } from '../../src/analysis/exclusion.ts';
import type { GridPoint } from '../../src/analysis/joint-plan.ts';
import { plainRow } from '../../src/analysis/joint-rows.ts';
import { JointRunner } from '../../src/analysis/joint-runner.ts';
import { Relabeller, relabelDesign } from '../../src/analysis/relabel.ts';
import { samplesFor } from '../../src/analysis/samples.ts';
import { scoreDesign } from '../../src/analysis/score.ts';
import { extreme, GROUPS, groupColumns, MEAN, planned, points, resultOf, trialColumns } from '../support/joint.ts';

const shape = { unit: 'ms', direction: 'lower' } as const;

/** The plain way: labels exchanged in the table, rules applied, scores made, samples taken, the row run. */
function compareWithPlain(result: Result, own: readonly GridPoint[], every: number): void {
  const plan = planned(result, own, { relabellings: 12 });
  const runner = new JointRunner(plan);
  const relabeller = new Relabeller(plan.relabel);
  const base = withoutRules(result.scores.design);
  for (let index = 0; index < Math.min(12 * every, plan.relabel.total); index += every) {
    const labels = relabeller.labels(index);
    runner.run(labels);
    const relabelled = relabelDesign(base, plan.relabel, labels);
    own.forEach(({ rules, score, ...row }, s) => {
      const samples = samplesFor(scoreDesign(applyRules(relabelled, rules), score), result.comparison);
      const plain = plainRow(row, samples, shape);
      const size = Math.max(1, Math.abs(plain.estimate));
      expect(Math.abs((runner.estimates[s] as number) - plain.estimate)).toBeLessThan(1e-9 * size);
      expect(Math.abs((runner.z[s] as number) - plain.z)).toBeLessThan(1e-9);
    });
  }
}

const rules = [
  [],
  [extreme('MAD', 2, 'participant')],
  [extreme('SD', 2.5, 'pooled')],
  [extreme('MAD', 3, 'participant-condition')],
];

describe('JointRunner', () => {
  it('agrees with the plain way, relabelled row by row: within participants, 1e-9', () => {
    const rows: [string, number][] = [
      ['paired-t', 0],
      ['trimmed-differences', 20],
      ['marginal-trimmed', 10],
      ['winsorized-differences', 25],
      ['signed-rank', 0],
      ['pairs-share', 0],
    ];
    compareWithPlain(resultOf(trialColumns(9, 6)), points(rules, rows), 41);
    // A rank row takes the sign of its statistic, which an estimate of exactly 0 does not have.
    const medians = points(rules, rows.slice(0, 4)).map((each) => ({
      ...each,
      score: { statistic: 'median', trim: 0 } as const,
    }));
    compareWithPlain(resultOf(trialColumns(18, 4)), medians, 1);
  });

  it('agrees with the plain way, relabelled row by row: between participants, also with trials, 1e-9', () => {
    const rows: [string, number][] = [
      ['student', 0],
      ['yuen-welch', 20],
      ['welch', 0],
      ['rank-sum', 0],
      ['brunner-munzel', 0],
    ];
    const own = [[], [extreme('MAD', 2, 'pooled')], [extreme('SD', 2, 'condition')]];
    const scores = trialColumns(22, 1).ms;
    const groups = groupColumns(scores.slice(0, 9), scores.slice(9, 22));
    const spec = { estimator: 'yuen-welch' };
    compareWithPlain(resultOf(groups, GROUPS, spec), points(own, rows), 7);
    const mixed = { factor: 'group', first: 'new', second: 'old', estimator: 'welch' };
    compareWithPlain(resultOf(trialColumns(20, 3), { between: ['group'] }, mixed), points(rules, rows), 1);
  });

  it('agrees with the plain way: three levels of a contrast within participants, 1e-9', () => {
    const effect = { type: 'contrast', factor: 'alert', first: ['voice'], second: ['tone', 'seat'] } as const;
    const spec = { factor: 'alert', first: 'voice', second: 'the others', effect };
    const result = resultOf(trialColumns(8, 4, ['tone', 'voice', 'seat']), {}, spec);
    compareWithPlain(
      result,
      points(rules, [
        ['paired-t', 0],
        ['signed-rank', 0],
      ]),
      3,
    );
  });

  it('theory: the labels as they are give the estimates of the comparison cell', () => {
    const result = resultOf(trialColumns(9, 6));
    const own = result.findings.filter(
      (finding) => finding.sameUnit && /paired-t|trimmed-d|signed/.test(finding.estimator),
    );
    const plan = planned(
      result,
      own.map(({ estimator, trim }) => ({ rules: [], score: MEAN, estimator, trim })),
    );
    const runner = new JointRunner(plan);
    runner.run(plan.relabel.observed);
    expect(own.length).toBeGreaterThan(2);
    own.forEach((finding, s) => {
      expect(Math.abs((runner.estimates[s] as number) / (finding.estimate as number) - 1)).toBeLessThan(1e-12);
    });
  });

  it('refuses a plan whose chains came without their design', () => {
    const plan = planned(resultOf(trialColumns(5, 3)), points([[extreme('SD', 2, 'condition')]], [['paired-t', 0]]));
    expect(() => new JointRunner({ ...plan, design: null }).run(plan.relabel.observed)).toThrow(/design/);
  });
});
