import { describe, expect, it } from 'vitest';
import { casesOf, effectsOf, expectedOf } from '../support/cases.ts';
import { scoresOf } from '../support/designs.ts';
import { compareAll, everyLevel } from '../support/omnibus.ts';
import { row } from '../support/samples.ts';

const visits = scoresOf('epilepsy_visits', { participant: 'id', within: ['visit'], outcome: 'seizures' });
const { findings } = compareAll(visits, everyLevel('visit'));
const own = casesOf('epilepsy_visits', 'repeated_measures_anova').find((each) => each.args.where === undefined)
  ?.expect as Readonly<Record<string, number>>;

describe('rows of several conditions within participants', () => {
  it('agrees with the reference case repeated_measures_anova of epilepsy_visits: three rows, 9 digits', () => {
    expect(row(findings, 'repeated').statistic?.value).toBeCloseTo(own.F as number, 9);
    expect([row(findings, 'repeated').df, row(findings, 'repeated').df2]).toEqual([3, 174]);
    expect(row(findings, 'repeated').p).toBeCloseTo(own.p as number, 10);
    expect(row(findings, 'repeated').estimate).toBeCloseTo(own.partial_eta2 as number, 10);
    expect(row(findings, 'repeated-gg').p).toBeCloseTo(own.p_gg as number, 10);
    expect(row(findings, 'repeated-gg').df).toBeCloseTo(3 * (own.gg_epsilon as number), 9);
    expect(row(findings, 'repeated-hf').p).toBeCloseTo(own.p_hf as number, 10);
    expect(row(findings, 'repeated-hf').df2).toBeCloseTo(174 * (own.hf_epsilon as number), 8);
    expect(row(findings, 'repeated-gg').method).toMatch(/0\.753.*Mauchly/);
  });

  it('agrees with the reference cases of trimmed means, Friedman and Quade, 9 digits', () => {
    const trimmed = expectedOf('epilepsy_visits', 'trimmed_repeated_measures_anova', { trim: 0.2 });
    expect(row(findings, 'trimmed-repeated').statistic?.value).toBeCloseTo(trimmed.F as number, 9);
    expect(row(findings, 'trimmed-repeated').df).toBeCloseTo(trimmed.df1 as number, 9);
    expect(row(findings, 'trimmed-repeated').p).toBeCloseTo(trimmed.p as number, 10);
    const ranks = casesOf('epilepsy_visits', 'friedman_test').find((each) => each.args.where === undefined)?.expect;
    expect(row(findings, 'friedman').statistic?.value).toBeCloseTo(ranks?.chi2 as number, 9);
    expect(row(findings, 'friedman').estimate).toBeCloseTo(ranks?.kendalls_w as number, 10);
    expect(row(findings, 'friedman').p).toBeCloseTo(ranks?.p as number, 10);
    const quade = casesOf('epilepsy_visits', 'quade_test').find((each) => each.args.where === undefined)?.expect;
    expect(row(findings, 'quade').p).toBeCloseTo(quade?.p as number, 10);
  });

  it('agrees with the reference case within_within_anova of iris_parts: the interaction, never corrected with one comparison (R6)', () => {
    const parts = scoresOf('iris_parts', { participant: 'flower', within: ['part', 'dimension'], outcome: 'cm' });
    const found = compareAll(parts, { type: 'interaction', factors: ['part', 'dimension'] }).findings;
    const expected = effectsOf('iris_parts', 'within_within_anova')['part:dimension'];
    expect(row(found, 'repeated').statistic?.value).toBeCloseTo(expected?.F as number, 7);
    expect(found.map((each) => each.estimator)).toEqual(['repeated', 'welch-james', 'trimmed-welch-james']);
    expect(row(found, 'repeated').method).toMatch(/single comparison/);
  });

  it('by hand: a main effect of crossed factors is tested on the mean over the other one', () => {
    const parts = scoresOf('iris_parts', { participant: 'flower', within: ['part', 'dimension'], outcome: 'cm' });
    const found = compareAll(parts, everyLevel('part')).findings;
    // within_within_anova of iris_parts: part F(1, 149) = 530.0219.
    expect(row(found, 'repeated').statistic?.value).toBeCloseTo(530.021887272034, 7);
  });

  it('theory: with complete agreement Kendall W is 1', () => {
    const trees = scoresOf(
      'orange_trees',
      { participant: 'tree', within: ['age'], outcome: 'circumference' },
      (at) => at % 7 < 3,
    );
    const found = compareAll(trees, everyLevel('age')).findings;
    expect(row(found, 'friedman').estimate).toBe(1);
    expect(row(found, 'repeated').cautions).toContain('EPS');
  });

  it('invariance: the order of participants does not matter to any statistic, 9 digits', () => {
    const width = visits.conditions.length;
    const turned = {
      ...visits,
      participants: [...visits.participants].reverse(),
      values: Float64Array.from({ length: visits.values.length }, (_, i) => {
        const who = visits.participants.length - 1 - Math.floor(i / width);
        return visits.values[who * width + (i % width)] as number;
      }),
    };
    compareAll(turned, everyLevel('visit')).findings.forEach((found, i) => {
      expect(found.statistic?.value).toBeCloseTo(findings[i]?.statistic?.value as number, 9);
      expect(found.p).toBeCloseTo(findings[i]?.p as number, 9);
    });
  });

  it('degenerate: equal differences between conditions give no F, with a reason', () => {
    const width = visits.conditions.length;
    const flat = { ...visits, values: visits.values.map((_, i) => (i % width) + Math.floor(i / width)) };
    const found = compareAll(flat, everyLevel('visit')).findings;
    expect(row(found, 'repeated')).toMatchObject({ statistic: null, p: null, interval: null });
    expect(row(found, 'repeated').reason).toMatch(/do not vary/);
  });

  it('refuses nothing silently: a participant who lacks a condition does not enter and is listed', () => {
    const lacking = scoresOf(
      'epilepsy_visits',
      { participant: 'id', within: ['visit'], outcome: 'seizures' },
      (at) => at !== 2,
    );
    const found = compareAll(lacking, everyLevel('visit'));
    expect(found.findings[0]?.n).toBe(58);
  });
});
